import * as fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { analyse, analyseCorners, DesignError } from '@/converters'
import { AMPLIFIER_KINDS, CONTROLS } from '@/tests/support/kinds'
import { allNumbers } from '@/tests/support/allNumbers'
import { boostDesign, buckDesign } from '@/tests/support/designs'
import { expectRelative } from '@/tests/support/expectRelative'
import { LOAD_KINDS, TOPOLOGIES } from '@/converters/document'

/** The refusal that `work` ends in. */
function refusalOf(work: () => unknown): DesignError {
  try {
    work()
  } catch (error) {
    if (error instanceof DesignError) return error
    throw error
  }
  throw new Error('was not refused')
}

describe('an impossible design is refused at its field', () => {
  const changed = (change: (design: Record<string, unknown>) => void) => {
    const design = structuredClone(buckDesign()) as unknown as Record<string, unknown>
    change(design)
    return design
  }
  const inside = (design: Record<string, unknown>, section: string) => design[section] as Record<string, unknown>
  const wrong: [string, string, unknown][] = [
    ['missing', 'inductor.inductance', undefined],
    ['text', 'inductor.inductance', '2.2u'],
    ['negative', 'inductor.inductance', -2.2e-6],
    ['zero', 'inductor.inductance', 0],
    ['absurd', 'inductor.inductance', 1e9],
    ['not a number', 'inductor.inductance', Number.NaN],
    ['infinite', 'output.voltage', Number.POSITIVE_INFINITY],
    ['negative', 'switch.onResistance', -1],
    ['unknown', 'rectifier.kind', 'valve'],
    ['below the nominal', 'line.maximum', 10],
    ['below the minimum', 'output.currentMinimum', 9],
  ]
  it.each(wrong)('%s %s', (_what, path, bad) => {
    const [section, field] = path.split('.') as [string, string]
    const { code, problems } = refusalOf(() => analyse(changed((design) => (inside(design, section)[field] = bad))))
    expect(code).toBe('invalid-document')
    expect(problems.map((problem) => problem.field)).toContain(path)
  })

  it('lists every bad field, not the first alone', () => {
    const { problems } = refusalOf(() => analyse({ ...buckDesign(), topology: 'spiral', switchingFrequency: 0 }))
    expect(problems.map(({ field }) => field)).toEqual(expect.arrayContaining(['topology', 'switchingFrequency']))
  })

  it.each([null, 7, 'buck', [], { schema: 2 }])('%j is not a design', (input) => {
    expect(refusalOf(() => analyse(input)).code).toBe('invalid-document')
  })

  it('a buck above its line, a boost below it', () => {
    const high = refusalOf(() =>
      analyse({ ...buckDesign(), output: { voltage: 14, currentMinimum: 1, currentMaximum: 8 } }),
    )
    expect(high).toMatchObject({ code: 'unreachable-output', problems: [{ field: 'output.voltage' }] })
    expect(high.message).toMatch(/reaches at most 11\.\d+ V.*14 V is asked for/)
    const low = refusalOf(() =>
      analyse({ ...boostDesign(), output: { voltage: 4, currentMinimum: 0.1, currentMaximum: 0.6 } }),
    )
    expect(low).toMatchObject({ code: 'unreachable-output', problems: [{ field: 'output.voltage' }] })
  })

  it('a boost whose losses keep it below its output', () => {
    const refusal = refusalOf(() => analyse({ ...boostDesign(), inductor: { inductance: 10e-6, resistance: 3 } }))
    expect(refusal).toMatchObject({ code: 'unreachable-output', problems: [{ field: 'output.voltage' }] })
  })

  it('a network with a part missing', () => {
    const refusal = refusalOf(() =>
      analyse({ ...buckDesign(), compensator: { type: 'III', parts: { R2: 1e3, C1: 1e-9, C3: 1e-9 } } }),
    )
    expect(refusal).toMatchObject({ code: 'invalid-compensator', problems: [{ field: 'compensator.parts.R3' }] })
  })

  it.each([[[]], [Array<number>(100_000).fill(100)], [[100, -1]], [[100, Number.NaN]], [[1e12]]])(
    'frequencies %#',
    (frequencies) => {
      const { problems } = refusalOf(() => analyse(buckDesign(), { frequencies }))
      expect(problems[0]!.field).toMatch(/^frequencies/)
    },
  )
})

