/**
 * Minimum of a function of a few variables without derivatives.
 * Source: Nelder and Mead, "A simplex method for function minimization", The Computer Journal 1965.
 * @param start - first corner of the simplex; the others are a step away along each axis.
 * @param evaluations - how often the function may be asked at most.
 */
export function minimise(
  f: (x: readonly number[]) => number,
  start: readonly number[],
  step: number,
  evaluations: number,
): { readonly x: readonly number[]; readonly value: number } {
  const n = start.length
  let asked = 0
  const ask = (x: readonly number[]) => {
    asked++
    return { x, value: f(x) }
  }
  const simplex = [ask(start), ...start.map((_, i) => ask(start.map((value, j) => (i === j ? value + step : value))))]
  while (asked < evaluations) {
    simplex.sort((a, b) => a.value - b.value)
    const [best, worst] = [simplex[0]!, simplex[n]!]
    const centre = start.map((_, j) => simplex.slice(0, n).reduce((sum, { x }) => sum + x[j]!, 0) / n)
    const along = (share: number) => ask(centre.map((c, j) => c + share * (worst.x[j]! - c)))
    const reflected = along(-1)
    if (reflected.value < best.value) {
      const expanded = along(-2)
      simplex[n] = expanded.value < reflected.value ? expanded : reflected
      continue
    }
    if (reflected.value < simplex[n - 1]!.value) {
      simplex[n] = reflected
      continue
    }
    const contracted = along(reflected.value < worst.value ? -0.5 : 0.5)
    if (contracted.value < Math.min(worst.value, reflected.value)) {
      simplex[n] = contracted
      continue
    }
    for (let i = 1; i <= n; i++) simplex[i] = ask(best.x.map((b, j) => b + 0.5 * (simplex[i]!.x[j]! - b)))
  }
  simplex.sort((a, b) => a.value - b.value)
  return simplex[0]!
}
