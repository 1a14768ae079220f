/**
 * One network at one crossover, tried on every corner. The network is made for nominal line and full load; where another
 * corner falls short of the targets, more phase is asked for at nominal until all hold or the boost runs out.
 */
import type { CompensatorType } from '../document'
import { modulus } from '../numeric/complex'
import type { Proposal } from '../results'
import { plantPhase, type CornerPlants } from './cornerPlants'
import { kFactorNetwork } from './kFactor'
import type { Synthesis, SynthesisedNetwork } from './placement'
import { quickMargins, type QuickMargins } from './quickMargins'

/** Degrees asked for beyond the target: the first for what rounding to preferred values takes. */
const RESERVES = [2, 5, 8, 12, 16, 20, 25, 30]
/** Boosts up to which a type is chosen; beyond, its zeros and poles stand too far apart to be of use. */
const USEFUL_BOOST: Readonly<Record<CompensatorType, number>> = { I: 0, II: 80, III: 165 }
/** Below this a zero and its pole nearly cancel, and the parts between them become absurd. */
const LEAST_BOOST = 10

/** Share of the targets that rounding to preferred values may take; with less in hand a network is not sure to hold. */
const ROUNDING_SLACK = 0.02

/** What nominal line and full load ask of the network at a crossover. */
export interface Goal {
  readonly omega: number // rad/s
  readonly gain: number // of the network, so that the loop crosses here
  readonly plantPhase: number // degrees, unwrapped
}

export interface Attempt extends QuickMargins {
  readonly method: Proposal['method']
  readonly goal: Goal
  readonly ideal: SynthesisedNetwork
}

/** Whether every corner meets the targets with some room for rounding. */
export const holds = ({ slack }: QuickMargins): boolean => slack >= ROUNDING_SLACK

export function goalAt(plants: CornerPlants, omega: number): Goal {
  const [nominal] = plants.corners
  return { omega, gain: 1 / modulus(nominal.gainAt(omega)), plantPhase: plantPhase(plants, nominal, omega) }
}

/** Degrees beyond an integrator's −90° that a phase margin needs. */
export const boostFor = (goal: Goal, phaseMargin: number): number => phaseMargin - goal.plantPhase - 90

/** The simplest type for a boost; null above what type III can usefully add. */
export function typeFor(boostDeg: number): CompensatorType | null {
  return (['I', 'II', 'III'] as const).find((type) => boostDeg <= USEFUL_BOOST[type]) ?? null
}

export interface AttemptRequest {
  readonly plants: CornerPlants
  readonly upperResistance: number // Ω
  readonly goal: Goal
  /** Null leaves the choice to the boost needed. */
  readonly type: CompensatorType | null
}

/** The best K-factor network at one crossover, or null if the boost cannot be had. */
export function attemptKFactor({ plants, upperResistance, goal, type }: AttemptRequest): Attempt | null {
  const { targets } = plants.design
  const boosts = RESERVES.map((reserve) => boostFor(goal, targets.phaseMargin + reserve))
  return bestAttempt(
    boosts.map((boostDeg) => () => {
      const chosen = type ?? typeFor(boostDeg)
      if (chosen === null) return null
      const asked = { omega: goal.omega, gain: goal.gain, boostDeg: Math.max(boostDeg, LEAST_BOOST) }
      return tried(plants, goal, 'k-factor', kFactorNetwork(plants.design, upperResistance, chosen, asked))
    }),
  )
}

/** A network with its margins at the corners; null if there is none. */
export function tried(plants: CornerPlants, goal: Goal, method: Proposal['method'], ideal: Synthesis): Attempt | null {
  if (ideal.kind === 'problem') return null
  return { method, goal, ideal, ...quickMargins(plants, ideal.network, plants.design.targets) }
}

/** The first that holds at every corner, else the one that comes nearest; null when none can be made. */
export function bestAttempt(makers: readonly (() => Attempt | null)[]): Attempt | null {
  let best: Attempt | null = null
  for (const make of makers) {
    const attempt = make()
    if (attempt === null) continue
    if (best === null || attempt.slack > best.slack) best = attempt
    if (holds(best)) break
  }
  return best
}