describe('what is left out', () => {
  it('takes nominal line and full load, and sections of other topologies are ignored', () => {
    const plain = analyse(buckDesign())
    const padded = analyse({
      ...buckDesign(),
      secondInductor: { inductance: 0, resistance: 0 },
      couplingCapacitor: { capacitance: 0, esr: 0 },
      transformer: { turnsRatio: 0.5 },
      compensator: { type: 'III', parts: { ...buckDesign().compensator!.parts } },
      somethingNew: true,
    })
    expect(padded).toEqual(plain)
    expect(plain.operatingPoint).toMatchObject({ lineVoltage: 12, outputCurrent: 8 })
  })

  it('without a compensator there is no loop, and everything else', () => {
    const { compensator: _none, ...open } = buckDesign()
    for (const design of [
      open,
      { ...open, compensator: { type: 'II' as const, parts: { R1: 10e3, R2: 0, C1: null } } },
    ]) {
      const { loop, margins, steps, plant } = analyse(design)
      expect({ loop, margins, steps }).toEqual({ loop: null, margins: null, steps: null })
      expect(plant.poles).toHaveLength(2)
    }
  })
})

describe('figures of the operating point', () => {
  it('keep the charge: the rectifier of a boost carries the load, and power in is power out with ideal parts', () => {
    const ideal = boostDesign({
      inductor: { inductance: 10e-6 },
      switch: { onResistance: 0 },
      rectifier: { kind: 'diode' },
      outputCapacitors: [{ count: 1, capacitance: 40e-6 }],
    })
    for (const outputCurrent of [0.05, 0.6, 2]) {
      const { operatingPoint } = analyse(ideal, { operatingPoint: { outputCurrent } })
      expectRelative(operatingPoint.rectifierCurrent.average, outputCurrent, 1e-4)
      expectRelative(operatingPoint.efficiency, 1, 1e-4)
    }
  })

  it('name the boundary of conduction: continuous just above, discontinuous just below', () => {
    const { boundaryCurrent } = analyse(boostDesign()).operatingPoint
    const at = (share: number) =>
      analyse(boostDesign(), { operatingPoint: { outputCurrent: boundaryCurrent! * share } }).operatingPoint.conduction
    expect([at(1.01), at(0.99)]).toEqual(['continuous', 'discontinuous'])
  })

  it('give the ripple of an ideal buck: V·D′·T/L', () => {
    const { operatingPoint } = analyse(
      buckDesign({ inductor: { inductance: 2.2e-6 }, switch: { onResistance: 0 }, rectifier: { kind: 'synchronous' } }),
    )
    const D = 3.3 / 12
    expectRelative(operatingPoint.dutyCycle, D, 1e-9)
    // The output's own ripple bends the straight slopes by parts in ten thousand.
    expectRelative(operatingPoint.inductorCurrent.ripple, (3.3 * (1 - D)) / 2.2e-6 / 500e3, 1e-3)
  })
})

describe('closed loop', () => {
  it('the load step starts at the ESR, returns to zero and dips as the worst closed-loop impedance allows', () => {
    const { steps, loop, frequencies } = analyse(buckDesign())
    const { load } = steps!
    // The load, 0.41 Ω, stands in parallel with the 0.75 mΩ of the bank.
    expectRelative(load.outputDeviation[0]!, (-load.size * 3e-3) / 4, 3e-3)
    expect(Math.abs(load.outputDeviation.at(-1)!)).toBeLessThan(Math.abs(load.peakDeviation) / 20)
    const worst = Math.max(...loop!.closedLoop.outputImpedance.averaged.map(({ gainDb }) => 10 ** (gainDb / 20)))
    expect(Math.abs(load.peakDeviation)).toBeLessThan(2 * load.size * worst)
    expect(frequencies).toHaveLength(400)
  })

  it('partial fractions of the step add up to what it starts from', () => {
    // At t = 0+ the deviation is D·size, and in the end that of the finite loop gain; the modes make the difference.
    const { steps } = analyse(buckDesign())
    const amplitudes = steps!.load.modes.map(({ amplitude }) => amplitude)
    expect(amplitudes).toEqual([...amplitudes].sort((a, b) => b - a))
    expect(amplitudes.reduce((a, b) => a + b)).toBeGreaterThan(Math.abs(steps!.load.peakDeviation))
  })

  it('every corner is there once and the worst is the least', () => {
    const { corners, worst } = analyseCorners(buckDesign())
    expect(corners).toHaveLength(6)
    const margins = corners.map((corner) => corner.margins.phaseMargin!)
    expect(margins[worst]).toBe(Math.min(...margins))
    const nominal = analyse(buckDesign()).margins
    expect(corners[0]!.margins).toEqual(nominal)
  })
})

