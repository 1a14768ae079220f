import { describe, expect, it } from 'vitest'
import { normalQuantile, truncatedNormalQuantile } from '@/converters/spread/normal'
import { betaQuantile, clopperPearson } from '@/converters/spread/proportion'
import { latinHypercube, randomBits } from '@/converters/spread/random'
import { expectRelative } from '@/tests/support/expectRelative'
import { scipy } from '@/tests/support/scipy'

describe('normal quantiles', () => {
  it('are those of SciPy', () => {
    const p = [1e-9, 1e-5, 0.00135, 0.02, 0.074, 0.076, 0.3, 0.5001, 0.9, 0.95, 0.9987, 1 - 1e-7]
    const expected = scipy<number[]>('import scipy.stats\nanswer = scipy.stats.norm.ppf(data).tolist()', p)
    p.forEach((value, i) => expectRelative(normalQuantile(value), expected[i]!, 1e-12))
  })

  it('cut off at the limit are those of SciPy’s truncated distribution', () => {
    const u = [1e-9, 0.01, 0.1, 0.49, 0.8, 0.999, 1 - 1e-9]
    const expected = scipy<number[]>(
      'import scipy.stats\nanswer = (scipy.stats.truncnorm.ppf(data, -3, 3)/3).tolist()',
      u,
    )
    u.forEach((value, i) => expectRelative(truncatedNormalQuantile(value), expected[i]!, 1e-9))
  })
})

describe('confidence of a proportion', () => {
  // SciPy's beta quantile is the definition of the Clopper–Pearson interval.
  const counts = [
    [0, 10],
    [1, 10],
    [10, 10],
    [81, 263],
    [997, 1000],
    [9_999, 10_000],
    [99_990, 100_000],
    [50_000, 100_000],
    [3, 100_000],
  ] as const

  it('has the limits that SciPy’s beta quantile gives', () => {
    const expected = scipy<[number, number][]>(
      `
import scipy.stats
quantile = scipy.stats.beta.ppf
answer = [[float(quantile(0.025, k, n - k + 1)) if k > 0 else 0.0,
           float(quantile(0.975, k + 1, n - k)) if k < n else 1.0] for k, n in data]`,
      counts,
    )
    counts.forEach(([successes, trials], i) => {
      const interval = clopperPearson(successes, trials, 0.95)
      const [lower, upper] = expected[i]!
      const where = `${successes} in ${trials}`
      expect(Math.abs(interval.lower - lower), where).toBeLessThan(1e-9 * Math.max(lower, 1e-4))
      expect(Math.abs(interval.upper - upper), where).toBeLessThan(1e-9 * upper)
    })
  })

  it('inverts to SciPy’s quantiles for half-integer and lopsided parameters too', () => {
    const cases = [
      [0.1, 0.5, 0.5],
      [0.9, 0.5, 30],
      [1e-6, 2, 5000],
      [0.999, 400, 2.5],
    ]
    const expected = scipy<number[]>(
      'import scipy.stats\nanswer = [float(scipy.stats.beta.ppf(*c)) for c in data]',
      cases,
    )
    cases.forEach(([p, a, b], i) => expectRelative(betaQuantile(p!, a!, b!), expected[i]!, 1e-9))
  })
})

describe('Latin hypercube', () => {
  it('holds exactly one point in every stratum of every axis', () => {
    const count = 137
    const cube = latinHypercube(count, 4, 11)
    const seen = Array.from({ length: 4 }, () => new Set<number>())
    const point = new Float64Array(4)
    for (let i = 0; i < count; i++) {
      cube.point(i, point)
      point.forEach((value, axis) => seen[axis]!.add(Math.floor(value * count)))
    }
    for (const strata of seen)
      expect([...strata].sort((a, b) => a - b)).toEqual(Array.from({ length: count }, (_, i) => i))
  })

  it('gives the same point whatever was asked before, and other points for another seed', () => {
    const at = (seed: number, indices: readonly number[]) => {
      const cube = latinHypercube(50, 3, seed)
      const point = new Float64Array(3)
      for (const index of indices) cube.point(index, point)
      return [...point]
    }
    expect(at(1, [7])).toEqual(at(1, [3, 49, 7]))
    expect(at(1, [7])).not.toEqual(at(2, [7]))
  })

  it('leaves its axes uncorrelated', () => {
    const count = 20_000
    const cube = latinHypercube(count, 6, 5)
    const point = new Float64Array(6)
    const sums = new Float64Array(36)
    for (let i = 0; i < count; i++) {
      cube.point(i, point)
      for (let a = 0; a < 6; a++) for (let b = 0; b < 6; b++) sums[6 * a + b]! += (point[a]! - 0.5) * (point[b]! - 0.5)
    }
    // Standard error of a correlation is 1/√n = 0.007; four of them.
    for (let a = 0; a < 6; a++)
      for (let b = 0; b < a; b++) expect(Math.abs(sums[6 * a + b]! / count) * 12).toBeLessThan(0.028)
  })

  it('draws bits whose bytes are evenly spread', () => {
    const draw = randomBits(2026)
    const counts = new Array<number>(256).fill(0)
    for (let i = 0; i < 16_384; i++) {
      const bits = draw()
      for (const shift of [0, 8, 16, 24]) counts[(bits >>> shift) & 255]!++
    }
    // χ² with 255 degrees of freedom lies between 170 and 360 but once in 10⁵ runs; the seed is fixed.
    const chiSquare = counts.reduce((sum, count) => sum + (count - 256) ** 2 / 256, 0)
    expect(chiSquare).toBeGreaterThan(170)
    expect(chiSquare).toBeLessThan(360)
  })
})
