/** The standard normal distribution. */

const CENTRE = [
  [
    3.387132872796366608, 1.3314166789178437745e2, 1.9715909503065514427e3, 1.3731693765509461125e4,
    4.5921953931549871457e4, 6.7265770927008700853e4, 3.3430575583588128105e4, 2.5090809287301226727e3,
  ],
  [
    1, 4.2313330701600911252e1, 6.871870074920579083e2, 5.3941960214247511077e3, 2.1213794301586595867e4,
    3.930789580009271061e4, 2.8729085735721942674e4, 5.226495278852854561e3,
  ],
] as const
const FLANK = [
  [
    1.42343711074968357734, 4.6303378461565452959, 5.7694972214606914055, 3.64784832476320460504,
    1.27045825245236838258, 2.4178072517745061177e-1, 2.27238449892691845833e-2, 7.7454501427834140764e-4,
  ],
  [
    1, 2.05319162663775882187, 1.6763848301838038494, 6.8976733498510000455e-1, 1.4810397642748007459e-1,
    1.51986665636164571966e-2, 5.475938084995344946e-4, 1.05075007164441684324e-9,
  ],
] as const

/**
 * z below which a standard normal number lies with probability p, to 1e-15 or so.
 * Source: Wichura, "Algorithm AS 241: the percentage points of the normal distribution", Applied Statistics 1988; its
 * two ranges that reach out to six standard deviations.
 * @param p - 1e-9 to 1 − 1e-9
 */
export function normalQuantile(p: number): number {
  const q = p - 0.5
  if (Math.abs(q) <= 0.425) return q * ratio(CENTRE, 0.180625 - q * q)
  const fromEnd = Math.sqrt(-Math.log(Math.min(p, 1 - p)))
  return Math.sign(q) * ratio(FLANK, fromEnd - 1.6)
}

function ratio([above, below]: readonly [readonly number[], readonly number[]], x: number): number {
  let numerator = 0
  let denominator = 0
  for (let k = 7; k >= 0; k--) {
    numerator = numerator * x + above[k]!
    denominator = denominator * x + below[k]!
  }
  return numerator / denominator
}

/** Probability below −3 standard deviations. */
const BELOW_MINUS_THREE = 1.3498980316300945e-3

/** Quantile, in multiples of the limit, of a normal distribution cut off at ± its limit, which is three standard deviations. */
export function truncatedNormalQuantile(u: number): number {
  return normalQuantile(BELOW_MINUS_THREE + u * (1 - 2 * BELOW_MINUS_THREE)) / 3
}
