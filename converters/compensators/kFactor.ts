/**
 * The K-factor method: zeros as far below crossover as the poles are above it, so that the phase boost peaks there.
 *
 *   type II    K = tan(boost/2 + 45°)     zero at f/K,   pole at f·K
 *   type III   K = tan²(boost/4 + 45°)    zeros at f/√K, poles at f·√K
 *
 * Boost is what the network adds to the −90° of an integrator. Source: H. Dean Venable, "The K factor: a new mathematical
 * tool for stability analysis and synthesis", Proceedings of Powercon 10, 1983.
 */
import type { CompensatorType } from '../document'
import { argumentDeg, modulus } from '../numeric/complex'
import { networkGain, type AmplifierSetting, type Network } from './networks'
import {
  amplifierTooSlow,
  idealNetwork,
  largestLeadRatio,
  synthesisProblem,
  type CrossoverGain,
  type Placement,
  type Synthesis,
} from './placement'

/** Degrees that each type can add at most; it gets there only with zeros and poles infinitely far apart. */
export const LARGEST_BOOST: Readonly<Record<CompensatorType, number>> = { I: 0, II: 90, III: 180 }

const BOOST_TOLERANCE = 1e-8 // degrees
const GAIN_TOLERANCE = 1e-10
const MOST_CORRECTIONS = 80
/** R3 of a transconductance amplifier's lead vanishes at the limit of its divider; stay this far from it. */
const LEAD_RATIO_SHARE = 0.9

export interface CrossoverTarget extends CrossoverGain {
  readonly boostDeg: number
}

const tangentDeg = (angle: number): number => Math.tan((angle * Math.PI) / 180)

/** K of a type for a boost in degrees; type I has none. */
export function kFactor(type: 'II' | 'III', boostDeg: number): number {
  return type === 'II' ? tangentDeg(boostDeg / 2 + 45) : tangentDeg(boostDeg / 4 + 45) ** 2
}

/** What a network adds to an integrator's −90°, in (−180°, 180°]. */
export function boostOf(network: Network, omega: number): number {
  const boost = argumentDeg(networkGain(network, omega)) + 90
  return boost > 180 ? boost - 360 : boost
}

/**
 * The network whose exact gain and phase at crossover are the wanted ones. What the amplifier's bandwidth or output
 * resistance take away is asked for in addition, until both are right.
 * @returns a problem in words if the type cannot give the boost with this amplifier. Type I gives its gain alone.
 */
export function kFactorNetwork(
  setting: AmplifierSetting,
  upperResistance: number,
  type: CompensatorType,
  wanted: CrossoverTarget,
): Synthesis {
  const { omega, gain, boostDeg } = wanted
  let asked = { gain, boostDeg: type === 'I' ? 0 : boostDeg }
  for (let i = 0; i < MOST_CORRECTIONS; i++) {
    const placement = placementFor(setting, type, omega / (2 * Math.PI), asked.boostDeg)
    if (placement === null) return synthesisProblem(boostOutOfReach(type, boostDeg, asked.boostDeg))
    const synthesis = idealNetwork(setting, upperResistance, placement, { omega, gain: asked.gain })
    if (synthesis.kind === 'problem') return synthesis
    const gainRatio = gain / modulus(networkGain(synthesis.network, omega))
    const missing = type === 'I' ? 0 : boostDeg - boostOf(synthesis.network, omega)
    if (Math.abs(gainRatio - 1) < GAIN_TOLERANCE && Math.abs(missing) < BOOST_TOLERANCE) return synthesis
    asked = { gain: asked.gain * gainRatio, boostDeg: asked.boostDeg + missing }
  }
  return synthesisProblem(amplifierTooSlow(wanted))
}

function boostOutOfReach(type: CompensatorType, wanted: number, asked: number): string {
  const lag = asked - wanted
  const amplifier = lag > 1 ? `, and the amplifier itself takes ${lag.toFixed(0)}° at crossover` : ''
  return `A type ${type} network with this amplifier cannot add the ${wanted.toFixed(0)}° that are needed${amplifier}.`
}

/** Zeros and poles for a boost at frequency `f` (Hz), or null if the type has no such boost. */
function placementFor(setting: AmplifierSetting, type: CompensatorType, f: number, boostDeg: number): Placement | null {
  if (type === 'I') return { main: null, lead: null }
  // With no boost at all zero and pole would cancel and their capacitor vanish.
  if (!(boostDeg > 0 && boostDeg < LARGEST_BOOST[type])) return null
  if (type === 'II') {
    const K = kFactor('II', boostDeg)
    return { main: { zero: f / K, pole: f * K }, lead: null }
  }
  const K = kFactor('III', boostDeg)
  const ratio = Math.min(K, LEAD_RATIO_SHARE * largestLeadRatio(setting))
  if (ratio <= 1) return null
  // Where the divider limits the lead, the main pair makes up for it.
  const spread = Math.sqrt(ratio)
  const leadBoost = (2 * Math.atan(spread) * 180) / Math.PI - 90
  const mainBoost = boostDeg - leadBoost
  if (!(mainBoost > 0 && mainBoost < LARGEST_BOOST.II)) return null
  const main = kFactor('II', mainBoost)
  return { main: { zero: f / main, pole: f * main }, lead: { zero: f / spread, pole: f * spread } }
}