/** Values spread evenly over their decades, without fast-check's leaning to the ends: there hardly anything can be built. */
const decades = (low: number, high: number) =>
  fc.noBias(fc.double({ min: 0, max: 1, noNaN: true })).map((share) => low * (high / low) ** share)

const anyDesign = fc
  .record({
    topology: fc.constantFrom(...TOPOLOGIES),
    control: fc.constantFrom(...CONTROLS),
    amplifier: fc.constantFrom(...AMPLIFIER_KINDS),
    load: fc.constantFrom(...LOAD_KINDS),
    isDiode: fc.boolean(),
    frequency: decades(1e4, 3e6),
    line: decades(1, 400),
    ratio: decades(0.05, 20),
    current: decades(1e-3, 100),
    inductance: decades(1e-8, 1e-2),
    capacitance: decades(1e-8, 1e-2),
    esr: fc.oneof(fc.constant(0), decades(1e-5, 1)),
    resistance: fc.oneof(fc.constant(0), decades(1e-4, 1)),
    ramp: decades(0.1, 5),
    sense: decades(1e-3, 1),
    slope: fc.oneof(fc.constant(0), decades(1e2, 1e7)),
    part: decades(0.1, 10),
  })
  .map((draw) => ({
    topology: draw.topology,
    switchingFrequency: draw.frequency,
    line: { minimum: draw.line, nominal: draw.line, maximum: draw.line },
    output: { voltage: draw.line * draw.ratio, currentMinimum: draw.current, currentMaximum: draw.current },
    load: draw.load,
    inductor: { inductance: draw.inductance, resistance: draw.resistance },
    secondInductor: { inductance: draw.inductance * 1.3, resistance: draw.resistance },
    couplingCapacitor: { capacitance: draw.capacitance, esr: draw.esr },
    transformer: { turnsRatio: draw.part },
    outputCapacitors: [
      { count: 2, capacitance: draw.capacitance, esr: draw.esr },
      { count: 1, capacitance: draw.capacitance * 3, esr: draw.esr * 4 },
    ],
    switch: { onResistance: draw.resistance },
    rectifier: {
      kind: draw.isDiode ? 'diode' : 'synchronous',
      onResistance: draw.resistance,
      forwardVoltage: draw.isDiode ? 0.5 : 0,
    },
    modulator:
      draw.control === 'voltage-mode'
        ? { kind: draw.control, rampAmplitude: draw.ramp }
        : { kind: draw.control, currentSenseResistance: draw.sense, slopeCompensation: draw.slope },
    sense: { referenceVoltage: Math.min(0.8, draw.line * draw.ratio), upperResistance: 10e3 },
    amplifier: {
      kind: draw.amplifier,
      transconductance: 1e-3,
      currentTransferRatio: 1,
      pullUpResistance: 1e3,
      ledResistance: 1e3,
      optocouplerPole: 1e4,
    },
    compensator: {
      type: 'III',
      parts: { R2: 1e4 * draw.part, R3: 300 * draw.part, C1: 3e-9 / draw.part, C2: 5e-11, C3: 1e-9 * draw.part },
    },
  }))

describe('whatever is drawn', () => {
  it('the answer is finite numbers, or a refusal with words', () => {
    const frequencies = [10, 1e3, 1e4]
    const seen = { answers: 0, refusals: 0 }
    fc.assert(
      fc.property(anyDesign, (design) => {
        try {
          const bad = allNumbers(analyse(design, { frequencies })).filter(([, value]) => !Number.isFinite(value))
          expect(bad).toEqual([])
          seen.answers++
        } catch (error) {
          if (!(error instanceof DesignError)) throw error
          expect(error.message.length).toBeGreaterThan(20)
          seen.refusals++
        }
      }),
      { numRuns: 500 },
    )
    expect(seen.answers).toBeGreaterThan(100)
  })
})
