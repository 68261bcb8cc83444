export { formatDate, formatDateTime, formatTime } from "./dates";
export { type FigureText, formatAmount, formatMoneyFigure, formatShare, spreadText } from "./figures";
export {
  decimalsFor,
  formatChosenPercent,
  formatCount,
  formatMoney,
  formatNumber,
  formatPercent,
  formatPoints,
  formatUnitMoney,
  thinSpace,
  withSign,
} from "./numbers";
export { headlineSentence, oneIn, percentileName, plural, weeksOf } from "./sentences";
