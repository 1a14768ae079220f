/**
 * The switched model against brute force: a sine injected into a cycle-by-cycle simulation that shares no code with the
 * engine. 0.05 dB and 0.3° are what such a reading can tell with 200 steps a period.
 */
import { describe, expect, it } from 'vitest'
import { analyse } from '@/converters'
import { DesignDocument, type DesignDocumentInput, type LoadKind } from '@/converters/document'
import { inject, type Injection, type SimulatedConverter } from '@/tests/support/cycleByCycle'
import { angleBetween, expectRelative } from '@/tests/support/expectRelative'

const QUANTITIES = { control: 'controlToOutput', line: 'lineToOutput', load: 'outputImpedance' } as const
const MODULATORS = {
  'voltage mode': { kind: 'voltage-mode', rampAmplitude: 1.2 },
  'peak current mode': { kind: 'peak-current-mode', currentSenseResistance: 0.1, slopeCompensation: 90e3 },
} as const
/** Low, middle and high in the band: the sine's and the switching's periods in one reading. */
const READINGS = [
  { sine: 1, switching: 90 },
  { sine: 13, switching: 90 },
  { sine: 38, switching: 90 },
] as const

interface Case {
  readonly topology: 'buck' | 'boost'
  readonly conduction: 'continuous' | 'discontinuous'
  readonly modulator: keyof typeof MODULATORS
  readonly load: LoadKind
}
const cases: Case[] = (['buck', 'boost'] as const).flatMap((topology) =>
  (['continuous', 'discontinuous'] as const).flatMap((conduction) =>
    (['voltage mode', 'peak current mode'] as const).map((modulator) => ({
      topology,
      conduction,
      modulator,
      load: 'resistive' as const,
    })),
  ),
)
cases.push({ topology: 'buck', conduction: 'continuous', modulator: 'peak current mode', load: 'constant-current' })
cases.push({ topology: 'boost', conduction: 'discontinuous', modulator: 'voltage mode', load: 'constant-power' })

/** Small capacitance, so that the simulation settles in tens of periods; the ripple is then large, which is the harder case. */
function designOf({ topology, conduction, modulator, load }: Case): DesignDocumentInput {
  const current = conduction === 'continuous' ? 2 : 0.25
  return {
    topology,
    switchingFrequency: 300e3,
    line: { minimum: 12, nominal: 12, maximum: 12 },
    output: { voltage: topology === 'buck' ? 5 : 20, currentMinimum: current, currentMaximum: current },
    load,
    inductor: { inductance: conduction === 'continuous' ? 10e-6 : 5e-6, resistance: 0.03 },
    outputCapacitors: [{ count: 1, capacitance: conduction === 'continuous' ? 6e-6 : 1.5e-6, esr: 0.05 }],
    switch: { onResistance: 0.02 },
    rectifier:
      conduction === 'continuous'
        ? { kind: 'synchronous', onResistance: 0.015, forwardVoltage: 0 }
        : { kind: 'diode', onResistance: 0.03, forwardVoltage: 0.45 },
    modulator: MODULATORS[modulator],
  }
}

function simulated(input: DesignDocumentInput, controlVoltage: number): SimulatedConverter {
  const design = DesignDocument.parse(input)
  const { modulator, output, load } = design
  const current = output.currentMaximum
  const conductance = current / output.voltage
  const bank = design.outputCapacitors[0]!
  return {
    topology: design.topology as 'buck' | 'boost',
    switchingFrequency: design.switchingFrequency,
    lineVoltage: design.line.nominal,
    loadConductance: { resistive: conductance, 'constant-current': 0, 'constant-power': -conductance }[load],
    loadCurrent: { resistive: 0, 'constant-current': current, 'constant-power': 2 * current }[load],
    inductance: design.inductor.inductance,
    inductorResistance: design.inductor.resistance,
    capacitance: bank.capacitance,
    esr: bank.esr,
    switchResistance: design.switch.onResistance,
    rectifierResistance: design.rectifier.onResistance,
    forwardVoltage: design.rectifier.forwardVoltage,
    isDiode: design.rectifier.kind === 'diode',
    controlVoltage,
    sensing: modulator.kind === 'voltage-mode' ? 0 : modulator.currentSenseResistance,
    slope:
      modulator.kind === 'voltage-mode'
        ? modulator.rampAmplitude * design.switchingFrequency
        : modulator.slopeCompensation,
  }
}

describe.each(cases)('$topology, $conduction conduction, $modulator, $load load', (theCase) => {
  const design = designOf(theCase)
  const frequencies = READINGS.map(({ sine, switching }) => (design.switchingFrequency * sine) / switching)
  const { operatingPoint, responses } = analyse(design, { frequencies })
  const converter = simulated(design, operatingPoint.controlVoltage)

  it.each(['control', 'line', 'load'] as const)('answers an injection at the %s as simulated', (at: Injection) => {
    expect(operatingPoint.conduction).toBe(theCase.conduction)
    READINGS.forEach((reading, i) => {
      const brute = inject(converter, at, reading)
      const exact = responses[QUANTITIES[at]].switched[i]!
      const where = `${QUANTITIES[at]} at ${frequencies[i]} Hz`
      expectRelative(brute.meanOutput, design.output.voltage, 1e-4)
      expect(Math.abs(exact.gainDb - brute.gainDb), where).toBeLessThan(0.05)
      expect(angleBetween(exact.phaseDeg, brute.phaseDeg), where).toBeLessThan(0.3)
    })
  })
})
