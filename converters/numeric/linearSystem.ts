/**
 * Small dense systems in flat row-major arrays, factored in place. These run thousands of times in one analysis, so
 * they allocate nothing.
 */

/** With every row scaled to a largest entry of one, a pivot below this means that there is no unique solution. */
const SINGULAR = 1e-15

/**
 * Solves M·X = R in place by elimination with partial pivoting: `right` becomes X, `matrix` is destroyed.
 * @param matrix - n × n, row-major.
 * @param right - n × m, row-major.
 * @returns false if the matrix is singular to working precision.
 */
export function solveReal(matrix: Float64Array, n: number, right: Float64Array, m: number): boolean {
  for (let i = 0; i < n; i++) scaleRow(matrix, n, right, m, i)
  for (let k = 0; k < n; k++) {
    let pivotRow = k
    let best = Math.abs(matrix[k * n + k]!)
    for (let i = k + 1; i < n; i++) {
      const candidate = Math.abs(matrix[i * n + k]!)
      if (candidate > best) {
        best = candidate
        pivotRow = i
      }
    }
    if (!(best > SINGULAR)) return false
    if (pivotRow !== k) {
      swapRows(matrix, n, k, pivotRow)
      swapRows(right, m, k, pivotRow)
    }
    const pivot = matrix[k * n + k]!
    for (let i = k + 1; i < n; i++) {
      const factor = matrix[i * n + k]! / pivot
      if (factor === 0) continue
      for (let j = k + 1; j < n; j++) matrix[i * n + j]! -= factor * matrix[k * n + j]!
      for (let j = 0; j < m; j++) right[i * m + j]! -= factor * right[k * m + j]!
    }
  }
  for (let k = n - 1; k >= 0; k--) {
    const pivot = matrix[k * n + k]!
    for (let j = 0; j < m; j++) {
      let sum = right[k * m + j]!
      for (let i = k + 1; i < n; i++) sum -= matrix[k * n + i]! * right[i * m + j]!
      right[k * m + j] = sum / pivot
    }
  }
  return true
}

/** Divides an equation by its largest coefficient: volts, amperes and their rates stand in one system. */
function scaleRow(matrix: Float64Array, n: number, right: Float64Array, m: number, row: number): void {
  let largest = 0
  for (let j = 0; j < n; j++) largest = Math.max(largest, Math.abs(matrix[row * n + j]!))
  if (largest === 0) return
  for (let j = 0; j < n; j++) matrix[row * n + j]! /= largest
  for (let j = 0; j < m; j++) right[row * m + j]! /= largest
}

function swapRows(matrix: Float64Array, width: number, first: number, second: number): void {
  for (let j = 0; j < width; j++) {
    const kept = matrix[first * width + j]!
    matrix[first * width + j] = matrix[second * width + j]!
    matrix[second * width + j] = kept
  }
}

/** Rows of numbers as one flat row-major array. */
export function flatten(rows: readonly (readonly number[])[]): Float64Array {
  const width = rows[0]?.length ?? 0
  const flat = new Float64Array(rows.length * width)
  // Element by element: `set` takes many times as long for rows as short as these.
  for (let i = 0; i < rows.length; i++) {
    const row = rows[i]!
    for (let j = 0; j < width; j++) flat[i * width + j] = row[j]!
  }
  return flat
}
