/**
 * The error amplifier with its network: complex gain, state equations, poles and zeros.
 *
 * Sign: the inversion of the error amplifier is left out, so that the loop gain is T(jω) = G(jω)·(control to output).
 */
import type { CompensatorPart, CompensatorType, DesignDocument } from '../document'
import { DesignError } from '../errors'
import type { Complex } from '../numeric/complex'
import { eigenvalues, invariantZeros } from '../numeric/eigen'
import { opAmpGain, opAmpStateSpace, type OpAmpNetwork } from './opAmp'
import { shuntOptocouplerGain, shuntOptocouplerStateSpace, type ShuntOptocouplerNetwork } from './shuntOptocoupler'
import type { StateSpace } from './stateSpace'
import { transconductanceGain, transconductanceStateSpace, type TransconductanceNetwork } from './transconductance'

export type Network = OpAmpNetwork | TransconductanceNetwork | ShuntOptocouplerNetwork

/** Which parts each type cannot do without. C2 may be left out of types II and III: its pole is then not fitted. */
const NEEDED: Readonly<Record<CompensatorType, readonly CompensatorPart[]>> = {
  I: ['C1'],
  II: ['R2', 'C1'],
  III: ['R2', 'C1', 'R3', 'C3'],
}

export type CompensatorChoice = NonNullable<DesignDocument['compensator']>
/** F, of a node without a capacitor; common practice, no source. */
const STRAY_CAPACITANCE = 1e-12

/** What of a design decides the amplifier and its divider. */
export type AmplifierSetting = Pick<DesignDocument, 'amplifier' | 'sense' | 'output'>

/**
 * The network that a design's amplifier, divider and compensator parts make.
 * @throws DesignError 'invalid-compensator' at the missing part, 'invalid-document' for a reference above the output,
 * 'invalid-compensator' for a type that the amplifier does not have.
 */
export function buildNetwork(setting: AmplifierSetting, compensator: CompensatorChoice): Network {
  const { type, parts } = compensator
  const { amplifier } = setting
  if (amplifier.kind === 'shunt-optocoupler' && type === 'I') {
    throw DesignError.at(
      'invalid-compensator',
      'compensator.type',
      'A shunt reference with an optocoupler has no type I: its LED hangs on the output and adds a zero. Choose type II or III.',
    )
  }
  for (const part of NEEDED[type]) {
    if (part === 'R2' && amplifier.kind === 'shunt-optocoupler') continue
    if (!parts[part]) {
      const field = `compensator.parts.${part}`
      throw DesignError.at('invalid-compensator', field, `A type ${type} network needs ${part}; give it a value.`)
    }
  }
  const upper = parts.R1 || setting.sense.upperResistance
  const upperConductance = 1 / upper
  const lowerConductance = 1 / (upper * lowerRatio(setting))
  const R2 = type === 'I' ? 0 : (parts.R2 ?? 0)
  const C1 = parts.C1!
  const C2 = type === 'I' ? 0 : (parts.C2 ?? 0)
  const R3 = type === 'III' ? parts.R3! : 0
  const C3 = type === 'III' ? parts.C3! : 0
  // Written out: statistical runs build one for every sample, and copying properties would be the dearest part of it.
  switch (amplifier.kind) {
    case 'op-amp': {
      const { openLoopGain, gainBandwidth } = amplifier
      const amplifierPole = (2 * Math.PI * gainBandwidth) / openLoopGain
      const kind = 'op-amp'
      return { type, upperConductance, lowerConductance, R2, C1, C2, R3, C3, kind, openLoopGain, amplifierPole }
    }
    case 'transconductance': {
      const { transconductance, outputResistance } = amplifier
      const outputConductance = 1 / outputResistance
      const kind = 'transconductance'
      return { type, upperConductance, lowerConductance, R2, C1, C2, R3, C3, kind, transconductance, outputConductance }
    }
    case 'shunt-optocoupler': {
      const { currentTransferRatio, pullUpResistance, ledResistance, optocouplerPole } = amplifier
      return {
        type,
        kind: 'shunt-optocoupler',
        upperConductance,
        R2,
        C1,
        C2,
        R3,
        C3,
        currentTransferRatio,
        pullUpResistance,
        ledResistance,
        optocouplerPole: 2 * Math.PI * optocouplerPole,
      }
    }
  }
}

/** Lower over upper divider resistance, Vref/(V − Vref); infinite where the output itself is compared. */
export function lowerRatio({ sense, output }: AmplifierSetting): number {
  const { referenceVoltage } = sense
  if (referenceVoltage > output.voltage) {
    throw DesignError.at(
      'invalid-document',
      'sense.referenceVoltage',
      `A divider can only lower the output: the reference of ${referenceVoltage} V is above the output of ${output.voltage} V.`,
    )
  }
  return referenceVoltage / (output.voltage - referenceVoltage)
}

/** Complex gain from output voltage to control voltage at `omega` (rad/s, above zero), inversion removed. */
export function networkGain(network: Network, omega: number): Complex {
  switch (network.kind) {
    case 'op-amp':
      return opAmpGain(network, omega)
    case 'transconductance':
      return transconductanceGain(network, omega)
    case 'shunt-optocoupler':
      return shuntOptocouplerGain(network, omega)
  }
}

/** The same as state equations: the states are the network's capacitor voltages and, for an op-amp, its output. */
export function networkStateSpace(network: Network): StateSpace {
  switch (network.kind) {
    case 'op-amp':
      return opAmpStateSpace(network)
    case 'transconductance':
      return transconductanceStateSpace(network)
    case 'shunt-optocoupler':
      return shuntOptocouplerStateSpace(network)
  }
}

/** Poles and zeros in rad/s, the amplifier's own included. */
export function networkRoots(network: Network): { readonly poles: Complex[]; readonly zeros: Complex[] } {
  const { A, B, C, D } = networkStateSpace(network)
  return {
    poles: eigenvalues(A),
    zeros: invariantZeros(
      A,
      B.map((row) => row[0]!),
      C[0]!,
      D[0]![0]!,
    ),
  }
}

/**
 * The network as a simulation takes it, and which of its states is the amplifier's output: the one that stands still at a
 * limit. Where no capacitor holds a transconductance amplifier's output, the node's own stray capacitance does.
 */
export function networkWithHeldOutput(network: Network): { readonly network: Network; readonly outputState: number } {
  // The op-amp's own output, or the optocoupler's collector, comes last.
  if (network.kind !== 'transconductance') return { network, outputState: networkStateSpace(network).A.length - 1 }
  if (network.type === 'I') return { network, outputState: 0 }
  return { network: { ...network, C2: network.C2 || STRAY_CAPACITANCE }, outputState: 1 }
}
