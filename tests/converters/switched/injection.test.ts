/**
 * The switched model against brute force: a sine injected into a cycle-by-cycle simulation that shares no code with the
 * engine. 0.05 dB and 0.3° are what such a reading can tell with 160 steps a period.
 */
import { describe, expect, it } from 'vitest'
import { analyse } from '@/converters'
import {
  DesignDocument,
  TOPOLOGIES,
  type DesignDocumentInput,
  type LoadKind,
  type Topology,
} from '@/converters/document'
import { inject, type Injection, type SimulatedConverter } from '@/tests/support/cycleByCycle'
import { openPlant } from '@/converters/plant'
import { angleBetween, expectRelative } from '@/tests/support/expectRelative'

const QUANTITIES = { control: 'controlToOutput', line: 'lineToOutput', load: 'outputImpedance' } as const
const MODULATORS = {
  'voltage mode': { kind: 'voltage-mode', rampAmplitude: 1.2 },
  'peak current mode': { kind: 'peak-current-mode', currentSenseResistance: 0.1, slopeCompensation: 90e3 },
} as const
/** Low, middle and high in the band: the sine's and the switching's periods in one reading. */
const READINGS = [
  { sine: 1, switching: 60 },
  { sine: 9, switching: 60 },
  { sine: 25, switching: 60 },
] as const

interface Case {
  readonly topology: Topology
  readonly conduction: 'continuous' | 'discontinuous'
  readonly modulator: keyof typeof MODULATORS
  readonly load: LoadKind
}
const MODULATOR_NAMES = ['voltage mode', 'peak current mode'] as const
/**
 * Every topology and control; discontinuous conduction where there is one inductor. Loads other than resistive where the
 * converter settles with them while no loop is closed: nothing can be read from a simulation that runs away.
 */
const cases: Case[] = TOPOLOGIES.flatMap((topology) => {
  const hasOneInductor = topology !== 'sepic' && topology !== 'cuk'
  const conductions = hasOneInductor ? (['continuous', 'discontinuous'] as const) : (['continuous'] as const)
  return conductions.flatMap((conduction) =>
    MODULATOR_NAMES.map((modulator): Case => ({ topology, conduction, modulator, load: 'resistive' })),
  )
})
cases.push(
  { topology: 'buck', conduction: 'continuous', modulator: 'peak current mode', load: 'constant-current' },
  { topology: 'boost', conduction: 'discontinuous', modulator: 'voltage mode', load: 'constant-power' },
  { topology: 'flyback', conduction: 'discontinuous', modulator: 'voltage mode', load: 'constant-current' },
  { topology: 'forward', conduction: 'continuous', modulator: 'voltage mode', load: 'constant-current' },
)

const OUTPUTS: Record<Topology, number> = {
  buck: 5,
  boost: 20,
  'buck-boost': 9,
  flyback: 5,
  forward: 3.3,
  sepic: 9,
  cuk: 9,
}

/** Small capacitance, so that the simulation settles in tens of periods; the ripple is then large, which is the harder case. */
function designOf({ topology, conduction, modulator, load }: Case): DesignDocumentInput {
  const current = conduction === 'continuous' ? 2 : 0.25
  return {
    topology,
    switchingFrequency: 300e3,
    line: { minimum: 12, nominal: 12, maximum: 12 },
    output: { voltage: OUTPUTS[topology], currentMinimum: current, currentMaximum: current },
    load,
    inductor: { inductance: conduction === 'continuous' ? 10e-6 : 5e-6, resistance: 0.03 },
    secondInductor: { inductance: 12e-6, resistance: 0.04 },
    couplingCapacitor: { capacitance: 4e-6, esr: 0.02 },
    transformer: { turnsRatio: 0.7 },
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
  const isCoupled = design.topology === 'sepic' || design.topology === 'cuk'
  return {
    topology: design.topology,
    switchingFrequency: design.switchingFrequency,
    lineVoltage: design.line.nominal,
    loadConductance: { resistive: conductance, 'constant-current': 0, 'constant-power': -conductance }[load],
    loadCurrent: { resistive: 0, 'constant-current': current, 'constant-power': 2 * current }[load],
    inductance: design.inductor.inductance,
    inductorResistance: design.inductor.resistance,
    secondInductance: isCoupled ? design.secondInductor!.inductance : 0,
    secondResistance: design.secondInductor!.resistance,
    coupling: isCoupled ? design.couplingCapacitor!.capacitance : 0,
    couplingEsr: design.couplingCapacitor!.esr,
    turnsRatio: design.transformer!.turnsRatio,
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

/** The state from which the simulation starts: the engine's own, so that only the injection has to settle. */
function startOf(input: DesignDocumentInput): readonly [number, number, number, number] {
  const design = DesignDocument.parse(input)
  const point = { lineVoltage: design.line.nominal, outputCurrent: design.output.currentMaximum }
  const { circuit, orbit } = openPlant(design, point)
  const at = (name: string) => orbit.segments[0]!.start[circuit.states.indexOf(name)] ?? 0
  return [at('inductor'), -at('secondInductor'), at('couplingCapacitor'), at('output0')]
}

describe.each(cases)('$topology, $conduction conduction, $modulator, $load load', (theCase) => {
  const design = designOf(theCase)
  const frequencies = READINGS.map(({ sine, switching }) => (design.switchingFrequency * sine) / switching)
  const { operatingPoint, responses } = analyse(design, { frequencies })
  const converter = simulated(design, operatingPoint.controlVoltage)
  const start = startOf(design)

  it.each([
    ['control', 0],
    ['control', 1],
    ['control', 2],
    ['line', 1],
    ['load', 1],
  ] as const)('answers an injection at the %s as simulated, reading %s', (at: Injection, reading) => {
    expect(operatingPoint.conduction).toBe(theCase.conduction)
    const brute = inject(converter, at, READINGS[reading]!, start)
    const exact = responses[QUANTITIES[at]].switched[reading]!
    expectRelative(brute.meanOutput, design.output.voltage, 1e-4)
    expect(Math.abs(exact.gainDb - brute.gainDb)).toBeLessThan(0.05)
    expect(angleBetween(exact.phaseDeg, brute.phaseDeg)).toBeLessThan(0.3)
  })
})
