import { describe, expect, it } from 'vitest'
import { partsOnPlane, planeOf, pointOf, thinned } from '@/components/plots/sPlane'
import { condensed } from '@/components/plots/waveform'
import { mapSentences } from '@/components/spread/periodMap'
import { readForm } from '@/components/spread/runForm'
import { shareDown, shareUp } from '@/components/spread/words'

describe('what is asked of a statistical run', () => {
  const form = {
    samples: '10000',
    seed: '7',
    distribution: 'uniform',
    model: 'switched',
    capacitanceLeft: '80 %',
    esrTimes: '3',
  } as const

  it('becomes options', () => {
    expect(readForm(form)).toMatchObject({
      kind: 'options',
      options: { samples: 10_000, seed: 7, distribution: 'uniform', model: 'switched' },
    })
    expect(readForm(form)).toMatchObject({
      options: { conditions: { ageing: { capacitanceFactor: 0.8, esrFactor: 3 } } },
    })
  })
  it('names each entry that cannot be used', () => {
    const read = readForm({ ...form, samples: '12', seed: 'seven', esrTimes: '-1' })
    expect(read).toMatchObject({ kind: 'problems', problems: { samples: 'Must be at least 100.' } })
    expect(read.kind === 'problems' && Object.keys(read.problems).sort()).toEqual(['esrTimes', 'samples', 'seed'])
  })
})

describe('a yield', () => {
  it('is never written as 100 % while one sample fails', () => {
    expect(shareDown(9999 / 10_000)).toBe('99.99 %')
    expect(shareDown(99_999 / 100_000)).toBe('99.99 %')
    expect(shareDown(1)).toBe('100 %')
  })
  it('has an interval that rounding does not narrow', () => {
    expect(shareDown(0.98765)).toBe('98.76 %')
    expect(shareUp(0.98765)).toBe('98.77 %')
  })
})

describe('a waveform with more periods than the screen has room for', () => {
  const time = Array.from({ length: 1000 }, (_, index) => index)
  const spike = time.map((index) => (index === 501 ? 9 : 1))
  const drawn = condensed({ time, low: spike.map((value) => -value), middle: spike, high: spike }, 100)

  it('keeps its extremes', () => {
    expect(drawn.time).toHaveLength(100)
    expect(Math.max(...drawn.high)).toBe(9)
    expect(Math.min(...drawn.low)).toBe(-9)
  })
  it('keeps its mean', () => {
    const mean = drawn.middle.reduce((sum, value) => sum + value, 0) / drawn.middle.length
    expect(mean).toBeCloseTo(1.008, 12)
  })
})

describe('many poles on the s-plane', () => {
  const hertz = (real: number, imaginary: number) =>
    pointOf({ real: 2 * Math.PI * real, imaginary: 2 * Math.PI * imaginary })

  it('are thinned where they cannot be told apart, and nowhere else', () => {
    const near = Array.from({ length: 50 }, (_, index) => hertz(-1e4, 1e4 + index * 1e-3))
    const far = hertz(-1e3, 1e5)
    const plane = planeOf([...near, far])
    expect(thinned([...near, far], plane, 100)).toEqual([near[0], far])
  })
  it('have branches that end where the rings end and begin again where they come back', () => {
    const plane = planeOf([hertz(-1e3, 0), hertz(-1e5, 0)])
    const branch = [hertz(-1e3, 0), hertz(-1e4, 0), hertz(-1e9, 0), hertz(-2e4, 0), hertz(-1e4, 0)]
    expect(partsOnPlane(branch, plane)).toEqual([branch.slice(0, 2), branch.slice(3)])
  })
})

describe('the closed-loop period map in words', () => {
  const map = (real: number, imaginary = 0) => ({
    multipliers: [{ real, imaginary, modulus: Math.hypot(real, imaginary) }],
    isStable: Math.hypot(real, imaginary) < 1,
    controlRipple: 0.03,
    rampSpan: 0.4,
    firesEarly: false,
  })

  it('says that a settled loop settles', () => {
    expect(mapSentences(map(0.5), false)).toEqual([
      'After each period 0.500 of a disturbance is left: the switched loop settles.',
    ])
  })
  it('tells oscillation at half the switching frequency from any other', () => {
    expect(mapSentences(map(-1.5), true).join(' ')).toMatch(
      /1\.50 times as large.*half the switching frequency.*agrees/,
    )
    expect(mapSentences(map(0.9, 0.9), false).join(' ')).not.toContain('half the switching frequency')
  })
  it('names the ripple where it fires the comparator early', () => {
    expect(mapSentences({ ...map(0.5), firesEarly: true }, false).join(' ')).toMatch(/30\.0 mV of ripple.*400 mV/)
  })
})
