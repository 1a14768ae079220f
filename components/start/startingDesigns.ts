/**
 * Whole stages to begin with where the quick start does not reach. All values are invented; each computes as it stands
 * and is meant to be changed.
 */
import type { DesignDocumentInput, Topology } from '@/converters/document'

export type ControlScheme = DesignDocumentInput['modulator']['kind']

interface StartingDesign {
  readonly stage: Omit<DesignDocumentInput, 'modulator' | 'topology'>
  /** Sense resistance and slope that suit the stage, for peak current mode. */
  readonly current: { readonly currentSenseResistance: number; readonly slopeCompensation: number }
  /** The amplifier in peak current mode, where it is not the usual one. */
  readonly amplifier?: DesignDocumentInput['amplifier']
}

const DESIGNS = {
  'buck-boost': {
    stage: {
      switchingFrequency: 250e3,
      line: { minimum: 18, nominal: 24, maximum: 32 },
      output: { voltage: 12, currentMinimum: 0.1, currentMaximum: 1 },
      inductor: { inductance: 47e-6, resistance: 60e-3 },
      outputCapacitors: [{ count: 2, capacitance: 47e-6, esr: 20e-3 }],
      switch: { onResistance: 50e-3 },
      rectifier: { kind: 'diode', onResistance: 40e-3, forwardVoltage: 0.45 },
      sense: { referenceVoltage: 1.2, upperResistance: 91e3 },
    },
    current: { currentSenseResistance: 0.18, slopeCompensation: 30e3 },
  },
  flyback: {
    stage: {
      switchingFrequency: 150e3,
      line: { minimum: 18, nominal: 24, maximum: 32 },
      output: { voltage: 12, currentMinimum: 0.15, currentMaximum: 1.5 },
      inductor: { inductance: 100e-6, resistance: 80e-3 },
      transformer: { turnsRatio: 0.5 },
      outputCapacitors: [{ count: 2, capacitance: 220e-6, esr: 25e-3 }],
      switch: { onResistance: 60e-3 },
      rectifier: { kind: 'diode', onResistance: 30e-3, forwardVoltage: 0.45 },
      dutyLimit: 0.75,
      sense: { referenceVoltage: 2.5, upperResistance: 38.3e3 },
    },
    current: { currentSenseResistance: 0.18, slopeCompensation: 30e3 },
    // The two slow poles of voltage mode leave no room for an optocoupler's.
    amplifier: {
      kind: 'shunt-optocoupler',
      currentTransferRatio: 1,
      pullUpResistance: 4.7e3,
      ledResistance: 4.7e3,
      optocouplerPole: 20e3,
    },
  },
  forward: {
    stage: {
      switchingFrequency: 200e3,
      line: { minimum: 36, nominal: 48, maximum: 60 },
      output: { voltage: 5, currentMinimum: 1, currentMaximum: 10 },
      inductor: { inductance: 6.8e-6, resistance: 4e-3 },
      transformer: { turnsRatio: 0.35 },
      outputCapacitors: [{ count: 3, capacitance: 150e-6, esr: 12e-3 }],
      switch: { onResistance: 40e-3 },
      rectifier: { kind: 'synchronous', onResistance: 5e-3 },
      dutyLimit: 0.5,
      sense: { referenceVoltage: 1.25, upperResistance: 10e3 },
    },
    current: { currentSenseResistance: 40e-3, slopeCompensation: 20e3 },
  },
  sepic: {
    stage: {
      switchingFrequency: 300e3,
      line: { minimum: 8, nominal: 12, maximum: 18 },
      output: { voltage: 12, currentMinimum: 0.4, currentMaximum: 1 },
      inductor: { inductance: 47e-6, resistance: 60e-3 },
      secondInductor: { inductance: 47e-6, resistance: 60e-3 },
      couplingCapacitor: { capacitance: 22e-6, esr: 5e-3 },
      outputCapacitors: [{ count: 2, capacitance: 47e-6, esr: 15e-3 }],
      switch: { onResistance: 40e-3 },
      rectifier: { kind: 'diode', onResistance: 40e-3, forwardVoltage: 0.45 },
      sense: { referenceVoltage: 1.2, upperResistance: 91e3 },
    },
    current: { currentSenseResistance: 0.1, slopeCompensation: 40e3 },
  },
  cuk: {
    stage: {
      switchingFrequency: 300e3,
      line: { minimum: 9, nominal: 12, maximum: 15 },
      output: { voltage: 15, currentMinimum: 0.3, currentMaximum: 0.8 },
      inductor: { inductance: 68e-6, resistance: 70e-3 },
      secondInductor: { inductance: 68e-6, resistance: 70e-3 },
      couplingCapacitor: { capacitance: 100e-6, esr: 100e-3 },
      outputCapacitors: [{ count: 1, capacitance: 47e-6, esr: 15e-3 }],
      switch: { onResistance: 40e-3 },
      rectifier: { kind: 'diode', onResistance: 40e-3, forwardVoltage: 0.45 },
      sense: { referenceVoltage: 1.2, upperResistance: 120e3 },
    },
    current: { currentSenseResistance: 0.1, slopeCompensation: 40e3 },
  },
} satisfies Partial<Record<Topology, StartingDesign>>

/** The topologies that begin with a worked stage. */
export type WorkedTopology = keyof typeof DESIGNS
export const WORKED_TOPOLOGIES = Object.keys(DESIGNS) as WorkedTopology[]

export const isWorked = (topology: Topology): topology is WorkedTopology => Object.hasOwn(DESIGNS, topology)

export function startingDesign(topology: WorkedTopology, scheme: ControlScheme): DesignDocumentInput {
  const { stage, current, amplifier }: StartingDesign = DESIGNS[topology]
  return scheme === 'voltage-mode'
    ? { topology, ...stage, modulator: { kind: scheme, rampAmplitude: 1 } }
    : { topology, ...stage, modulator: { kind: scheme, ...current }, amplifier }
}
