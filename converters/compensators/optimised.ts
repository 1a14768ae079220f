/**
 * Zeros and poles moved until the worst corner of line and load has the most phase margin that a fixed crossover allows,
 * the gain margin kept. The search starts from the networks of the other methods, so it ends no worse than they are.
 */
import type { CompensatorType } from '../document'
import { minimise } from '../numeric/nelderMead'
import { goalAt, holds, tried, type Attempt, type AttemptRequest, type Goal } from './attempts'
import type { CornerPlants } from './cornerPlants'
import { placementOf, placeNetwork, type Placement, type Synthesis } from './placement'

/** Shares of the crossover between which a zero may stand: lower ones leave a slow tail after each step. */
const ZEROS = { lowest: 1 / 12, highest: 0.95 }
/** A pole may go up to half the switching frequency; above, ripple reaches the comparator. */
const LOWEST_POLE = 1.05
const EVALUATIONS: Readonly<Record<CompensatorType, number>> = { I: 0, II: 60, III: 160 }
/** Octaves of the first steps. */
const STEP = 0.4
/** What a decibel short of the gain margin counts, in degrees of phase margin. */
const DEGREES_PER_DECIBEL = 6
const UNUSABLE = 1e6
const BISECTIONS = 5

/** The optimised network at the goal's crossover, or null where the type has nothing to move. */
export function attemptOptimised(request: AttemptRequest, starts: readonly Attempt[]): Attempt | null {
  const { plants, upperResistance, goal } = request
  const { design } = plants
  const candidates = starts.filter(({ ideal }) => ideal.type !== 'I' && ideal.type === starts[0]!.ideal.type)
  let best: Attempt | null = null
  for (const start of candidates) {
    const placement = placementOf(design, start.ideal.parts)
    const synthesise = (x: readonly number[]): Synthesis =>
      placeNetwork(design, upperResistance, atLogarithms(placement, x), goal)
    const cost = (x: readonly number[]): number => {
      const outside = outsideBounds(plants, placement, x, goal.omega / (2 * Math.PI))
      if (outside > 0) return UNUSABLE * (1 + outside)
      const attempt = tried(plants, goal, 'optimised', synthesise(x))
      return attempt ? -merit(plants, attempt) : UNUSABLE
    }
    const { x } = minimise(cost, logarithmsOf(placement), STEP, EVALUATIONS[start.ideal.type])
    const found = tried(plants, goal, 'optimised', synthesise(x))
    if (found && (best === null || merit(plants, found) > merit(plants, best))) best = found
  }
  return best
}

/**
 * The optimised network at the highest crossover at which every corner still holds and stays within the window, by
 * bisection between one that holds and the window's upper end. Null where none is above the first.
 * @param attemptsAt - networks of the other methods for a goal, to start from.
 */
export function attemptFastest(
  request: AttemptRequest,
  upper: number, // rad/s
  attemptsAt: (goal: Goal) => readonly Attempt[],
): Attempt | null {
  let low = request.goal.omega
  let high = upper
  let best: Attempt | null = null
  for (let step = 0; step < BISECTIONS; step++) {
    const goal = goalAt(request.plants, Math.sqrt(low * high))
    const found = attemptOptimised({ ...request, goal }, attemptsAt(goal))
    if (found && holds(found) && found.highestCrossover <= upper) {
      best = found
      low = goal.omega
    } else high = goal.omega
  }
  return best
}

/** Degrees of phase margin at the worst corner, less what is missing of the gain margin. */
export function merit({ design: { targets } }: CornerPlants, { worst }: Attempt): number {
  if (!worst.isStable) return -UNUSABLE
  const missing = Math.max(0, targets.gainMargin - (worst.gainMargin ?? Infinity))
  return (worst.phaseMargin ?? 180) - DEGREES_PER_DECIBEL * missing
}

const rootsOf = ({ main, lead }: Placement) => ({
  zeros: [...(main ? [main.zero] : []), ...(lead ? [lead.zero] : [])],
  poles: [...(main?.pole ? [main.pole] : []), ...(lead ? [lead.pole] : [])],
})

const logarithmsOf = (placement: Placement): number[] => {
  const { zeros, poles } = rootsOf(placement)
  return [...zeros, ...poles].map(Math.log2)
}

function atLogarithms({ main, lead }: Placement, x: readonly number[]): Placement {
  const values = x.map((value) => 2 ** value)
  const take = () => values.shift()!
  const mainZero = main && take()
  const leadZero = lead && take()
  const mainPole = main?.pole ? take() : null
  return {
    main: mainZero === null ? null : { zero: mainZero, pole: mainPole },
    lead: leadZero === null ? null : { zero: leadZero, pole: take() },
  }
}

/** How many octaves the roots lie outside of where they may stand. */
function outsideBounds({ design }: CornerPlants, start: Placement, x: readonly number[], crossover: number): number {
  const first = rootsOf(start)
  const { zeros, poles } = rootsOf(atLogarithms(start, x))
  const highestPole = Math.max(design.switchingFrequency / 2, ...first.poles)
  const beyond = (value: number, low: number, high: number) =>
    Math.max(0, Math.log2(low / value), Math.log2(value / high))
  const lowestZero = Math.min(ZEROS.lowest * crossover, ...first.zeros)
  const highestZero = Math.max(ZEROS.highest * crossover, ...first.zeros)
  return (
    zeros.reduce((sum, zero) => sum + beyond(zero, lowestZero, highestZero), 0) +
    poles.reduce((sum, pole) => sum + beyond(pole, Math.min(LOWEST_POLE * crossover, ...first.poles), highestPole), 0)
  )
}
