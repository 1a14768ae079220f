import { describe, expect, it } from 'vitest'
import type { CompensatorOptionsInput } from '@/converters/compensators/options'
import { buildNetwork, networkGain } from '@/converters/compensators/networks'
import { preferredValues } from '@/converters/compensators/preferredNumbers'
import { proposeCompensator } from '@/converters/compensators/propose'
import type { DesignDocumentInput } from '@/converters/document'
import { DesignError } from '@/converters/errors'
import { readMargins } from '@/converters/loop/margins'
import { multiply } from '@/converters/numeric/complex'
import { parseDesign } from '@/converters/parse'
import { openPlant } from '@/converters/plant'
import type { Proposal } from '@/converters/results'
import { logicRail, sensorBoost } from './designs'

const synchronousBoost: DesignDocumentInput = { ...sensorBoost, rectifier: { kind: 'synchronous', onResistance: 0.02 } }

/** Margins of a proposal's preferred parts, read afresh at one corner: nothing of the wizard's own bookkeeping. */
function readAt(design: DesignDocumentInput, proposal: Proposal, lineVoltage: number, outputCurrent: number) {
  const document = parseDesign(design)
  const network = buildNetwork(document, { type: proposal.type, parts: proposal.parts.preferred })
  const { switched } = openPlant(document, { lineVoltage, outputCurrent })
  return readMargins(
    (omega) => multiply(switched(omega).controlToOutput, networkGain(network, omega)),
    document.switchingFrequency,
  )
}

function problemOf(design: DesignDocumentInput, options: CompensatorOptionsInput = {}) {
  try {
    proposeCompensator(design, options)
  } catch (error) {
    if (error instanceof DesignError) return { code: error.code, field: error.problems[0]?.field }
  }
  return null
}

describe('a 12 V to 3.3 V, 8 A buck at 500 kHz', () => {
  const result = proposeCompensator(logicRail)
  const [first] = result.proposals

  it('gets a type III network that holds every target at every corner in preferred values', () => {
    expect(result.refusal).toBeNull()
    expect(result.suggestion?.type).toBe('III')
    expect(first?.type).toBe('III')
    expect(first?.shortfalls).toEqual([])
    expect(first?.margins.preferred.nominal.phaseMargin).toBeGreaterThanOrEqual(55)
    expect(first?.margins.preferred.worst.phaseMargin).toBeGreaterThanOrEqual(55)
  })

  it('has its parts in the series that were asked for, IEC 60063', () => {
    const { R2, R3, C1, C2, C3 } = first!.parts.preferred
    const resistors = preferredValues('E96', 10, 1e7)
    const capacitors = preferredValues('E12', 1e-12, 1e-3)
    for (const resistor of [R2, R3]) expect(resistors).toContain(resistor)
    for (const capacitor of [C1, C2, C3]) expect(capacitors).toContain(capacitor)
  })

  it('reports the margins that a fresh reading of the same parts gives, at nominal and at the worst corner', () => {
    for (const proposal of result.proposals) {
      const { nominal, worst } = proposal.margins.preferred
      expect(readAt(logicRail, proposal, 12, 8).phaseMargin).toBeCloseTo(nominal.phaseMargin!, 3)
      const again = readAt(logicRail, proposal, worst.lineVoltage, worst.outputCurrent)
      expect(again.phaseMargin).toBeCloseTo(worst.phaseMargin!, 3)
      expect(again.crossover! / worst.crossover!).toBeCloseTo(1, 5)
      for (const line of [9, 12, 15]) {
        for (const load of [0.5, 8]) {
          // The worst corner is the one with least phase here: no gain margin comes near its target.
          expect(readAt(logicRail, proposal, line, load).phaseMargin).toBeGreaterThanOrEqual(worst.phaseMargin! - 1e-3)
        }
      }
    }
  })

  it('meets the asked crossover exactly before rounding', () => {
    const { proposals } = proposeCompensator(logicRail, { crossover: 45e3 })
    for (const proposal of proposals) {
      expect(proposal.crossover).toBe(45e3)
      expect(proposal.margins.ideal.nominal.crossover! / 45e3).toBeCloseTo(1, 6)
    }
  })

  it('states the bounds of the window with their figures', () => {
    const { window } = result
    const switching = window.bounds.find(({ kind }) => kind === 'switching-frequency')
    expect(switching).toMatchObject({ side: 'upper', frequency: 100e3, source: 'common practice, no source' })
    const resonance = window.bounds.find(({ kind }) => kind === 'resonance')!
    // 1/(2π√(LC)) with 2.2 µH and 188 µF is 7.83 kHz; losses and load shift it by a few percent.
    expect(resonance.frequency).toBeGreaterThan(7.8e3)
    expect(resonance.frequency).toBeLessThan(8.3e3)
    expect(window.lower).toBe(resonance.frequency)
    expect(result.suggestion!.crossover).toBeGreaterThan(window.lower)
    expect(result.suggestion!.crossover).toBeLessThan(window.upper)
  })

  it('takes values in stock in place of a series', () => {
    const options = {
      ownResistors: [100, 150, 220, 330, 470, 1e3, 4.7e3, 10e3],
      ownCapacitors: [47e-12, 1e-9, 2.2e-9, 10e-9],
    }
    const { proposals } = proposeCompensator(logicRail, options)
    const { R2, R3, C1, C2, C3 } = proposals[0]!.parts.preferred
    for (const resistor of [R2, R3]) expect(options.ownResistors).toContain(resistor)
    for (const capacitor of [C1, C3]) expect(options.ownCapacitors).toContain(capacitor)
    if (C2 !== undefined) expect(options.ownCapacitors).toContain(C2)
  })

  it('loses little of its margin to rounding, even with coarse capacitors', () => {
    const { proposals } = proposeCompensator(logicRail, {
      capacitorSeries: 'E6',
      resistorSeries: 'E24',
      crossover: 45e3,
    })
    for (const { margins } of proposals) {
      expect(margins.preferred.worst.phaseMargin).toBeGreaterThan(margins.ideal.worst.phaseMargin! - 3)
    }
  })

  it('keeps zeros and poles that were placed by hand', () => {
    const placement = { zeros: [5e3, 6e3], poles: [200e3, 230e3] }
    const { proposals } = proposeCompensator(logicRail, { crossover: 40e3, placement, capacitorSeries: 'E192' })
    expect(proposals).toHaveLength(1)
    const { zeros, method } = proposals[0]!
    expect(method).toBe('placed')
    // E192 steps are 1.2 %; two parts make a zero.
    zeros.forEach((zero, i) => expect(Math.abs(zero.frequency / placement.zeros[i]! - 1)).toBeLessThan(0.15))
  })

  it('answers a hand-placed network with its margins even where the wizard itself would say no', () => {
    const crossover = 60e3
    expect(proposeCompensator(logicRail, { crossover, type: 'II' }).refusal).not.toBeNull()
    const { proposals, refusal } = proposeCompensator(logicRail, {
      crossover,
      placement: { zeros: [6e3], poles: [300e3] },
    })
    expect(refusal).toBeNull()
    expect(proposals[0]?.type).toBe('II')
    expect(proposals[0]?.shortfalls[0]).toMatch(/phase margin|unstable/)
  })
})

