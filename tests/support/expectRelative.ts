import { expect } from 'vitest'

/** Fails unless |actual − expected| ≤ tolerance·|expected|; works for picofarads and megahertz alike. */
export function expectRelative(actual: number, expected: number, tolerance: number): void {
  const error = Math.abs(actual - expected) / Math.abs(expected)
  expect(error, `${actual} against ${expected}`).toBeLessThanOrEqual(tolerance)
}

/** Difference of two angles in degrees, in [0, 180]. */
export function angleBetween(a: number, b: number): number {
  const turn = Math.abs(a - b) % 360
  return Math.min(turn, 360 - turn)
}
