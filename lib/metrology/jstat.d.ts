/** The part of jstat that is used here; the package brings no types of its own. */
declare module "jstat" {
  const jstat: {
    normal: { cdf(value: number, mean: number, deviation: number): number };
  };
  export default jstat;
}
