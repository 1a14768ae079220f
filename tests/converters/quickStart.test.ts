import * as fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { proposeCompensator } from '@/converters/compensators/propose'
import { DesignError } from '@/converters/errors'
import { parseDesign } from '@/converters/parse'
import { openPlant } from '@/converters/plant'
import { describeOperatingPoint } from '@/converters/operatingPoint'
import { proposeStage } from '@/converters/quickStart'
import type { StageRequirementsInput } from '@/converters/stageRequirements'

const buck: StageRequirementsInput = {
  topology: 'buck',
  controlScheme: 'voltage-mode',
  line: { minimum: 9, nominal: 12, maximum: 15 },
  output: { voltage: 3.3, currentMinimum: 0.5, currentMaximum: 8 },
  switchingFrequency: 500e3,
}
const boost: StageRequirementsInput = {
  topology: 'boost',
  controlScheme: 'peak-current-mode',
  rectifier: 'diode',
  line: { minimum: 4.5, nominal: 5, maximum: 5.5 },
  output: { voltage: 24, currentMinimum: 0.02, currentMaximum: 0.25 },
  switchingFrequency: 400e3,
}

const problemOf = (requirements: StageRequirementsInput) => {
  try {
    proposeStage(requirements)
  } catch (error) {
    if (error instanceof DesignError) return { code: error.code, field: error.problems[0]?.field }
  }
  return null
}

describe('a stage proposed for a buck', () => {
  const { design, choices } = proposeStage(buck)

  it('has about the wanted inductor ripple at the highest line, and at most that elsewhere', () => {
    const ratioAt = (lineVoltage: number) => {
      const { circuit, orbit } = openPlant(design, { lineVoltage, outputCurrent: 8 })
      return describeOperatingPoint(circuit, orbit).inductorCurrent.ripple / 8
    }
    // 35 % wanted; half an E12 step is 10 %.
    expect(ratioAt(15)).toBeGreaterThan(0.3)
    expect(ratioAt(15)).toBeLessThan(0.4)
    expect(ratioAt(9)).toBeLessThan(ratioAt(15))
  })

  it('keeps its output ripple below one percent at every line', () => {
    for (const lineVoltage of [9, 12, 15]) {
      const { circuit, orbit } = openPlant(design, { lineVoltage, outputCurrent: 8 })
      expect(describeOperatingPoint(circuit, orbit).outputRipple).toBeLessThan(0.033)
    }
  })

  it('gives a reason with its figures for every choice, and each choice is what the document holds', () => {
    for (const { field, value, reason } of choices) {
      expect(reason.length).toBeGreaterThan(30)
      const held = field.split(/[.[\]]+/).reduce<unknown>((part, key) => (part as Record<string, unknown>)[key], design)
      expect(held).toBe(value)
    }
    expect(choices.map(({ field }) => field)).toEqual(
      expect.arrayContaining(['inductor.inductance', 'outputCapacitors[0].capacitance', 'modulator.rampAmplitude']),
    )
  })

  it('gets a compensator at once', () => {
    const { proposals, refusal } = proposeCompensator(design)
    expect(refusal).toBeNull()
    expect(proposals[0]?.shortfalls).toEqual([])
  })
})

describe('a stage proposed for a boost in current mode', () => {
  const { design } = proposeStage(boost)

  it('has slope compensation of at least half the steepest down-slope', () => {
    if (design.modulator.kind !== 'peak-current-mode') throw new Error('not in current mode')
    // Erickson and Maksimović 2001, section 12.1: m_a ≥ m₂/2 is stable at every duty cycle. m₂ = (Vout + Vd − Vline)/L.
    const downSlope = (24 + 0.5 - 4.5) / design.inductor.inductance
    expect(design.modulator.slopeCompensation).toBeGreaterThanOrEqual(
      0.5 * downSlope * design.modulator.currentSenseResistance,
    )
    for (const lineVoltage of [4.5, 5, 5.5]) {
      expect(openPlant(design, { lineVoltage, outputCurrent: 0.25 }).periodMap.isStable).toBe(true)
    }
  })

  it('gets a compensator that its right-half-plane zero limits', () => {
    const { window, refusal, proposals } = proposeCompensator(design)
    expect(refusal).toBeNull()
    expect(proposals.length).toBeGreaterThan(0)
    const zero = window.bounds.find(({ kind }) => kind === 'right-half-plane-zero')
    expect(window.upper).toBe(zero?.frequency)
  })
})

describe('requirements that cannot be met are named at their field', () => {
  it.each<[string, StageRequirementsInput, string]>([
    ['a buck near its line', { ...buck, output: { ...buck.output, voltage: 8.9 } }, 'output.voltage'],
    ['a boost below its line', { ...boost, output: { ...boost.output, voltage: 5.2 } }, 'output.voltage'],
    ['a boost too far above its line', { ...boost, output: { ...boost.output, voltage: 100 } }, 'output.voltage'],
    ['a line range the wrong way round', { ...buck, line: { minimum: 20, nominal: 12, maximum: 15 } }, 'line.minimum'],
    [
      'loads the wrong way round',
      { ...buck, output: { voltage: 3.3, currentMinimum: 9, currentMaximum: 8 } },
      'output.currentMinimum',
    ],
    ['a topology of a later day', { ...buck, topology: 'flyback' }, 'topology'],
    ['a frequency that is not a number', { ...buck, switchingFrequency: NaN }, 'switchingFrequency'],
  ])('%s', (_, requirements, field) => {
    expect(problemOf(requirements)?.field).toBe(field)
  })
})

it('any requirements give a document that parses and a proposal or a plain refusal, or a named problem', () => {
  const logarithmic = (from: number, to: number) =>
    fc.double({ min: Math.log10(from), max: Math.log10(to), noNaN: true }).map((exponent) => 10 ** exponent)
  const requirements = fc
    .record({
      topology: fc.constantFrom('buck' as const, 'boost' as const),
      controlScheme: fc.constantFrom('voltage-mode' as const, 'peak-current-mode' as const),
      rectifier: fc.constantFrom('synchronous' as const, 'diode' as const),
      minimum: logarithmic(1, 400),
      spread: fc.double({ min: 1, max: 3, noNaN: true }),
      ratio: logarithmic(0.02, 15),
      currentMaximum: logarithmic(0.01, 60),
      loadRange: logarithmic(1, 100),
      switchingFrequency: logarithmic(20e3, 3e6),
    })
    .map(({ minimum, spread, ratio, currentMaximum, loadRange, ...rest }) => ({
      ...rest,
      line: { minimum, nominal: minimum * Math.sqrt(spread), maximum: minimum * spread },
      output: { voltage: minimum * ratio, currentMinimum: currentMaximum / loadRange, currentMaximum },
    }))
  const allNumbersFinite = (value: unknown): boolean =>
    typeof value === 'number'
      ? Number.isFinite(value)
      : typeof value !== 'object' || value === null || Object.values(value).every(allNumbersFinite)
  fc.assert(
    fc.property(requirements, (given) => {
      try {
        const { design } = proposeStage(given)
        expect(parseDesign(JSON.parse(JSON.stringify(design)))).toEqual(design)
        const answer = proposeCompensator(design)
        expect(allNumbersFinite(answer)).toBe(true)
        expect(answer.refusal === null).toBe(answer.proposals.length > 0)
      } catch (error) {
        if (!(error instanceof DesignError)) throw error
        expect(error.problems[0]?.message).toMatch(/\.$/)
      }
    }),
    { numRuns: 60 },
  )
}, 60_000)