describe('a 5 V to 24 V boost in peak current mode', () => {
  const result = proposeCompensator(sensorBoost)

  it('is limited by its right-half-plane zero, and says at which corner', () => {
    const bound = result.window.bounds.find(({ kind }) => kind === 'right-half-plane-zero')!
    expect(result.window.upper).toBe(bound.frequency)
    // Erickson and Maksimović 2001, table 8.2: D′²R/(2πL) at the lowest line and full load. D′ = 4.5/24.4 and 96 Ω give
    // 52 kHz without losses; the losses of switch and winding lower D′ by a few percent.
    const ideal = ((4.5 / 24.4) ** 2 * 96) / (2 * Math.PI * 10e-6)
    expect((3 * bound.frequency) / ideal).toBeGreaterThan(0.85)
    expect((3 * bound.frequency) / ideal).toBeLessThan(1)
    expect(bound.text).toContain('4.50 V and 250 mA')
  })

  it('gets a type II network that holds every target at every corner, light load in discontinuous conduction included', () => {
    expect(result.suggestion?.type).toBe('II')
    expect(result.proposals[0]?.shortfalls).toEqual([])
    for (const line of [4.5, 5, 5.5]) {
      for (const load of [0.02, 0.25]) {
        const margins = readAt(sensorBoost, result.proposals[0]!, line, load)
        expect(margins.isStable).toBe(true)
        expect(margins.phaseMargin).toBeGreaterThanOrEqual(55)
        expect(margins.gainMargin ?? Infinity).toBeGreaterThanOrEqual(10)
      }
    }
  })

  it('is refused a crossover above the zero, with the figure that would be right', () => {
    const { refusal, proposals } = proposeCompensator(sensorBoost, { crossover: 60e3 })
    expect(proposals).toEqual([])
    expect(refusal).toMatch(/right-half-plane zero is at 49\.1 kHz.*60\.0 kHz/)
  })

  it('is refused while it oscillates by itself, with the slope that cures it', () => {
    const design: DesignDocumentInput = {
      ...synchronousBoost,
      modulator: { kind: 'peak-current-mode', currentSenseResistance: 0.05, slopeCompensation: 0 },
    }
    const { refusal } = proposeCompensator(design)
    expect(refusal).toMatch(/subharmonic/)
    const slope = Number(/above ([\d.]+) kV\/s/.exec(refusal!)?.[1]) * 1e3
    const cured: DesignDocumentInput = {
      ...design,
      modulator: { kind: 'peak-current-mode', currentSenseResistance: 0.05, slopeCompensation: slope * 1.3 },
    }
    expect(proposeCompensator(cured).refusal).toBeNull()
  })
})

