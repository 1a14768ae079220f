/**
 * Root of a continuous function between two points at which its sign differs, by inverse quadratic interpolation
 * where that is safe and bisection where it is not.
 * Source: Chandrupatla, "A new hybrid quadratic/bisection algorithm for finding the zero of a nonlinear function
 * without using derivatives", Advances in Engineering Software 1997.
 * @param tolerance - relative width of the bracket at which to stop.
 * @throws {RangeError} if the function has the same sign at both ends.
 */
export function findRoot(f: (x: number) => number, low: number, high: number, tolerance = 1e-15): number {
  let b = low
  let a = high
  let fb = f(b)
  let fa = f(a)
  if (fa === 0) return a
  if (fb === 0) return b
  if (fa > 0 === fb > 0) throw new RangeError(`no sign change between ${low} (${fb}) and ${high} (${fa})`)
  let share = 0.5
  for (let step = 0; step < 120; step++) {
    const x = a + share * (b - a)
    const fx = f(x)
    const sameSide = fx > 0 === fa > 0
    const c = sameSide ? a : b
    const fc = sameSide ? fa : fb
    if (!sameSide) {
      b = a
      fb = fa
    }
    a = x
    fa = fx
    const best = Math.abs(fa) < Math.abs(fb) ? a : b
    const width = Math.abs(b - a)
    const smallest = 2 * Number.EPSILON * Math.abs(best) + 0.5 * tolerance * Math.abs(best)
    if (fx === 0 || width <= 2 * smallest) return best
    const xi = (a - b) / (c - b)
    const phi = (fa - fb) / (fc - fb)
    const isSafe = phi * phi < xi && (1 - phi) * (1 - phi) < 1 - xi
    share = isSafe
      ? (fa / (fb - fa)) * (fc / (fb - fc)) + ((((c - a) / (b - a)) * fa) / (fc - fa)) * (fb / (fc - fb))
      : 0.5
    const margin = smallest / width
    share = Math.min(1 - margin, Math.max(margin, share))
  }
  return Math.abs(fa) < Math.abs(fb) ? a : b
}
