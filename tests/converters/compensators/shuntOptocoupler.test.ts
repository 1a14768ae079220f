import * as fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { analyse, proposeCompensator, simulate } from '@/converters'
import { buildNetwork, networkGain, networkRoots, networkStateSpace } from '@/converters/compensators/networks'
import type { DesignDocumentInput } from '@/converters/document'
import { argumentDeg, decibels } from '@/converters/numeric/complex'
import { modelResponses } from '@/converters/averaged/linearModel'
import { angleBetween, expectRelative } from '@/tests/support/expectRelative'

const TAU = 2 * Math.PI
const amplifier = {
  kind: 'shunt-optocoupler',
  currentTransferRatio: 0.8,
  pullUpResistance: 2.2e3,
  ledResistance: 1e3,
  optocouplerPole: 15e3,
} as const
const setting = {
  amplifier,
  sense: { referenceVoltage: 2.5, upperResistance: 38e3 },
  output: { voltage: 12, currentMinimum: 0.1, currentMaximum: 1 },
}

/** 24 V to isolated 12 V, 1 A flyback in current mode. */
const flyback: DesignDocumentInput = {
  topology: 'flyback',
  switchingFrequency: 150e3,
  line: { minimum: 18, nominal: 24, maximum: 36 },
  output: { voltage: 12, currentMinimum: 0.2, currentMaximum: 1 },
  inductor: { inductance: 40e-6, resistance: 0.05 },
  transformer: { turnsRatio: 0.7 },
  outputCapacitors: [{ count: 2, capacitance: 220e-6, esr: 0.06 }],
  switch: { onResistance: 0.05 },
  rectifier: { kind: 'diode', onResistance: 0.02, forwardVoltage: 0.5 },
  modulator: { kind: 'peak-current-mode', currentSenseResistance: 0.1, slopeCompensation: 40e3 },
  amplifier,
  sense: setting.sense,
  targets: { phaseMargin: 55 },
}

describe('a shunt reference with an optocoupler', () => {
  it('has the gain of its circuit, written down branch by branch', () => {
    const parts = { R2: 10e3, C1: 22e-9, C2: 4.7e-9, R3: 220, C3: 10e-9 }
    const network = buildNetwork(setting, { type: 'III', parts })
    for (const f of [10, 300, 4e3, 60e3]) {
      const w = TAU * f
      // By hand: 1 + (R2 + 1/jωC1)/R1, 1/R_LED + 1/(R3 + 1/jωC3), two lags.
      const reference = [1 + 10e3 / 38e3, -1 / (w * 22e-9 * 38e3)] as const
      const across = 1 / (220 ** 2 + (1 / (w * 10e-9)) ** 2)
      const led = [1 / 1e3 + 220 * across, across / (w * 10e-9)] as const
      const size =
        (0.8 * 2.2e3 * Math.hypot(...reference) * Math.hypot(...led)) /
        Math.hypot(1, f / 15e3) /
        Math.hypot(1, w * 2.2e3 * 4.7e-9)
      const angle =
        Math.atan2(reference[1], reference[0]) +
        Math.atan2(led[1], led[0]) -
        Math.atan(f / 15e3) -
        Math.atan(w * 2.2e3 * 4.7e-9)
      const gain = networkGain(network, w)
      expectRelative(10 ** (decibels(gain) / 20), size, 1e-12)
      expect(angleBetween(argumentDeg(gain), (angle * 180) / Math.PI)).toBeLessThan(1e-9)
    }
  })

  it('has state equations of the same gain, whatever the parts', () => {
    const part = (low: number, high: number) =>
      fc.double({ min: Math.log10(low), max: Math.log10(high), noNaN: true }).map((x) => 10 ** x)
    fc.assert(
      fc.property(
        fc.constantFrom('II', 'III'),
        fc.record({
          R2: part(10, 1e6),
          C1: part(1e-11, 1e-6),
          C2: fc.oneof(fc.constant(0), part(1e-11, 1e-6)),
          R3: part(10, 1e5),
          C3: part(1e-11, 1e-6),
        }),
        part(10, 1e6),
        (type, parts, omega) => {
          const network = buildNetwork(setting, { type: type as 'II' | 'III', parts })
          const { A, B, C, D } = networkStateSpace(network)
          const respond = modelResponses({ A, B: B.map(([b]) => [b!, 0, 0]), C: C[0]!, D: [D[0]![0]!, 0, 0] })
          const state = respond(omega).controlToOutput
          const gain = networkGain(network, omega)
          expect(Math.hypot(state.re - gain.re, state.im - gain.im)).toBeLessThan(1e-8 * Math.hypot(gain.re, gain.im))
        },
      ),
    )
  })

  it('adds its zero by the fast lane: 1/(2π(R1 + R2)C1)', () => {
    const network = buildNetwork(setting, { type: 'II', parts: { R2: 10e3, C1: 22e-9, C2: 4.7e-9 } })
    const [zero] = networkRoots(network).zeros
    expectRelative(-zero!.re / TAU, 1 / (TAU * 48e3 * 22e-9), 1e-9)
  })

  it('refuses type I and says why', () => {
    expect(() => buildNetwork(setting, { type: 'I', parts: { C1: 1e-9 } })).toThrow(/no type I/)
  })

  it('closes the loop of a flyback through the wizard, and the simulation settles', () => {
    const { proposals, refusal } = proposeCompensator(flyback)
    expect(refusal).toBeNull()
    const best = proposals[0]!
    expect(best.margins.preferred.worst.isStable).toBe(true)
    expect(best.margins.preferred.worst.phaseMargin!).toBeGreaterThan(50)
    const closed = { ...flyback, compensator: { type: best.type, parts: best.parts.preferred } }
    expectRelative(analyse(closed).margins!.phaseMargin!, best.margins.preferred.nominal.phaseMargin!, 1e-6)
    const { readings, meanOutput } = simulate(closed)
    expect(readings.alternates).toBe(false)
    expectRelative(meanOutput.at(-1)!, 12, 1e-2)
  })

  it('warns where the LED resistor leaves too little current', () => {
    const starved = { ...flyback, amplifier: { ...amplifier, ledResistance: 8e3 } }
    const codes = (design: DesignDocumentInput) => analyse(design).warnings.map(({ code }) => code)
    expect(codes(starved)).toContain('optocoupler-bias')
    expect(codes(flyback)).not.toContain('optocoupler-bias')
  })
})
