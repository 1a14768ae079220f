import { describe, expect, it } from 'vitest'
import { analyse, type DesignError } from '@/converters'
import { analyseToleranceCorners } from '@/converters/spread'
import { buckDesign } from '@/tests/support/designs'

import { expectRelative } from '@/tests/support/expectRelative'
import { SPREAD_DESIGNS } from './designs'
import { expectNumbers } from './expectNumbers'

const design = buckDesign()

describe('tolerance corners', () => {
  it('start at nominal, and the worst is no better than it', () => {
    const { corners, worst } = analyseToleranceCorners(design)
    const { margins } = analyse(design)
    expectRelative(corners[0]!.margins.crossover!, margins!.crossover!, 1e-3)
    expect(corners[0]).toMatchObject({ lineVoltage: 12, outputCurrent: 8 })
    expect(worst!.slack).toBeLessThanOrEqual(corners[0]!.slack)
    expect(worst!.slack).toBe(Math.min(...corners.map(({ slack }) => slack)))
  })

  it('combine every end of what is chosen, each combination once', () => {
    const { corners, quantities, note } = analyseToleranceCorners(design, {
      vary: ['line', 'load', 'inductance', 'capacitance'],
      model: 'averaged',
    })
    expect(note).toBeNull()
    expect(quantities.map(({ key }) => key).sort()).toEqual([
      'inductor.inductance',
      'line',
      'load',
      'outputCapacitors[0].capacitance',
    ])
    expect(corners).toHaveLength(1 + 2 ** 4)
    expect(new Set(corners.slice(1).map(({ values }) => values.join())).size).toBe(2 ** 4)
    corners
      .slice(1)
      .forEach(({ values }) =>
        values.forEach((value, i) => expect([quantities[i]!.low, quantities[i]!.high]).toContain(value)),
      )
  })

  it('stay within their number by leaving the least influential at nominal, and say which', () => {
    const { corners, quantities, note } = analyseToleranceCorners(design, { model: 'averaged' })
    expect(corners).toHaveLength(1 + 512)
    const left = quantities.filter(({ isCombined }) => !isCombined)
    expect(left.length).toBeGreaterThan(0)
    for (const { label } of left) expect(note).toContain(label)
    const combined = quantities.filter(({ group, isCombined }) => isCombined && group !== 'line' && group !== 'load')
    expect(Math.min(...combined.map(({ influence }) => influence))).toBeGreaterThanOrEqual(
      Math.max(...left.map(({ influence }) => influence)),
    )
  })

  it('carry the values that make the worst one', () => {
    const { worst, quantities } = analyseToleranceCorners(design, { vary: ['line', 'load', 'inductance', 'esr'] })
    const value = (key: string) => worst!.values[quantities.findIndex((quantity) => quantity.key === key)]!
    const { margins } = analyse(
      {
        ...design,
        inductor: { ...design.inductor, inductance: value('inductor.inductance') },
        outputCapacitors: [{ ...design.outputCapacitors[0]!, esr: value('outputCapacitors[0].esr') }],
      },
      { operatingPoint: { lineVoltage: worst!.lineVoltage, outputCurrent: worst!.outputCurrent } },
    )
    expect(Math.abs(worst!.margins.phaseMargin! - margins!.phaseMargin!)).toBeLessThan(0.05)
  })

  it('put corners that cannot be reached among the failures', () => {
    const low = buckDesign({ line: { minimum: 3, nominal: 12, maximum: 15 } })
    const { corners, failures } = analyseToleranceCorners(low, {
      vary: ['line', 'load', 'inductance'],
      model: 'averaged',
    })
    expect(failures).toHaveLength(1)
    expect(failures[0]).toMatchObject({ code: 'unreachable-output', count: 4 })
    expect(corners).toHaveLength(1 + 4)
  })

  it.each(Object.keys(SPREAD_DESIGNS))('of a %s hold nothing that is not a number', (name) => {
    expectNumbers(analyseToleranceCorners(SPREAD_DESIGNS[name], { mostCorners: 16 }))
  })

  it.each([
    [{ mostCorners: 1000 }, 'mostCorners'],
    [{ model: 'other' }, 'model'],
    [{ conditions: { temperature: { capacitanceFactor: 0 } } }, 'conditions.temperature.capacitanceFactor'],
  ])('refuse %j at its field', (options, field) => {
    try {
      analyseToleranceCorners(design, options)
      expect.unreachable()
    } catch (error) {
      expect((error as DesignError).problems.map((problem) => problem.field)).toContain(field)
    }
  })
})
