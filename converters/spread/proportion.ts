/** Confidence interval of a proportion that was counted. */
import { findRoot } from '../numeric/rootFinding'

export interface Interval {
  readonly lower: number
  readonly upper: number
}

/**
 * Clopper–Pearson interval: it covers the true proportion with at least the probability asked for.
 * Source: Clopper and Pearson, "The use of confidence or fiducial limits illustrated in the case of the binomial",
 * Biometrika 1934. In beta quantiles: lower = B⁻¹(α/2; k, n − k + 1), upper = B⁻¹(1 − α/2; k + 1, n − k).
 * @param successes - 0 to `trials`
 * @param confidence - such as 0.95
 */
export function clopperPearson(successes: number, trials: number, confidence: number): Interval {
  const tail = (1 - confidence) / 2
  return {
    lower: successes === 0 ? 0 : betaQuantile(tail, successes, trials - successes + 1),
    upper: successes === trials ? 1 : betaQuantile(1 - tail, successes + 1, trials - successes),
  }
}

/** x at which the regularised incomplete beta function Iₓ(a, b) is p; 0 < p < 1. */
export function betaQuantile(p: number, a: number, b: number): number {
  // Searched from the nearer end, where the small tail keeps its digits.
  const mean = a / (a + b)
  const deviation = Math.sqrt((mean * (1 - mean)) / (a + b + 1))
  const f = (x: number) => regularisedBeta(x, a, b) - p
  let low = Math.max(0, mean - 4 * deviation)
  let high = Math.min(1, mean + 4 * deviation)
  while (low > 0 && f(low) > 0) low = low < 1e-12 ? 0 : low / 2
  while (high < 1 && f(high) < 0) high = 1 - high < 1e-12 ? 1 : (1 + high) / 2
  return findRoot(f, low, high)
}

/** Iₓ(a, b). Symmetry keeps the continued fraction where it converges quickly. */
export function regularisedBeta(x: number, a: number, b: number): number {
  if (x <= 0) return 0
  if (x >= 1) return 1
  const front = Math.exp(a * Math.log(x) + b * Math.log1p(-x) - logBeta(a, b))
  return x < (a + 1) / (a + b + 2) ? (front * betaFraction(x, a, b)) / a : 1 - (front * betaFraction(1 - x, b, a)) / b
}

/**
 * The continued fraction of the incomplete beta function, by the modified Lentz method.
 * Sources: Abramowitz and Stegun, Handbook of Mathematical Functions, 1964, 26.5.8; Thompson and Barnett, Journal of
 * Computational Physics 1986 (the method).
 */
function betaFraction(x: number, a: number, b: number): number {
  const tiny = 1e-300
  const away = (value: number) => (Math.abs(value) < tiny ? tiny : value)
  let c = 1
  let d = 1 / away(1 - ((a + b) * x) / (a + 1))
  let value = d
  // The number of terms goes with the root of the larger parameter; this is enough for a million trials.
  for (let m = 1; m < 10_000; m++) {
    for (const term of [
      (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m)),
      (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1)),
    ]) {
      d = 1 / away(1 + term * d)
      c = away(1 + term / c)
      value *= c * d
    }
    if (Math.abs(c * d - 1) < 1e-15) break
  }
  return value
}

const logBeta = (a: number, b: number): number => {
  const [small, large] = a < b ? [a, b] : [b, a]
  // ln Γ(large) − ln Γ(large + small) cancels when taken as a difference of large numbers.
  if (large < 20) return logGamma(small) + logGamma(large) - logGamma(small + large)
  const sum = small + large
  const stirling = (large - 0.5) * Math.log1p(-small / sum) - small * Math.log(sum) + small
  return logGamma(small) + stirling + stirlingRest(large) - stirlingRest(sum)
}

/** ln Γ(x), x > 0: Stirling's series (Abramowitz and Stegun, 6.1.41), lifted above 20 by the recurrence. */
function logGamma(x: number): number {
  let product = 1
  let y = x
  while (y < 20) product *= y++
  return (y - 0.5) * Math.log(y) - y + 0.5 * Math.log(2 * Math.PI) + stirlingRest(y) - Math.log(product)
}

const stirlingRest = (x: number): number => {
  const square = 1 / (x * x)
  return (1 / 12 - square * (1 / 360 - square * (1 / 1260 - square * (1 / 1680 - square / 1188)))) / x
}
