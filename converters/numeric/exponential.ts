/**
 * Matrix exponential by scaling and squaring of Padé approximants.
 * Source: Higham, "The scaling and squaring method for the matrix exponential revisited", SIAM J. Matrix Anal. Appl.
 * 2005, table 2.3 (the bounds θ) and eq. 2.3 (the coefficients).
 */
import { solveReal } from './linearSystem'

/** [degree, largest 1-norm at which that degree is accurate to double precision]. */
const DEGREES: readonly (readonly [number, number])[] = [
  [3, 1.495585217958292e-2],
  [5, 2.53939833006323e-1],
  [7, 9.504178996162932e-1],
  [9, 2.097847961257068],
  [13, 5.371920351148152],
]

/** Numerator coefficients b₀ … b_m of the [m/m] Padé approximant to eˣ: (2m−k)!·m!/((2m)!·k!·(m−k)!). */
const COEFFICIENTS = new Map(
  DEGREES.map(([degree]) => {
    const b = [1]
    for (let k = 1; k <= degree; k++) b.push((b[k - 1]! * (degree - k + 1)) / (k * (2 * degree - k + 1)))
    return [degree, Float64Array.from(b)]
  }),
)

/**
 * e^(A·t).
 * @param A - n × n, row-major; left as it is.
 * @param t - seconds, or whatever makes A·t dimensionless.
 */
export function exponential(A: Float64Array, n: number, t: number): Float64Array {
  const size = n * n
  let norm = 0
  for (let j = 0; j < n; j++) {
    let column = 0
    for (let i = 0; i < n; i++) column += Math.abs(A[i * n + j]! * t)
    norm = Math.max(norm, column)
  }
  const found = DEGREES.find(([, bound]) => norm <= bound) ?? DEGREES[4]!
  const [degree, bound] = found
  const squarings = norm > bound ? Math.ceil(Math.log2(norm / bound)) : 0
  const scaled = new Float64Array(size)
  const factor = t / 2 ** squarings
  for (let i = 0; i < size; i++) scaled[i] = A[i]! * factor

  const b = COEFFICIENTS.get(degree)!
  const square = product(scaled, scaled, n)
  // Even and odd parts by Horner in A²: U = A·(b₁ + b₃A² + …), V = b₀ + b₂A² + …
  let odd = identity(n, b[degree]!)
  let even = identity(n, b[degree - 1]!)
  for (let k = degree - 2; k >= 1; k -= 2) {
    odd = product(odd, square, n)
    even = product(even, square, n)
    for (let i = 0; i < n; i++) {
      odd[i * n + i]! += b[k]!
      even[i * n + i]! += b[k - 1]!
    }
  }
  odd = product(scaled, odd, n)
  const denominator = new Float64Array(size)
  let result = new Float64Array(size)
  for (let i = 0; i < size; i++) {
    denominator[i] = even[i]! - odd[i]!
    result[i] = even[i]! + odd[i]!
  }
  solveReal(denominator, n, result, n)
  for (let k = 0; k < squarings; k++) result = product(result, result, n)
  return result
}

export function identity(n: number, value = 1): Float64Array<ArrayBuffer> {
  const matrix = new Float64Array(n * n)
  for (let i = 0; i < n; i++) matrix[i * n + i] = value
  return matrix
}

/** a·b for n × n row-major matrices. */
export function product(a: Float64Array, b: Float64Array, n: number): Float64Array<ArrayBuffer> {
  const result = new Float64Array(n * n)
  for (let i = 0; i < n; i++) {
    for (let k = 0; k < n; k++) {
      const factor = a[i * n + k]!
      if (factor === 0) continue
      for (let j = 0; j < n; j++) result[i * n + j]! += factor * b[k * n + j]!
    }
  }
  return result
}
