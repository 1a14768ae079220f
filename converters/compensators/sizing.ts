/**
 * Keeps a network's parts within the size limits. An op-amp's gain depends on ratios of impedances alone (the lower divider
 * resistor included), so all parts may be scaled together with R1: resistors by k, capacitors by 1/k.
 */
import type { CompensatorPart } from '../document'
import type { PartValues } from '../results'
import type { Attempt } from './attempts'
import type { CornerPlants } from './cornerPlants'
import { buildNetwork } from './networks'
import type { CompensatorOptions } from './options'

type Limits = CompensatorOptions['limits']

/** A part this factor beyond a size limit is taken at the limit without much harm. */
const NEAR_ENOUGH = 1.2
/** A, through the divider: enough beside an amplifier's bias, not so much that it heats. Common practice, no source. */
const DIVIDER_CURRENT = { least: 20e-6, most: 2e-3 }

/** Whether every part can have nearly its computed value; a C2 that is too small is left out. */
export const isBuildable = (parts: PartValues, limits: Limits): boolean => partsBeyond(parts, limits).length === 0

/** The parts that the limits keep away from their computed values. */
export function partsBeyond(parts: PartValues, limits: Limits): [CompensatorPart, number][] {
  return entriesOf(parts).filter(([part, value]) => {
    if (part === 'R1') return false
    const { least, most } = scaleRange({ [part]: value }, limits)
    return least > NEAR_ENOUGH || most < 1 / NEAR_ENOUGH
  })
}

/**
 * The attempt with R1, and all parts with it, moved as little as the limits ask for; unchanged where nothing has to
 * move or nothing helps.
 * @param resistors - values that R1 may take, Ω, ascending
 */
export function sizeAttempt(
  plants: CornerPlants,
  attempt: Attempt,
  limits: Limits,
  resistors: readonly number[],
): Attempt {
  const { ideal } = attempt
  const { least, most } = scaleRange(ideal.parts, limits)
  if ((least <= 1 && most >= 1) || least > most) return attempt
  const R1 = ideal.parts.R1!
  const { voltage } = plants.design.output
  const lowest = Math.max(least * R1, voltage / DIVIDER_CURRENT.most)
  const highest = Math.min(most * R1, voltage / DIVIDER_CURRENT.least)
  const allowed = resistors.filter((value) => value >= lowest && value <= highest)
  if (allowed.length === 0) return attempt
  const moved = least > 1 ? allowed[0]! : allowed.at(-1)!
  const parts = scaledParts(ideal.parts, moved / R1)
  return { ...attempt, ideal: { ...ideal, parts, network: buildNetwork(plants.design, { type: ideal.type, parts }) } }
}

/** Factors on all resistors, and one over them on all capacitors, with which each part is within its limits. */
function scaleRange(parts: PartValues, limits: Limits): { readonly least: number; readonly most: number } {
  const { smallestResistance, largestResistance, smallestCapacitance, largestCapacitance } = limits
  const resistors = [parts.R2, parts.R3].filter((value) => value !== undefined)
  const capacitors = [parts.C1, parts.C3].filter((value) => value !== undefined)
  return {
    least: Math.max(
      ...resistors.map((value) => smallestResistance / value),
      ...[...capacitors, parts.C2 ?? 0].map((value) => value / largestCapacitance),
    ),
    most: Math.min(
      ...resistors.map((value) => largestResistance / value),
      ...capacitors.map((value) => value / smallestCapacitance),
    ),
  }
}

const scaledParts = (parts: PartValues, k: number): PartValues =>
  Object.fromEntries(entriesOf(parts).map(([part, value]) => [part, part.startsWith('R') ? value * k : value / k]))

const entriesOf = (parts: PartValues) => Object.entries(parts) as [CompensatorPart, number][]
