declare module "jstat" {
  type Continuous = { cdf(x: number, a: number, b: number): number; inv(p: number, a: number, b: number): number };
  const jstat: { normal: Continuous; gamma: Continuous };
  export default jstat;
}
