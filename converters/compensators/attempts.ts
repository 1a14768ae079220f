/**
 * One network at one crossover, tried on every corner. The network is made for nominal line and full load; where another
 * corner falls short of the targets, more phase is asked for at nominal until all hold or the boost runs out.
 */
import type { CompensatorType } from '../document'
import { modulus } from '../numeric/complex'
import type { Proposal } from '../results'
import { plantPhase, type CornerPlants } from './cornerPlants'
import { kFactorNetwork, LARGEST_BOOST } from './kFactor'
import type { Synthesis, SynthesisedNetwork } from './placement'
import { quickMargins, type QuickMargins } from './quickMargins'

/** Degrees asked for beyond the target: the first for what rounding to preferred values takes. */
const RESERVES = [2, 5, 8, 12, 16, 20, 25, 30]
/** Boosts up to which a type is chosen; beyond, its zeros and poles stand too far apart to be of use. */
const USEFUL_BOOST: Readonly<Record<CompensatorType, number>> = { I: 0, II: 80, III: 165 }
/** Below this a zero and its pole nearly cancel, and the parts between them become absurd. */
const LEAST_BOOST = 10

/** What nominal line and full load ask of the network at a crossover. */
export interface Goal {
  readonly omega: number // rad/s
  readonly gain: number // of the network, so that the loop crosses here
  readonly plantPhase: number // degrees, unwrapped
}

export interface Attempt extends QuickMargins {
  readonly method: Proposal['method']
  readonly goal: Goal
  readonly boostDeg: number // asked of the network
  readonly ideal: SynthesisedNetwork
}

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
  return withReserve(plants, goal, 'k-factor', (boostDeg) => {
    const chosen = type ?? typeFor(boostDeg)
    if (chosen === null || (chosen !== 'I' && boostDeg >= LARGEST_BOOST[chosen])) return null
    const { omega, gain } = goal
    const asked = { omega, gain, boostDeg: Math.max(boostDeg, LEAST_BOOST) }
    return kFactorNetwork(plants.design, upperResistance, chosen, asked)
  })
}

/** Asks for more phase step by step; the first network that holds at every corner, else the one that comes nearest. */
export function withReserve(
  plants: CornerPlants,
  goal: Goal,
  method: Proposal['method'],
  make: (boostDeg: number) => Synthesis | null,
): Attempt | null {
  const { targets } = plants.design
  let best: Attempt | null = null
  for (const reserve of RESERVES) {
    const boostDeg = boostFor(goal, targets.phaseMargin + reserve)
    const ideal = make(boostDeg)
    if (ideal?.kind !== 'network') break
    const attempt = { method, goal, boostDeg, ideal, ...quickMargins(plants, ideal.network, targets) }
    if (best === null || attempt.slack > best.slack) best = attempt
    // Type I has one shape: asking for more phase does not change it.
    if (attempt.slack >= 0 || ideal.type === 'I') break
  }
  return best
}
