import { describe, expect, it } from 'vitest'
import { afterKey, ruleMarks, ruleNames, ruleScale, STEP } from '@/components/plots/rule'
import { frequencyGrid, lowestFrequency } from '@/hooks/frequencyGrid'

const left = (frequency: number, name?: string) => ({ frequency, halfPlane: 'left' as const, ...(name && { name }) })

describe('the frequency rule', () => {
  const scale = ruleScale(500e3, 10, 350)

  it('runs from 10 Hz to the switching frequency', () => {
    expect(scale.domain()).toEqual([10, 500e3])
    expect([scale(10), scale(500e3)]).toEqual([10, 350])
  })
  it('shows both members of a pair, side by side', () => {
    const [first, second] = ruleMarks([left(8e3), left(8e3)], [], scale)
    expect(second!.x - first!.x).toBeCloseTo(10)
    expect((first!.x + second!.x) / 2).toBeCloseTo(scale(8e3))
  })
  it('leaves out what lies beyond its ends', () => {
    expect(ruleMarks([left(2), left(2e6)], [left(1e3)], scale).map((mark) => mark.kind)).toEqual(['zero'])
  })
  it('keeps marks at the very end inside', () => {
    for (const mark of ruleMarks([left(499e3), left(499e3), left(499e3)], [], scale))
      expect(mark.x).toBeLessThanOrEqual(345.01)
  })
  it('names neighbours of one kind once, and nothing over another mark', () => {
    const wide = ruleScale(500e3, 10, 1200)
    const marks = ruleMarks([left(8e3, 'output filter'), left(8e3, 'output filter'), left(8.4e3, 'inductor')], [], wide)
    expect(ruleNames(marks, 46, []).map((name) => name.text)).toEqual(['output filter'])
  })
})

describe('the keyboard on the rule', () => {
  it('moves by 1/48 of a decade', () => {
    expect(STEP ** 48).toBeCloseTo(10)
    expect(afterKey('ArrowRight', 10e3, 10, 250e3)).toBeCloseTo(10e3 * 10 ** (1 / 48))
    expect(afterKey('ArrowLeft', 10e3, 10, 250e3)).toBeCloseTo(10e3 / 10 ** (1 / 48))
  })
  it('stays between the ends', () => {
    expect(afterKey('ArrowRight', 250e3, 10, 250e3)).toBe(250e3)
    expect(afterKey('Home', 10e3, 10, 250e3)).toBe(10)
  })
  it('leaves other keys alone', () => {
    expect(afterKey('a', 10e3, 10, 250e3)).toBeNull()
  })
})

describe('the grid of the curves', () => {
  it('rises strictly from 10 Hz to half the switching frequency', () => {
    const grid = frequencyGrid(500e3)
    expect(grid[0]).toBe(10)
    expect(grid.at(-1)).toBe(250e3)
    grid.slice(1).forEach((frequency, index) => expect(frequency).toBeGreaterThan(grid[index]!))
  })
  it('leaves three decades below a low switching frequency', () => {
    expect(lowestFrequency(1_000)).toBe(1)
  })
})
