/** The package ships no types; only what quantiles.ts uses is declared. Its ES import has a default and nothing else. */
declare module 'jstat' {
  type Distribution2 = { inv(p: number, a: number, b: number): number; cdf(x: number, a: number, b: number): number };
  type Distribution1 = {
    inv(p: number, df: number): number;
    cdf(x: number, df: number): number;
    pdf(x: number, df: number): number;
  };
  const jstat: { jStat: { studentt: Distribution1; normal: Distribution2 } };
  export default jstat;
}
