import * as fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { decadeLabel, decadeSubdivisions, decadeTicks, ohmLabel, wholeAxis } from '@/components/plots/ticks'

describe('a frequency axis', () => {
  it('is written 10, 100, 1 k, 10 k, 100 k', () => {
    expect(decadeTicks(10, 500e3).map((tick) => tick.label)).toEqual(['10', '100', '1 k', '10 k', '100 k'])
  })
  it('writes small and large decades with their prefix', () => {
    expect([-3, -1, 0, 6, 8, 9].map(decadeLabel)).toEqual(['1 m', '100 m', '1', '1 M', '100 M', '1 G'])
  })
  it('includes both ends where they are powers of ten', () => {
    expect(decadeTicks(10, 1e6).map((tick) => tick.value)).toEqual([10, 100, 1e3, 1e4, 1e5, 1e6])
  })
  it('has eight thin lines in a whole decade', () => {
    expect(decadeSubdivisions(10, 100)).toEqual([20, 30, 40, 50, 60, 70, 80, 90])
  })
})

describe('an axis with whole steps', () => {
  const values = fc.array(fc.double({ min: -500, max: 500, noNaN: true }), { minLength: 1, maxLength: 20 })

  it('holds every value and stays within its number of ticks', () => {
    fc.assert(
      fc.property(values, fc.integer({ min: 4, max: 12 }), (list, most) => {
        const axis = wholeAxis(list, [10, 20, 40], most)
        expect(axis.low).toBeLessThanOrEqual(Math.min(...list) + 1e-6)
        expect(axis.high).toBeGreaterThanOrEqual(Math.max(...list) - 1e-6)
        expect(axis.ticks.length).toBeLessThanOrEqual(most + 1)
        expect(axis.ticks.length).toBeGreaterThanOrEqual(2)
      }),
    )
  })
  it('takes the finest step that fits', () => {
    expect(wholeAxis([-35, 72], [10, 20, 40], 7).ticks).toEqual([-40, -20, 0, 20, 40, 60, 80])
  })
  it('does not fail on a curve without finite values', () => {
    expect(wholeAxis([Number.NaN], [10], 5).ticks).toEqual([0, 10])
  })
})

it('writes decibels of an ohm as ohms', () => {
  expect([-120, -60, -40, -20, 0, 20, 60].map(ohmLabel)).toEqual([
    '1 µΩ',
    '1 mΩ',
    '10 mΩ',
    '100 mΩ',
    '1 Ω',
    '10 Ω',
    '1 kΩ',
  ])
  expect(ohmLabel(-30)).toBe('')
})
