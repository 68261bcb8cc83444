import { exp, ln } from "./elementary";

/**
 * Quantile of the standard normal distribution, relative error about 1e-16.
 * @param p - In (0, 1).
 * @param q - 1 - p, given apart so that the upper tail keeps its digits.
 * @remarks Wichura (1988), algorithm AS 241, PPND16.
 */
export function normalQuantile(p: number, q: number = 1 - p): number {
  const d = p - 0.5;
  if (d <= 0.425 && d >= -0.425) {
    const r = 0.180625 - d * d;
    return (d * polynomial(centreNumerator, r)) / polynomial(centreDenominator, r);
  }
  const root = Math.sqrt(-ln(p < q ? p : q));
  const x =
    root <= 5
      ? polynomial(tailNumerator, root - 1.6) / polynomial(tailDenominator, root - 1.6)
      : polynomial(farNumerator, root - 5) / polynomial(farDenominator, root - 5);
  return p < q ? -x : x;
}

/**
 * Distribution function of the standard normal, relative error below 1e-15 in the lower tail.
 * @remarks Cody (1969), rational Chebyshev approximations for the error function.
 */
export function normalCdf(z: number): number {
  return 0.5 * erfc(-z * Math.SQRT1_2);
}

function erfc(x: number): number {
  const y = Math.abs(x);
  if (y <= 0.46875) {
    const y2 = y * y;
    return 1 - (x * polynomial(erfNumerator, y2)) / polynomial(erfDenominator, y2);
  }
  let value: number;
  if (y <= 4) value = polynomial(erfcNumerator, y) / polynomial(erfcDenominator, y);
  else {
    const s = 1 / (y * y);
    const r = (s * polynomial(farErfcNumerator, s)) / polynomial(farErfcDenominator, s);
    value = (5.6418958354775628695e-1 - r) / y;
  }
  // exp(-y^2) in two factors, the first of them exact.
  const head = Math.floor(y * 16) / 16;
  value *= exp(-head * head) * exp(-(y - head) * (y + head));
  return x < 0 ? 2 - value : value;
}

/** Coefficients from the highest power down. */
function polynomial(coefficients: readonly number[], x: number): number {
  let value = coefficients[0];
  for (let i = 1; i < coefficients.length; i++) value = value * x + coefficients[i];
  return value;
}

const centreNumerator = [
  2.5090809287301226727e3, 3.3430575583588128105e4, 6.7265770927008700853e4, 4.5921953931549871457e4,
  1.3731693765509461125e4, 1.9715909503065514427e3, 1.3314166789178437745e2, 3.387132872796366608,
];
const centreDenominator = [
  5.226495278852854561e3, 2.8729085735721942674e4, 3.930789580009271061e4, 2.1213794301586595867e4,
  5.3941960214247511077e3, 6.871870074920579083e2, 4.2313330701600911252e1, 1,
];
const tailNumerator = [
  7.7454501427834140764e-4, 2.27238449892691845833e-2, 2.4178072517745061177e-1, 1.27045825245236838258,
  3.64784832476320460504, 5.7694972214606914055, 4.6303378461565452959, 1.42343711074968357734,
];
const tailDenominator = [
  1.05075007164441684324e-9, 5.475938084995344946e-4, 1.51986665636164571966e-2, 1.4810397642748007459e-1,
  6.8976733498510000455e-1, 1.6763848301838038494, 2.05319162663775882187, 1,
];
const farNumerator = [
  2.01033439929228813265e-7, 2.71155556874348757815e-5, 1.2426609473880784386e-3, 2.6532189526576123093e-2,
  2.9656057182850489123e-1, 1.7848265399172913358, 5.4637849111641143699, 6.6579046435011037772,
];
const farDenominator = [
  2.04426310338993978564e-15, 1.4215117583164458887e-7, 1.8463183175100546818e-5, 7.868691311456132591e-4,
  1.48753612908506148525e-2, 1.3692988092273580531e-1, 5.9983220655588793769e-1, 1,
];
const erfNumerator = [
  1.85777706184603153e-1, 3.1611237438705656, 1.13864154151050156e2, 3.77485237685302021e2, 3.20937758913846947e3,
];
const erfDenominator = [1, 2.36012909523441209e1, 2.44024637934444173e2, 1.28261652607737228e3, 2.84423683343917062e3];
const erfcNumerator = [
  2.15311535474403846e-8, 5.64188496988670089e-1, 8.88314979438837594, 6.61191906371416295e1, 2.98635138197400131e2,
  8.8195222124176909e2, 1.71204761263407058e3, 2.05107837782607147e3, 1.23033935479799725e3,
];
const erfcDenominator = [
  1, 1.57449261107098347e1, 1.17693950891312499e2, 5.37181101862009858e2, 1.62138957456669019e3, 3.29079923573345963e3,
  4.36261909014324716e3, 3.43936767414372164e3, 1.23033935480374942e3,
];
const farErfcNumerator = [
  1.63153871373020978e-2, 3.05326634961232344e-1, 3.60344899949804439e-1, 1.25781726111229246e-1,
  1.60837851487422766e-2, 6.58749161529837803e-4,
];
const farErfcDenominator = [
  1, 2.56852019228982242, 1.87295284992346725, 5.27905102951428412e-1, 6.05183413124413191e-2, 2.33520497626869185e-3,
];
