/**
 * Control-to-output response of a linear model, prepared once so that each frequency costs about n²/2 multiplications.
 *
 * An orthogonal change of states makes A upper Hessenberg and b a multiple of the first axis. Then (s − H)·x = β·e₁ is
 * solved from its last row upwards, x_n taken as one, and the first row tells by what to scale.
 * Sources: Laub, "Efficient multivariable frequency response computations", IEEE Trans. Automatic Control 1981; Hyman's
 * method as in Wilkinson, The Algebraic Eigenvalue Problem, 1965, chapter 7.
 */
import { CONTROL, type LinearModel } from '../averaged/linearModel'
import { balancingScale } from '../numeric/eigen'

/** A coupling below this share of the matrix is round-off: the states behind it do not answer to the control. */
const NEGLIGIBLE = 1e-15

/** Writes real and imaginary part at ω (rad/s) into `out`: a run asks so often that objects would cost more than sums. */
export type ResponseInto = (omega: number, out: Float64Array) => void

export function controlToOutput({ A, B, C, D }: LinearModel): ResponseInto {
  const n = A.length
  const scale = balancingScale(A)
  const H = A.map((row, i) => row.map((value, j) => (value * scale[j]!) / scale[i]!))
  const b = B.map((row, i) => row[CONTROL]! / scale[i]!)
  const c = C.map((value, i) => value * scale[i]!)
  const beta = alignWithFirstAxis(H, b, c)
  for (let k = 1; k < n - 1; k++) reflectBelow(H, c, k)
  const size = reachable(H)
  const through = D[CONTROL]!
  const re = new Float64Array(n)
  const im = new Float64Array(n)
  return (omega, out) => {
    re[size - 1] = 1
    im[size - 1] = 0
    let residualRe = 0
    let residualIm = 0
    for (let i = size - 1; i >= 0; i--) {
      const row = H[i]!
      // (jω − h_ii)·x_i − Σ h_ij·x_j
      let sumRe = -omega * im[i]!
      let sumIm = omega * re[i]!
      for (let j = i; j < size; j++) {
        sumRe -= row[j]! * re[j]!
        sumIm -= row[j]! * im[j]!
      }
      if (i > 0) {
        re[i - 1] = sumRe / row[i - 1]!
        im[i - 1] = sumIm / row[i - 1]!
      } else {
        residualRe = sumRe
        residualIm = sumIm
      }
    }
    let outRe = 0
    let outIm = 0
    for (let i = 0; i < size; i++) {
      outRe += c[i]! * re[i]!
      outIm += c[i]! * im[i]!
    }
    const factor = beta / (residualRe * residualRe + residualIm * residualIm)
    out[0] = through + factor * (outRe * residualRe + outIm * residualIm)
    out[1] = factor * (outIm * residualRe - outRe * residualIm)
  }
}

/** Rotates the states so that b lies along the first axis. @returns its length there, with its sign. */
function alignWithFirstAxis(H: number[][], b: readonly number[], c: number[]): number {
  const length = Math.hypot(...b)
  if (length === 0) return 0
  const v = [...b]
  const sign = b[0]! < 0 ? -1 : 1
  v[0]! += sign * length
  reflect(H, c, v)
  return -sign * length
}

/** Clears column k − 1 below row k. */
function reflectBelow(H: number[][], c: number[], k: number): void {
  const v = H.map((row, i) => (i < k ? 0 : row[k - 1]!))
  const length = Math.hypot(...v)
  if (length === 0) return
  v[k]! += (v[k]! < 0 ? -1 : 1) * length
  reflect(H, c, v)
}

/** H ← P·H·P, c ← c·P with P = I − 2vvᵀ/vᵀv. */
function reflect(H: number[][], c: number[], v: readonly number[]): void {
  const n = v.length
  let square = 0
  for (let i = 0; i < n; i++) square += v[i]! * v[i]!
  const factor = 2 / square
  for (let j = 0; j < n; j++) {
    let along = 0
    for (let i = 0; i < n; i++) along += v[i]! * H[i]![j]!
    for (let i = 0; i < n; i++) H[i]![j]! -= factor * along * v[i]!
  }
  for (const row of [...H, c]) {
    let along = 0
    for (let j = 0; j < n; j++) along += row[j]! * v[j]!
    for (let j = 0; j < n; j++) row[j]! -= factor * along * v[j]!
  }
}

/** How many of the leading states the control reaches. */
function reachable(H: readonly number[][]): number {
  const largest = H.reduce((most, row) => row.reduce((m, value) => Math.max(m, Math.abs(value)), most), 0)
  for (let i = 1; i < H.length; i++) {
    if (Math.abs(H[i]![i - 1]!) <= NEGLIGIBLE * largest) return i
  }
  return H.length
}
