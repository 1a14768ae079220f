/** Which crossover and type to suggest: the highest at which every corner holds, or the reason why there is none. */
import type { CompensatorType } from '../document'
import { formatQuantity } from '../quantities'
import type { CrossoverWindow, PartValues } from '../results'
import { attemptKFactor, boostFor, goalAt, holds, typeFor, type Attempt, type Goal } from './attempts'
import type { CornerPlants } from './cornerPlants'
import { LARGEST_BOOST } from './kFactor'
import type { CompensatorOptions } from './options'
import { attemptPlaced } from './placed'
import { isBuildable, partsBeyond } from './sizing'
import { rightHalfPlaneZero } from '../plant'

export interface ChoiceRequest {
  readonly plants: CornerPlants
  readonly window: CrossoverWindow
  readonly upperResistance: number // Ω
  readonly wanted: number | null // Hz
  readonly type: CompensatorType | null
  readonly limits: CompensatorOptions['limits']
  /** Brings an attempt's parts within the limits where R1 may be moved. */
  readonly size: (attempt: Attempt) => Attempt
}

export type Choice =
  | {
      readonly kind: 'choice'
      /** The first is what the choice was made for; one at another crossover is an alternative. */
      readonly attempts: readonly [Attempt, ...Attempt[]]
      readonly how: 'wanted' | 'highest' | 'nearest' | 'slow-integrator'
    }
  | { readonly kind: 'refusal'; readonly message: string }

const TAU = 2 * Math.PI
const STEPS_PER_DECADE = 24
/** The window's lower end may lie decades down; nobody wants a crossover that far below its upper end. */
const SEARCHED_DECADES = 1.3
const SLOW_DECADES = 3
/** Share of the margin targets that ten times the crossover is worth where not all targets can hold. */
const SLACK_PER_DECADE = 0.2
/** What rounding to preferred values may move the crossover by. */
const ROUNDING_ROOM = 0.97
/** With this share of the targets still held, a crossover in the window is better than a slow integrator. */
const TOLERABLE_SLACK = -0.4

const refusal = (message: string): Choice => ({ kind: 'refusal', message })
const hertz = (frequency: number) => formatQuantity(frequency, 'Hz')

export function chooseCrossover(request: ChoiceRequest): Choice {
  return request.wanted === null ? search(request) : takeWanted(request, request.wanted)
}

function takeWanted(request: ChoiceRequest, wanted: number): Choice {
  const { plants, type } = request
  const { targets, switchingFrequency } = plants.design
  if (wanted >= switchingFrequency / 2) {
    return refusal(
      `A crossover of ${hertz(wanted)} is not below half the switching frequency, ${hertz(switchingFrequency / 2)}; a loop that samples once a period cannot cross there.`,
    )
  }
  const zero = lowestZero(plants)
  if (zero !== null && wanted >= zero) {
    return refusal(
      `The lowest right-half-plane zero is at ${hertz(zero)}, below the wanted crossover of ${hertz(wanted)}. No network can make a loop that crosses there settle; ask for ${hertz(zero / 3)} or less.`,
    )
  }
  const goal = goalAt(plants, TAU * wanted)
  const boost = boostFor(goal, targets.phaseMargin)
  const limit = type === null ? LARGEST_BOOST.III : LARGEST_BOOST[type]
  const attempts = bothMethods(request, goal)
  if (attempts) return { kind: 'choice', attempts, how: 'wanted' }
  const lag = (-goal.plantPhase).toFixed(0)
  const adds =
    type === null ? 'type III, the largest network, adds less than 180°' : `type ${type} adds less than ${limit}°`
  const reason =
    boost >= limit
      ? adds
      : `that is out of reach of type ${type ?? typeFor(boost) ?? 'III'} with this amplifier and divider`
  return refusal(
    `At ${hertz(wanted)} the plant lags by ${lag}°, so a phase margin of ${targets.phaseMargin}° needs ${boost.toFixed(0)}° of boost; ${reason}. Ask for a lower crossover.`,
  )
}

function search(request: ChoiceRequest): Choice {
  const { type, limits } = request
  const inWindow = bestBetween(request, (parts) => isBuildable(parts, limits))
  const slack = inWindow ? inWindow[0].slack : -Infinity
  if (inWindow && slack >= 0) return { kind: 'choice', attempts: inWindow, how: 'highest' }
  const slow = type === null || type === 'I' ? slowIntegrator(request) : null
  if (slow && slack < TOLERABLE_SLACK) return { kind: 'choice', attempts: [slow], how: 'slow-integrator' }
  if (inWindow && slack > -1) {
    // The slow loop that holds is shown too: it may be what the designer can live with.
    return { kind: 'choice', attempts: slow ? [...inWindow, slow] : inWindow, how: 'nearest' }
  }
  return refusal(whyNothing(request))
}

