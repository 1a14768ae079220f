/**
 * Inverse of a small complex matrix by Gauss–Jordan elimination with partial pivoting, in place.
 * @param re - real parts, n × n row-major; becomes the inverse's.
 * @param im - imaginary parts, alike.
 * @param order - scratch of length n.
 * @returns false if a pivot is exactly zero.
 */
export function invertComplex(re: Float64Array, im: Float64Array, n: number, order: Int32Array): boolean {
  for (let k = 0; k < n; k++) {
    let pivotRow = k
    let best = -1
    for (let i = k; i < n; i++) {
      const at = i * n + k
      const size = re[at]! * re[at]! + im[at]! * im[at]!
      if (size > best) {
        best = size
        pivotRow = i
      }
    }
    if (!(best > 0)) return false
    order[k] = pivotRow
    if (pivotRow !== k) {
      for (let j = 0; j < n; j++) {
        const a = k * n + j
        const b = pivotRow * n + j
        const keptRe = re[a]!
        const keptIm = im[a]!
        re[a] = re[b]!
        im[a] = im[b]!
        re[b] = keptRe
        im[b] = keptIm
      }
    }
    const diagonal = k * n + k
    const inverseRe = re[diagonal]! / best
    const inverseIm = -im[diagonal]! / best
    re[diagonal] = 1
    im[diagonal] = 0
    for (let j = 0; j < n; j++) {
      const at = k * n + j
      const a = re[at]!
      const b = im[at]!
      re[at] = a * inverseRe - b * inverseIm
      im[at] = a * inverseIm + b * inverseRe
    }
    for (let i = 0; i < n; i++) {
      if (i === k) continue
      const at = i * n + k
      const factorRe = re[at]!
      const factorIm = im[at]!
      re[at] = 0
      im[at] = 0
      for (let j = 0; j < n; j++) {
        const from = k * n + j
        const to = i * n + j
        re[to]! -= factorRe * re[from]! - factorIm * im[from]!
        im[to]! -= factorRe * im[from]! + factorIm * re[from]!
      }
    }
  }
  // The row exchanges of the elimination are column exchanges of the inverse, undone last first.
  for (let k = n - 1; k >= 0; k--) {
    const other = order[k]!
    if (other === k) continue
    for (let i = 0; i < n; i++) {
      const a = i * n + k
      const b = i * n + other
      const keptRe = re[a]!
      const keptIm = im[a]!
      re[a] = re[b]!
      im[a] = im[b]!
      re[b] = keptRe
      im[b] = keptIm
    }
  }
  return true
}
