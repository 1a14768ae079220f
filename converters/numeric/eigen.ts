/**
 * Poles and zeros of a linear system ẋ = A·x + b·u, y = c·x + d·u. Circuits mix microhenries with millifarads, so
 * every matrix is balanced before its eigenvalues are taken.
 */
import { EigenvalueDecomposition, Matrix } from 'ml-matrix'
import type { Complex } from './complex'

/** What of a signal path is round-off, as a fraction of the numbers that it was computed from. */
const ROUND_OFF = 1e-12

/**
 * Diagonal scaling by powers of two that makes row and column norms alike (Parlett and Reinsch 1969). Exact: it
 * loses no digit.
 * @returns the scale of each state: A[i][j]·scale[j]/scale[i] is the balanced matrix.
 */
export function balancingScale(A: readonly (readonly number[])[]): number[] {
  const n = A.length
  const scale = new Array<number>(n).fill(1)
  for (let changed = true, sweep = 0; changed && sweep < 60; sweep++) {
    changed = false
    for (let i = 0; i < n; i++) {
      let row = 0
      let column = 0
      for (let j = 0; j < n; j++) {
        if (j === i) continue
        row += Math.abs((A[i]![j]! * scale[j]!) / scale[i]!)
        column += Math.abs((A[j]![i]! * scale[i]!) / scale[j]!)
      }
      if (row === 0 || column === 0) continue
      const factor = 2 ** Math.round(Math.log2(Math.sqrt(row / column)))
      if (factor !== 1 && row / factor + column * factor < 0.95 * (row + column)) {
        scale[i]! *= factor
        changed = true
      }
    }
  }
  return scale
}

/**
 * Eigenvalues of a real square matrix, conjugate pairs adjacent with the positive imaginary part first.
 * @throws {RangeError} if an entry is not finite; the iteration would not end.
 */
export function eigenvalues(A: readonly (readonly number[])[]): Complex[] {
  const n = A.length
  if (n === 0) return []
  if (n === 2) return eigenvaluesOfTwo(A)
  const scale = balancingScale(A)
  const balanced = new Matrix(A.map((row, i) => row.map((a, j) => (a * scale[j]!) / scale[i]!)))
  if (!balanced.to1DArray().every(Number.isFinite))
    throw new RangeError('a matrix with an infinite entry has no eigenvalues')
  const { realEigenvalues, imaginaryEigenvalues } = new EigenvalueDecomposition(balanced)
  return realEigenvalues.map((re, i) => ({ re, im: imaginaryEigenvalues[i]! }))
}

/** The roots of λ² − trace·λ + determinant; a buck or boost has no more, and statistical runs ask for thousands. */
function eigenvaluesOfTwo(A: readonly (readonly number[])[]): Complex[] {
  const [a, b] = A[0] as [number, number]
  const [c, d] = A[1] as [number, number]
  const half = (a - d) / 2
  const middle = (a + d) / 2
  const square = half * half + b * c
  if (!Number.isFinite(square)) throw new RangeError('a matrix with an infinite entry has no eigenvalues')
  const root = Math.sqrt(Math.abs(square))
  if (square < 0) {
    return [
      { re: middle, im: root },
      { re: middle, im: -root },
    ]
  }
  // The larger one adds up; the smaller one would cancel, so it follows from the product.
  const larger = middle < 0 ? middle - root : middle + root
  return [
    { re: larger, im: 0 },
    { re: larger === 0 ? 0 : (a * d - b * c) / larger, im: 0 },
  ]
}

/**
 * Invariant zeros of a single-input single-output system: the s at which u can be non-zero and y stays zero. As long
 * as d is zero, y = 0 fixes one combination of the states; that state is rotated out and its own equation becomes the
 * next "output". Once d is not zero, the zeros are the eigenvalues of A − b·c/d.
 * Source: Emami-Naeini and Van Dooren, "Computation of zeros of linear multivariable systems", Automatica 1982.
 */
export function invariantZeros(
  A: readonly (readonly number[])[],
  b: readonly number[],
  c: readonly number[],
  d: number,
): Complex[] {
  const scale = balancingScale(A)
  let state = A.map((row, i) => row.map((a, j) => (a * scale[j]!) / scale[i]!))
  let input = b.map((value, i) => value / scale[i]!)
  let output = c.map((value, i) => value * scale[i]!)
  let through = d
  // `reach` follows how large the feed-through could be, to tell a true zero from the residue of a cancellation.
  let reach = Math.abs(d)
  for (;;) {
    const n = state.length
    if (Math.abs(through) > ROUND_OFF * reach && through !== 0) {
      return eigenvalues(state.map((row, i) => row.map((a, j) => a - (input[i]! * output[j]!) / through)))
    }
    const norm = Math.hypot(...output)
    if (n === 0 || norm === 0) return []
    const reflector = householderOnto(output)
    const rotated = reflect(state, reflector)
    const rotatedInput = reflectVector(input, reflector)
    reach = Math.hypot(...rotatedInput)
    state = rotated.slice(0, n - 1).map((row) => row.slice(0, n - 1))
    input = rotatedInput.slice(0, n - 1)
    output = rotated[n - 1]!.slice(0, n - 1)
    through = rotatedInput[n - 1]!
  }
}

/** Unit vector v such that (I − 2vvᵀ)·x lies along the last axis. */
function householderOnto(x: readonly number[]): number[] {
  const n = x.length
  const v = [...x]
  v[n - 1]! += Math.sign(x[n - 1]! || 1) * Math.hypot(...x)
  const length = Math.hypot(...v)
  return v.map((value) => value / length)
}

/** H·x with H = I − 2vvᵀ. */
function reflectVector(x: readonly number[], v: readonly number[]): number[] {
  const along = 2 * v.reduce((sum, value, i) => sum + value * x[i]!, 0)
  return x.map((value, i) => value - along * v[i]!)
}

/** H·A·H with H = I − 2vvᵀ. */
function reflect(A: readonly (readonly number[])[], v: readonly number[]): number[][] {
  const rows = A.map((row) => reflectVector(row, v))
  const columns = v.map((_, j) =>
    reflectVector(
      rows.map((row) => row[j]!),
      v,
    ),
  )
  return rows.map((row, i) => row.map((_, j) => columns[j]![i]!))
}
