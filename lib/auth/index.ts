export { findSession, getCtx, requireCtx, requireRight, type Ctx, type RowRef } from "./context";
export { runAction } from "./run-action";
export { runRoute } from "./run-route";