describe('a voltage-mode boost with a diode', () => {
  const design: DesignDocumentInput = {
    ...sensorBoost,
    modulator: { kind: 'voltage-mode', rampAmplitude: 1 },
    amplifier: { kind: 'op-amp' },
  }

  it('gets what can be built, by moving R1 where the parts would be too small or too large', () => {
    const { proposals, suggestion } = proposeCompensator(design)
    expect(suggestion?.type).toBe('III')
    const { R1, R2, R3, C1 } = proposals[0]!.parts.preferred
    expect(R1).toBeGreaterThan(10e3)
    for (const resistor of [R2, R3]) expect(resistor).toBeGreaterThanOrEqual(100)
    expect(C1).toBeLessThanOrEqual(10e-6)
    expect(proposals[0]!.reasons.join(' ')).toMatch(/R1 goes from 10\.0 kΩ/)
  })

  it('with R1 fixed gets the nearest that there is, with what is short and where', () => {
    const fixed: DesignDocumentInput = { ...design, compensator: { type: 'III', parts: { R1: 33e3 } } }
    const { proposals, suggestion } = proposeCompensator(fixed)
    expect(suggestion?.reasons[0]).toMatch(/No crossover in the window holds/)
    expect(proposals[0]?.shortfalls[0]).toMatch(/At .* V and 20\.0 mA the phase margin is/)
    expect(proposals[0]?.margins.preferred.worst.isStable).toBe(true)
  })

  it('is refused with the part that is in the way when the size limits leave nothing', () => {
    const fixed: DesignDocumentInput = { ...design, compensator: { type: 'III', parts: { R1: 10e3 } } }
    const { refusal } = proposeCompensator(fixed, { limits: { smallestResistance: 5e3 } })
    expect(refusal).toMatch(/would, but with parts outside the size limits: R2 = [\d.]+ Ω/)
  })
})

describe('what was asked for', () => {
  it('a boost that no network has is refused with the figures', () => {
    const { refusal } = proposeCompensator(
      { ...synchronousBoost, modulator: { kind: 'voltage-mode', rampAmplitude: 1 }, amplifier: undefined },
      { crossover: 40e3 },
    )
    expect(refusal).toMatch(/lags by 2\d\d°.*boost/)
  })

  it('a type that is too small is refused with the boost needed', () => {
    expect(proposeCompensator(logicRail, { crossover: 60e3, type: 'II' }).refusal).toMatch(
      /139° of boost; type II adds less than 90°/,
    )
  })

  it('a type is used, and its shortfall said', () => {
    const { proposals } = proposeCompensator(sensorBoost, { type: 'III' })
    expect(proposals.every(({ type }) => type === 'III')).toBe(true)
  })

  it('a crossover beyond half the switching frequency is refused', () => {
    expect(proposeCompensator(logicRail, { crossover: 250e3 }).refusal).toMatch(/half the switching frequency/)
  })

  it('a crossover among the design’s targets counts', () => {
    const { suggestion } = proposeCompensator({ ...logicRail, targets: { crossover: 30e3 } })
    expect(suggestion?.crossover).toBe(30e3)
  })

  it('R1 moves only when it is not fixed', () => {
    const small = { limits: { smallestResistance: 5e3 } }
    const moved = proposeCompensator(logicRail, small).proposals[0]!
    expect(moved.parts.preferred.R1).toBeGreaterThan(10e3)
    expect(moved.parts.preferred.R3).toBeGreaterThanOrEqual(5e3)
    const fixed = { ...logicRail, compensator: { type: 'III' as const, parts: { R1: 10e3 } } }
    expect(proposeCompensator(fixed, { crossover: 40e3 }).proposals[0]!.parts.preferred.R1).toBe(10e3)
  })
})

describe('bad input is named at its field', () => {
  it.each<[string, DesignDocumentInput, CompensatorOptionsInput, string]>([
    [
      'a buck above its line',
      { ...logicRail, output: { voltage: 20, currentMinimum: 1, currentMaximum: 2 } },
      {},
      'output.voltage',
    ],
    [
      'a reference above the output',
      { ...logicRail, sense: { referenceVoltage: 5, upperResistance: 1e4 } },
      {},
      'sense.referenceVoltage',
    ],
    ['a negative crossover', logicRail, { crossover: -1 }, 'options.crossover'],
    ['a crossover that is not a number', logicRail, { crossover: NaN }, 'options.crossover'],
    ['an empty list of values', logicRail, { ownResistors: [] }, 'options.ownResistors'],
    ['values outside the limits', logicRail, { ownResistors: [1e9] }, 'options.ownResistors'],
    [
      'limits the wrong way round',
      logicRail,
      { limits: { smallestResistance: 1e6, largestResistance: 1e3 } },
      'options.limits.smallestResistance',
    ],
    [
      'poles below zeros',
      logicRail,
      { crossover: 4e4, placement: { zeros: [5e3], poles: [1e3] } },
      'options.placement',
    ],
  ])('%s', (_, design, options, field) => {
    expect(problemOf(design, options)?.field).toBe(field)
  })
})
