/** Ranking, where the answer can be written down. */
import { describe, expect, it } from 'vitest'
import { latinHypercube } from '@/converters/spread/random'
import { addToSums, emptySums, regressionRow, standardisedFit } from '@/converters/spread/regression'
import { addToSobol, emptySobol, saltelliRows, sobolIndices } from '@/converters/spread/sobol'

describe('standardised regression coefficients', () => {
  /** y = 3·x₁ − 2·x₂ + 0·x₃ + 7 over uniform variables in (−1, 1) of different widths. */
  const weights = [3, -2, 0]
  const widths = [1, 0.5, 2]
  const fit = (noise: (x: Float64Array) => number) => {
    const cube = latinHypercube(4000, 3, 21)
    const sums = emptySums(3)
    const point = new Float64Array(3)
    const row = regressionRow(3)
    for (let i = 0; i < 4000; i++) {
      cube.point(i, point)
      const x = point.map((u, k) => (2 * u - 1) * widths[k]!)
      row.set(x, 1)
      row[4] = 7 + x.reduce((sum, value, k) => sum + weights[k]! * value, 0) + noise(x)
      addToSums(sums, row)
    }
    return standardisedFit(sums)!
  }
  const parts = weights.map((weight, k) => weight * widths[k]!)
  const total = Math.hypot(...parts)

  it('of a linear function are each term’s share of the deviation, and explain everything', () => {
    const { coefficients, determination } = fit(() => 0)
    expect(determination).toBeCloseTo(1, 10)
    // Sampled deviations differ from the true ones by a correlation of the order of 1/√4000.
    coefficients.forEach((value, k) => expect(Math.abs(value - parts[k]! / total)).toBeLessThan(0.02))
  })

  it('say by R² how much an even function hides from them', () => {
    // Var(x₃²) for x₃ uniform in ±2 is 16·(1/5 − 1/9) = 64/45; the linear part has (9 + 1)/3.
    const { determination } = fit((x) => x[2]! ** 2)
    expect(Math.abs(determination - 10 / 3 / (10 / 3 + 64 / 45))).toBeLessThan(0.02)
  })
})

describe('Sobol’ indices', () => {
  const indicesOf = (variables: number, f: (u: Float64Array) => number, count = 20_000) => {
    const rows = saltelliRows(count, variables, 4)
    const sums = emptySobol(variables)
    for (let i = 0; i < count; i++) addToSobol(sums, rows(i).map(f))
    return sobolIndices(sums)!
  }

  it('of Ishigami’s function are the published ones', () => {
    // Ishigami and Homma 1990, f = sin x₁ + 7·sin² x₂ + 0.1·x₃⁴·sin x₁ over (−π, π)³. Values from the closed variances
    // in Saltelli and others, Sensitivity Analysis, 2000, section 2.9: 0.3139, 0.4424, 0; total 0.5576, 0.4424, 0.2437.
    const angle = (u: number) => Math.PI * (2 * u - 1)
    const { firstOrder, total } = indicesOf(3, (u) => {
      const [a, b, c] = Array.from(u, angle) as [number, number, number]
      return Math.sin(a) + 7 * Math.sin(b) ** 2 + 0.1 * c ** 4 * Math.sin(a) - 3.5
    })
    const published = { firstOrder: [0.3139, 0.4424, 0], total: [0.5576, 0.4424, 0.2437] }
    firstOrder.forEach((value, k) => expect(Math.abs(value - published.firstOrder[k]!)).toBeLessThan(0.02))
    total.forEach((value, k) => expect(Math.abs(value - published.total[k]!)).toBeLessThan(0.02))
  })

  it('of a sum are the shares of variance, first-order and total alike', () => {
    const { firstOrder, total } = indicesOf(2, ([a, b]) => 3 * (a! - 0.5) + (b! - 0.5))
    for (const found of [firstOrder, total]) {
      expect(Math.abs(found[0]! - 0.9)).toBeLessThan(0.02)
      expect(Math.abs(found[1]! - 0.1)).toBeLessThan(0.02)
    }
  })

  it('of a product about zero are all interaction: nothing of the first order', () => {
    const { firstOrder, total } = indicesOf(2, ([a, b]) => (a! - 0.5) * (b! - 0.5))
    firstOrder.forEach((value) => expect(Math.abs(value)).toBeLessThan(0.03))
    total.forEach((value) => expect(Math.abs(value - 1)).toBeLessThan(0.03))
  })
})
