import * as fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { PREFERRED_SERIES, type PreferredSeries } from '@/converters/compensators/options'
import { nearestValues, ownValues, preferredValues } from '@/converters/compensators/preferredNumbers'

// IEC 60063:2015, table 1 (E3 to E24) and table 2 (E48 to E192).
const E24 = '1.0 1.1 1.2 1.3 1.5 1.6 1.8 2.0 2.2 2.4 2.7 3.0 3.3 3.6 3.9 4.3 4.7 5.1 5.6 6.2 6.8 7.5 8.2 9.1'
const E96 = `
  1.00 1.02 1.05 1.07 1.10 1.13 1.15 1.18 1.21 1.24 1.27 1.30 1.33 1.37 1.40 1.43 1.47 1.50 1.54 1.58 1.62 1.65 1.69 1.74
  1.78 1.82 1.87 1.91 1.96 2.00 2.05 2.10 2.15 2.21 2.26 2.32 2.37 2.43 2.49 2.55 2.61 2.67 2.74 2.80 2.87 2.94 3.01 3.09
  3.16 3.24 3.32 3.40 3.48 3.57 3.65 3.74 3.83 3.92 4.02 4.12 4.22 4.32 4.42 4.53 4.64 4.75 4.87 4.99 5.11 5.23 5.36 5.49
  5.62 5.76 5.90 6.04 6.19 6.34 6.49 6.65 6.81 6.98 7.15 7.32 7.50 7.68 7.87 8.06 8.25 8.45 8.66 8.87 9.09 9.31 9.53 9.76`
/** The values that E192 has between those of E96. */
const E192_ONLY = `
  1.01 1.04 1.06 1.09 1.11 1.14 1.17 1.20 1.23 1.26 1.29 1.32 1.35 1.38 1.42 1.45 1.49 1.52 1.56 1.60 1.64 1.67 1.72 1.76
  1.80 1.84 1.89 1.93 1.98 2.03 2.08 2.13 2.18 2.23 2.29 2.34 2.40 2.46 2.52 2.58 2.64 2.71 2.77 2.84 2.91 2.98 3.05 3.12
  3.20 3.28 3.36 3.44 3.52 3.61 3.70 3.79 3.88 3.97 4.07 4.17 4.27 4.37 4.48 4.59 4.70 4.81 4.93 5.05 5.17 5.30 5.42 5.56
  5.69 5.83 5.97 6.12 6.26 6.42 6.57 6.73 6.90 7.06 7.23 7.41 7.59 7.77 7.96 8.16 8.35 8.56 8.76 8.98 9.20 9.42 9.65 9.88`
const table = (text: string) => text.trim().split(/\s+/).map(Number)

const decadeOf = (series: PreferredSeries) => preferredValues(series, 1, 9.99)

describe('the series of IEC 60063', () => {
  it.each([
    ['E3', '1.0 2.2 4.7'],
    ['E6', '1.0 1.5 2.2 3.3 4.7 6.8'],
    ['E12', '1.0 1.2 1.5 1.8 2.2 2.7 3.3 3.9 4.7 5.6 6.8 8.2'],
    ['E24', E24],
    ['E96', E96],
  ] as const)('%s is the published table', (series, published) => {
    expect(decadeOf(series)).toEqual(table(published))
  })

  it('E192 is E96 with the published values between, 9.20 included', () => {
    const published = [...table(E96), ...table(E192_ONLY)].sort((a, b) => a - b)
    expect(decadeOf('E192')).toEqual(published)
    expect(decadeOf('E192')).toContain(9.2)
  })

  it('E48 is every second value of E96', () => {
    expect(decadeOf('E48')).toEqual(table(E96).filter((_, i) => i % 2 === 0))
  })
})

describe('values within limits', () => {
  it('include both limits and are exactly what one would type', () => {
    expect(preferredValues('E6', 4.7e-6, 100e-6)).toEqual([
      4.7e-6, 6.8e-6, 10e-6, 15e-6, 22e-6, 33e-6, 47e-6, 68e-6, 100e-6,
    ])
    expect(preferredValues('E96', 9.76e3, 10.2e3)).toEqual([9760, 10000, 10200])
  })

  it('of a list of one’s own are sorted and without duplicates', () => {
    expect(ownValues([4700, 10, 4700, 220, 1e9], 100, 1e6)).toEqual([220, 4700])
  })

  it('never miss the nearest: no value of the series is closer by ratio', () => {
    fc.assert(
      fc.property(
        fc.constantFrom(...PREFERRED_SERIES),
        fc.double({ min: 1e-12, max: 1e6, noNaN: true }),
        fc.integer({ min: 1, max: 6 }),
        (series, target, count) => {
          const values = preferredValues(series, 1e-13, 1e7)
          const distance = (value: number) => Math.abs(Math.log(value / target))
          const byDistance = [...values].sort((a, b) => distance(a) - distance(b)).slice(0, count)
          const nearest = nearestValues(values, target, count)
          expect(nearest).toHaveLength(count)
          // Ties may fall either way, so the distances are compared.
          nearest.forEach((value, i) => expect(distance(value)).toBeCloseTo(distance(byDistance[i]!), 12))
        },
      ),
    )
  })

  it('are all there is when fewer exist than asked for', () => {
    expect(nearestValues([1, 2], 100, 5)).toEqual([2, 1])
    expect(nearestValues([], 100, 5)).toEqual([])
  })
})