function whyNothing(request: ChoiceRequest): string {
  const { plants, window, type, limits } = request
  const { phaseMargin, gainMargin } = plants.design.targets
  const all = plants.design.amplifier.kind === 'shunt-optocoupler' ? 'II or III' : 'I, II or III'
  const which = `No network of type ${type ?? all}`
  const none = `${which} that can be built keeps ${phaseMargin}° and ${gainMargin} dB, or comes near, at every corner of line and load.`
  const bounds = window.bounds.map(({ text }) => text).join(' ')
  if (window.lower >= window.upper) return `${none} The window is empty: ${bounds}`
  const unlimited = bestBetween(request, () => true)?.[0]
  if (!unlimited || unlimited.slack < TOLERABLE_SLACK) return `${none} These bound the crossover: ${bounds}`
  const { type: found, parts } = unlimited.ideal
  const needs = partsBeyond(parts, limits)
    .map(([part, value]) => `${part} = ${formatQuantity(value, part.startsWith('R') ? 'Ω' : 'F')}`)
    .join(', ')
  return `${none} Type ${found} at ${hertz(unlimited.goal.omega / TAU)} would, but with parts outside the size limits: ${needs}. Allow them, or change the upper divider resistor or the ramp.`
}

/** What the two methods need to know. */
export type MethodsRequest = Pick<ChoiceRequest, 'plants' | 'upperResistance' | 'type' | 'size'>

/** Both methods at one crossover, the better first: a K-factor network that holds, or the one with more slack. */
export function bothMethods(request: MethodsRequest, goal: Goal): [Attempt, ...Attempt[]] | null {
  const { plants, upperResistance, type, size } = request
  const found = attemptKFactor({ plants, upperResistance, goal, type })
  if (!found) return null
  const byFactor = size(found)
  const foundPlaced = attemptPlaced({ plants, upperResistance, goal, type: byFactor.ideal.type })
  if (!foundPlaced) return [byFactor]
  const placed = size(foundPlaced)
  return holds(byFactor) || byFactor.slack >= placed.slack ? [byFactor, placed] : [placed, byFactor]
}

/** From the top of the window down: the first crossover at which all corners hold and stay inside, else the nearest. */
function bestBetween(
  request: ChoiceRequest,
  isAllowed: (parts: PartValues) => boolean,
): [Attempt, ...Attempt[]] | null {
  const { plants, window } = request
  if (window.lower >= window.upper) return null
  const lowest = Math.max(window.lower, window.upper / 10 ** SEARCHED_DECADES)
  const fastest = ROUNDING_ROOM * TAU * window.upper
  let nearest: [Attempt, ...Attempt[]] | null = null
  for (const frequency of descending(window.upper, lowest)) {
    const [best, ...others] = (bothMethods(request, goalAt(plants, TAU * frequency)) ?? []).filter(
      ({ ideal, highestCrossover }) => highestCrossover <= fastest && isAllowed(ideal.parts),
    )
    if (!best) continue
    if (nearest === null || worth(best) > worth(nearest[0])) nearest = [best, ...others]
    if (holds(best)) break
  }
  return nearest
}

/** Margin is dear, but where it is short anyway not dearer than any bandwidth. */
const worth = ({ slack, goal }: Attempt): number =>
  (slack >= 0 ? 1 : 0) + slack + SLACK_PER_DECADE * Math.log10(goal.omega)

/** An integrator so slow that even the resonance's peak stays below the gain margin. */
function slowIntegrator(request: ChoiceRequest): Attempt | null {
  const { plants, window, limits, size } = request
  const top = Math.min(window.lower || window.upper, window.upper)
  for (const frequency of descending(top, top / 10 ** SLOW_DECADES)) {
    const found = attemptKFactor({ ...request, type: 'I', goal: goalAt(plants, TAU * frequency) })
    if (!found || !holds(found)) continue
    const attempt = size(found)
    if (isBuildable(attempt.ideal.parts, limits)) return attempt
  }
  return null
}

function* descending(from: number, to: number): Generator<number> {
  const steps = Math.floor(Math.log10(from / to) * STEPS_PER_DECADE)
  for (let i = 0; i <= steps; i++) yield from * 10 ** (-i / STEPS_PER_DECADE)
}

const lowestZero = ({ corners }: CornerPlants): number | null => {
  const zeros = corners.flatMap(({ plant }) => rightHalfPlaneZero(plant.zeros) ?? [])
  return zeros.length > 0 ? Math.min(...zeros) : null
}
