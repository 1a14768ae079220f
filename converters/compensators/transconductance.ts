/**
 * A transconductance amplifier that drives its network to ground:
 *
 *   G = gm·H·Zo,   Zo = (R2 + C1) ∥ C2 ∥ Ro (type I: C1 ∥ Ro),   H = Zlower/(Zlower + Zupper)
 *
 * Zupper is the upper divider resistor, with R3 + C3 across it in type III.
 */
import type { CompensatorType } from '../document'
import type { Complex } from '../numeric/complex'
import { stateSpaceOf, type StateSpace } from './stateSpace'

export interface TransconductanceNetwork {
  readonly kind: 'transconductance'
  readonly type: CompensatorType
  readonly upperConductance: number // S
  readonly lowerConductance: number // S, 0 without a lower resistor
  readonly R2: number // Ω, 0 in type I
  readonly C1: number // F
  readonly C2: number // F, 0 when not fitted
  readonly R3: number // Ω, type III
  readonly C3: number // F, type III
  readonly transconductance: number // S
  readonly outputConductance: number // S
}

/** Written out in real and imaginary parts: this runs for every frequency of every candidate network. */
export function transconductanceGain(network: TransconductanceNetwork, omega: number): Complex {
  const { upperConductance, lowerConductance, R2, C1, C2, R3, C3, transconductance, outputConductance } = network
  // Output admittance Yo = 1/Ro + jωC2 + jωC1/(1 + jωR2C1).
  const branchLag = omega * R2 * C1
  const branchScale = (omega * C1) / (1 + branchLag * branchLag)
  const outputRe = outputConductance + branchScale * branchLag
  const outputIm = omega * C2 + branchScale
  // H = Yi/(Yi + Ylower) with Yi = 1/R1 + jωC3/(1 + jωR3C3).
  const leadLag = omega * R3 * C3
  const leadScale = (omega * C3) / (1 + leadLag * leadLag)
  const inputRe = upperConductance + leadScale * leadLag
  const inputIm = leadScale
  const sumRe = inputRe + lowerConductance
  // G = gm·Yi/((Yi + Ylower)·Yo).
  const re = sumRe * outputRe - inputIm * outputIm
  const im = sumRe * outputIm + inputIm * outputRe
  const scale = transconductance / (re * re + im * im)
  return { re: scale * (inputRe * re + inputIm * im), im: scale * (inputIm * re - inputRe * im) }
}

const STATES = ['c1', 'c2', 'c3'] as const

/**
 * States: C1's voltage, C2's where fitted (then it is the control voltage), C3's in type III, counted from the
 * converter's output towards the amplifier's input.
 */
export function transconductanceStateSpace(network: TransconductanceNetwork): StateSpace {
  const { type, upperConductance, lowerConductance, R2, C1, C2, R3, C3, transconductance, outputConductance } = network
  const lead = type === 'III' ? 1 / R3 : 0
  const fitted = STATES.filter((name) => !((name === 'c2' && C2 === 0) || (name === 'c3' && type !== 'III')))
  return stateSpaceOf(STATES, fitted, (v, input) => {
    const feedback = (upperConductance * input + lead * (input - v.c3)) / (upperConductance + lead + lowerConductance)
    const current = transconductance * feedback
    // Without C2 the control voltage follows from the currents that meet at the output; in type I it is C1's own.
    let control = C2 > 0 ? v.c2 : v.c1
    if (type !== 'I' && C2 === 0) control = (current + v.c1 / R2) / (outputConductance + 1 / R2)
    const branchCurrent = type === 'I' ? current - outputConductance * control : (control - v.c1) / R2
    return {
      rates: {
        c1: branchCurrent / C1,
        c2: (current - outputConductance * control - branchCurrent) / C2,
        c3: (lead * (input - feedback - v.c3)) / C3,
      },
      output: control,
    }
  })
}
