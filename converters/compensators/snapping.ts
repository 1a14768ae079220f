/**
 * From computed to preferred values, all parts together: a capacitor that comes out 10 % high is met by the resistor that
 * keeps its zero, and so on. Combinations near the computed network are ranked by what they change around
 * crossover; the best few are tried on every corner.
 */
import { DesignError } from '../errors'
import type { Complex } from '../numeric/complex'
import { divide, modulus, argumentDeg } from '../numeric/complex'
import type { PartValues } from '../results'
import type { CornerPlants } from './cornerPlants'
import { buildNetwork, networkGain, type Network } from './networks'
import type { CompensatorOptions } from './options'
import type { SynthesisedNetwork } from './placement'
import { nearestValues, ownValues, preferredValues } from './preferredNumbers'
import { quickMargins } from './quickMargins'

/** What can be had: ascending values in Ω and F. */
export interface Stock {
  readonly resistors: readonly number[]
  readonly capacitors: readonly number[]
}

const NEAR_CAPACITORS = 3
const NEAR_RESISTORS = 3
/** Resistors around the value that keeps a time constant when its capacitor has been rounded. */
const COMPENSATING_RESISTORS = 2
const TRIED_AT_CORNERS = 40
/** Where beside crossover (1) the shape of the network is compared, and how much that counts. */
const COMPARED = [
  { share: 1, weight: 1 },
  { share: 1 / 3, weight: 0.2 },
  { share: 3, weight: 0.2 },
]
/** A degree counts as much as this many decibels. */
const DECIBELS_PER_DEGREE = 0.3
/** What a decibel away from the wanted gain costs, in the share of the margin targets. */
const GAIN_COST = 0.01

/**
 * The values that the options allow.
 * @throws DesignError 'invalid-document' at the options whose limits leave nothing.
 */
export function stockOf(options: CompensatorOptions): Stock {
  const { limits, ownResistors, ownCapacitors, resistorSeries, capacitorSeries } = options
  const { smallestResistance, largestResistance, smallestCapacitance, largestCapacitance } = limits
  const resistors = ownResistors
    ? ownValues(ownResistors, smallestResistance, largestResistance)
    : preferredValues(resistorSeries, smallestResistance, largestResistance)
  const capacitors = ownCapacitors
    ? ownValues(ownCapacitors, smallestCapacitance, largestCapacitance)
    : preferredValues(capacitorSeries, smallestCapacitance, largestCapacitance)
  for (const [list, field] of [
    [resistors, ownResistors ? 'options.ownResistors' : 'options.limits.smallestResistance'],
    [capacitors, ownCapacitors ? 'options.ownCapacitors' : 'options.limits.smallestCapacitance'],
  ] as const) {
    if (list.length === 0) throw DesignError.at('invalid-document', field, 'The limits leave no value to choose from.')
  }
  return { resistors, capacitors }
}

/** The network in values of the stock that loses least margin at the worst corner. R1 sets the divider and stays. */
export function snapNetwork(
  plants: CornerPlants,
  ideal: SynthesisedNetwork,
  crossover: number, // rad/s
  stock: Stock,
): { readonly parts: PartValues; readonly network: Network } {
  const { targets } = plants.design
  const reference = COMPARED.map(({ share }) => networkGain(ideal.network, share * crossover))
  const ranked = combinations(ideal.parts, stock)
    .map((parts) => {
      const network = buildNetwork(plants.design, { type: ideal.type, parts })
      return { parts, network, ...departure(network, reference, crossover) }
    })
    .sort((a, b) => a.cost - b.cost)
    .slice(0, TRIED_AT_CORNERS)
  const enough = quickMargins(plants, ideal.network, targets).slack
  const valued = ranked.map((candidate) => {
    const { slack } = quickMargins(plants, candidate.network, targets)
    // More margin than the computed network had is not sought: it would be bought with bandwidth.
    return { ...candidate, value: Math.min(slack, enough) - GAIN_COST * candidate.gainError }
  })
  const { parts, network } = valued.reduce((best, candidate) => (candidate.value > best.value ? candidate : best))
  return { parts, network }
}

/** How far a network is from the computed one around crossover. */
function departure(network: Network, reference: readonly Complex[], crossover: number) {
  let cost = 0
  let gainError = 0
  COMPARED.forEach(({ share, weight }, i) => {
    const ratio = divide(networkGain(network, share * crossover), reference[i]!)
    const decibels = Math.abs(20 * Math.log10(modulus(ratio)))
    if (share === 1) gainError = decibels
    cost += weight * (decibels + DECIBELS_PER_DEGREE * Math.abs(argumentDeg(ratio)))
  })
  return { cost, gainError }
}

function combinations(ideal: PartValues, stock: Stock): PartValues[] {
  const { R1, R2, R3, C1, C2, C3 } = ideal
  const feedback = branchCombinations(R2, C1!, stock)
  const across = C3 === undefined ? [null] : branchCombinations(R3, C3, stock)
  const straight = C2 === undefined ? [undefined] : straightValues(C2, stock)
  return feedback.flatMap(([r2, c1]) =>
    straight.flatMap((c2) =>
      across.map((lead) => ({
        R1,
        ...(r2 !== undefined && { R2: r2 }),
        C1: c1,
        ...(c2 !== undefined && { C2: c2 }),
        ...(lead && { R3: lead[0], C3: lead[1] }),
      })),
    ),
  )
}

/** Series branches of a resistor (or none, in type I) and a capacitor near the computed ones. */
function branchCombinations(R: number | undefined, C: number, stock: Stock): [number | undefined, number][] {
  return nearestValues(stock.capacitors, C, NEAR_CAPACITORS).flatMap((c): [number | undefined, number][] => {
    if (R === undefined) return [[undefined, c]]
    const near = nearestValues(stock.resistors, R, NEAR_RESISTORS)
    const compensating = nearestValues(stock.resistors, (R * C) / c, COMPENSATING_RESISTORS)
    return [...new Set([...near, ...compensating])].map((r) => [r, c])
  })
}

/** C2 may be left out when it comes out smaller than the smallest that may be fitted. */
function straightValues(C2: number, stock: Stock): (number | undefined)[] {
  const near = nearestValues(stock.capacitors, C2, NEAR_CAPACITORS)
  return C2 < stock.capacitors[0]! ? [undefined, ...near] : near
}
