/**
 * An operational amplifier with its feedback network, finite gain and bandwidth included:
 *
 *   G = (Zf/Zi)/(1 + (1 + Zf/(Zi ∥ Rlower))/A(s)),   A(s) = A₀/(1 + s·A₀/(2π·GBW))
 *
 * Zi is the upper divider resistor, with R3 + C3 across it in type III. Zf is C1 in type I, else (R2 + C1) ∥ C2.
 */
import type { CompensatorType } from '../document'
import type { Complex } from '../numeric/complex'
import { stateSpaceOf, type StateSpace } from './stateSpace'

export interface OpAmpNetwork {
  readonly kind: 'op-amp'
  readonly type: CompensatorType
  readonly upperConductance: number // S
  readonly lowerConductance: number // S, 0 without a lower resistor
  readonly R2: number // Ω, 0 in type I
  readonly C1: number // F
  readonly C2: number // F, 0 when not fitted
  readonly R3: number // Ω, type III
  readonly C3: number // F, type III
  readonly openLoopGain: number
  readonly amplifierPole: number // rad/s
}

/** Written out in real and imaginary parts: this runs for every frequency of every candidate network. */
export function opAmpGain(network: OpAmpNetwork, omega: number): Complex {
  const { upperConductance, lowerConductance, R2, C1, C2, R3, C3, openLoopGain, amplifierPole } = network
  // Feedback admittance Yf = jωC2 + jωC1/(1 + jωR2C1).
  const feedbackLag = omega * R2 * C1
  const feedbackScale = (omega * C1) / (1 + feedbackLag * feedbackLag)
  const feedbackRe = feedbackScale * feedbackLag
  const feedbackIm = feedbackScale + omega * C2
  // Input admittance Yi = 1/R1 + jωC3/(1 + jωR3C3).
  const leadLag = omega * R3 * C3
  const leadScale = (omega * C3) / (1 + leadLag * leadLag)
  const inputRe = upperConductance + leadScale * leadLag
  const inputIm = leadScale
  // G = Yi/(Yf + (Yf + Yi + Ylower)/A), 1/A = (1 + jω/ωa)/A₀.
  const inverseRe = 1 / openLoopGain
  const inverseIm = omega / (amplifierPole * openLoopGain)
  const sumRe = feedbackRe + inputRe + lowerConductance
  const sumIm = feedbackIm + inputIm
  const re = feedbackRe + sumRe * inverseRe - sumIm * inverseIm
  const im = feedbackIm + sumRe * inverseIm + sumIm * inverseRe
  const norm = re * re + im * im
  return { re: (inputRe * re + inputIm * im) / norm, im: (inputIm * re - inputRe * im) / norm }
}

const STATES = ['c1', 'straight', 'c3', 'output'] as const

/**
 * States: C1's voltage, that of the capacitor straight across the feedback path (C2, in type I C1), C3's in type III, and the
 * amplifier's output. The first two count from the inverting input towards the output, C3's from the converter's
 * output towards the inverting input.
 *
 * With a capacitor straight across, the inverting input is a state (output plus that capacitor); without one it
 * follows from the currents that meet there.
 */
export function opAmpStateSpace(network: OpAmpNetwork): StateSpace {
  const { type, upperConductance, lowerConductance, R2, C1, C2, R3, C3, openLoopGain, amplifierPole } = network
  const straight = type === 'I' ? C1 : C2
  const branch = type === 'I' ? 0 : 1 / R2
  const lead = type === 'III' ? 1 / R3 : 0
  const meeting = upperConductance + lead + lowerConductance + branch
  const fitted = STATES.filter(
    (name) =>
      !(
        (name === 'c1' && type === 'I') ||
        (name === 'straight' && straight === 0) ||
        (name === 'c3' && type !== 'III')
      ),
  )
  return stateSpaceOf(STATES, fitted, (v, input) => {
    const inverting =
      straight > 0
        ? v.output + v.straight
        : (upperConductance * input + lead * (input - v.c3) + branch * (v.output + v.c1)) / meeting
    const leadCurrent = lead * (input - inverting - v.c3)
    const branchCurrent = branch * (inverting - v.output - v.c1)
    const inputCurrent = upperConductance * (input - inverting) + leadCurrent - lowerConductance * inverting
    return {
      rates: {
        c1: branchCurrent / C1,
        straight: (inputCurrent - branchCurrent) / straight,
        c3: leadCurrent / C3,
        output: -amplifierPole * (openLoopGain * inverting + v.output),
      },
      output: -v.output,
    }
  })
}
