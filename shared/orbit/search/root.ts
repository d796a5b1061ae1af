/** Turns after which a root is taken as it is: the bracket then is far below a microsecond. */
const MOST_TURNS = 60;

/**
 * Root of a continuous function between two places with values of opposite sign (or zero): false position with the
 * Illinois halving, which keeps the bracket and converges with order 1.44 (Dowell and Jarratt 1971).
 */
export function rootBetween(
  f: (x: number) => number,
  bracket: readonly [number, number],
  values: readonly [number, number],
  tolerance: number,
): number {
  let [a, b] = bracket;
  let [fa, fb] = values;
  for (let turn = 0; turn < MOST_TURNS && Math.abs(b - a) > tolerance; turn++) {
    if (fb === 0) return b;
    const x = b - (fb * (b - a)) / (fb - fa);
    const fx = f(x);
    if (Math.abs(x - b) < tolerance) return x;
    if (fx < 0 === fb < 0) fa /= 2;
    else [a, fa] = [b, fb];
    [b, fb] = [x, fx];
  }
  return b;
}
