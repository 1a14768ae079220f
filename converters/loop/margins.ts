/**
 * Margins of a loop gain T(jω), read between a millionth and half of the switching frequency: every gain and phase
 * crossing, the closest approach to −1, and whether the curve encircles it.
 */
import { argumentDeg, decibels, modulus, type Complex } from '../numeric/complex'
import { findRoot } from '../numeric/rootFinding'
import type { Crossing, Margins } from '../results'

export type LoopGain = (omega: number) => Complex

export interface MarginOptions {
  /** Frequencies in Hz near which the curve bends sharply, such as those of lightly damped poles. */
  readonly landmarks?: readonly number[]
  /** Poles of the open loop in the right half plane. */
  readonly unstablePoles?: number
}

const PER_DECADE = 40
const LOWEST_SHARE = 1e-6 // of the switching frequency

interface Sample {
  readonly logOmega: number
  readonly omega: number
  readonly gain: Complex
  readonly logGain: number
  /** Degrees, unwrapped from the lowest frequency on. */
  readonly phase: number
}

/** @param switchingFrequency - Hz. */
export function readMargins(loopGain: LoopGain, switchingFrequency: number, options: MarginOptions = {}): Margins {
  const samples = sampleLoop(loopGain, switchingFrequency, options.landmarks ?? [])
  const gainCrossings = findGainCrossings(loopGain, samples)
  const phaseCrossings = findPhaseCrossings(loopGain, samples)
  const closest = closestApproach(loopGain, samples)
  const rising = phaseCrossings.filter(({ margin }) => margin > 0).map(({ margin }) => margin)
  const falling = phaseCrossings.filter(({ margin }) => margin < 0).map(({ margin }) => -margin)
  const phaseMargins = gainCrossings.map(({ margin }) => margin)
  // Gain left at half the switching frequency meets its own sampled image there.
  const isStable = samples.at(-1)!.logGain < 0 && unstableClosedLoopPoles(samples, options.unstablePoles ?? 0) === 0
  return {
    crossover: gainCrossings.at(-1)?.frequency ?? null,
    phaseMargin: smallestPhaseMargin(phaseMargins, isStable),
    gainMargin: rising.length > 0 ? Math.min(...rising) : null,
    gainReductionMargin: falling.length > 0 ? Math.min(...falling) : null,
    modulusMargin: closest.distance,
    modulusMarginFrequency: closest.frequency,
    sensitivityPeak: 1 / closest.distance,
    delayMargin: delayMargin(gainCrossings),
    gainCrossings,
    phaseCrossings,
    isStable,
  }
}

/** A stable loop may cross with its phase ahead of 0°: then −180° is near from the other side, and only size counts. */
function smallestPhaseMargin(margins: readonly number[], isStable: boolean): number | null {
  if (margins.length === 0) return null
  return isStable ? Math.min(...margins.map(Math.abs)) : Math.min(...margins)
}

function sampleLoop(loopGain: LoopGain, switchingFrequency: number, landmarks: readonly number[]): Sample[] {
  const lowest = LOWEST_SHARE * switchingFrequency
  const highest = switchingFrequency / 2
  const steps = Math.ceil(Math.log10(highest / lowest) * PER_DECADE)
  const frequencies = Array.from({ length: steps + 1 }, (_, i) => lowest * (highest / lowest) ** (i / steps))
  for (const landmark of landmarks) {
    for (const share of [0.97, 0.985, 0.993, 0.997, 1, 1.003, 1.007, 1.015, 1.03]) frequencies.push(landmark * share)
  }
  frequencies.sort((a, b) => a - b)
  const samples: Sample[] = []
  let phase = 0
  for (const frequency of frequencies) {
    if (!(frequency >= lowest && frequency <= highest)) continue
    // The searches between two samples run over log ω; both must see the very same value at the ends.
    const logOmega = Math.log(2 * Math.PI * frequency)
    const omega = Math.exp(logOmega)
    const gain = loopGain(omega)
    const principal = argumentDeg(gain)
    phase = samples.length === 0 ? principal : phase + wrap(principal - phase)
    samples.push({ logOmega, omega, gain, logGain: Math.log(modulus(gain)), phase })
  }
  return samples
}

/** Into (−180, 180]. */
const wrap = (degrees: number): number => degrees - 360 * Math.ceil((degrees - 180) / 360)

function crossingAt(omega: number, gain: Complex, margin: number): Crossing {
  return { frequency: omega / (2 * Math.PI), gainDb: decibels(gain), phaseDeg: argumentDeg(gain), margin }
}

function findGainCrossings(loopGain: LoopGain, samples: readonly Sample[]): Crossing[] {
  const crossings: Crossing[] = []
  for (let i = 1; i < samples.length; i++) {
    const [a, b] = [samples[i - 1]!, samples[i]!]
    if (a.logGain > 0 === b.logGain > 0) continue
    const omega = rootInLog(a, b, (w) => Math.log(modulus(loopGain(w))))
    const gain = loopGain(omega)
    crossings.push(crossingAt(omega, gain, wrap(180 + argumentDeg(gain))))
  }
  return crossings
}

function findPhaseCrossings(loopGain: LoopGain, samples: readonly Sample[]): Crossing[] {
  const crossings: Crossing[] = []
  for (let i = 1; i < samples.length; i++) {
    const [a, b] = [samples[i - 1]!, samples[i]!]
    // Half turns passed between the two: phase = 180° + k·360°.
    const before = Math.floor((a.phase - 180) / 360)
    const after = Math.floor((b.phase - 180) / 360)
    if (before === after) continue
    const omega = rootInLog(a, b, (w) => wrap(argumentDeg(loopGain(w)) + 180))
    const gain = loopGain(omega)
    crossings.push(crossingAt(omega, gain, -decibels(gain)))
  }
  return crossings
}

const rootInLog = (low: Sample, high: Sample, f: (omega: number) => number): number =>
  Math.exp(findRoot((logOmega) => f(Math.exp(logOmega)), low.logOmega, high.logOmega, 1e-12))

const distanceToCritical = (gain: Complex): number => Math.hypot(1 + gain.re, gain.im)

/** Least |1 + T|, refined around every dip of the samples that could be the lowest. */
function closestApproach(loopGain: LoopGain, samples: readonly Sample[]): { distance: number; frequency: number } {
  const distances = samples.map(({ gain }) => distanceToCritical(gain))
  const least = Math.min(...distances)
  const dips = samples.flatMap((_, i) => {
    const [before, here, after] = [distances[i - 1] ?? Infinity, distances[i]!, distances[i + 1] ?? Infinity]
    if (here > CANDIDATE * least || here > before || here > after) return []
    return [refineDip(loopGain, samples, i)]
  })
  return dips.reduce((best, dip) => (dip.distance < best.distance ? dip : best))
}

/** How far above the lowest sample the sample of the true lowest dip may lie. */
const CANDIDATE = 1.3

/** Golden sections between the neighbours of a sample. */
function refineDip(
  loopGain: LoopGain,
  samples: readonly Sample[],
  at: number,
): { distance: number; frequency: number } {
  let low = samples[Math.max(0, at - 1)]!.logOmega
  let high = samples[Math.min(samples.length - 1, at + 1)]!.logOmega
  const golden = (Math.sqrt(5) - 1) / 2
  const distance = (logOmega: number) => distanceToCritical(loopGain(Math.exp(logOmega)))
  let left = high - golden * (high - low)
  let right = low + golden * (high - low)
  let atLeft = distance(left)
  let atRight = distance(right)
  while (high - low > 1e-5) {
    if (atLeft < atRight) {
      high = right
      right = left
      atRight = atLeft
      left = high - golden * (high - low)
      atLeft = distance(left)
    } else {
      low = left
      left = right
      atLeft = atRight
      right = low + golden * (high - low)
      atRight = distance(right)
    }
  }
  const best = (low + high) / 2
  const refined = distance(best)
  const { gain, omega } = samples[at]!
  const sampled = distanceToCritical(gain)
  return refined <= sampled
    ? { distance: refined, frequency: Math.exp(best) / (2 * Math.PI) }
    : { distance: sampled, frequency: omega / (2 * Math.PI) }
}

/** Smallest extra delay that uses up the phase above −180° at a crossing. */
function delayMargin(crossings: readonly Crossing[]): number | null {
  if (crossings.length === 0) return null
  const delays = crossings.map(({ frequency, margin }) => (margin < 0 ? margin + 360 : margin) / (360 * frequency))
  return Math.min(...delays)
}

/**
 * Nyquist's count on the sampled half: each half turn of 1 + T about the origin beyond the one that its start allows is
 * a closed-loop pole in the right half plane. N integrators start the curve at −90°·N and are passed on the right by
 * an arc that undoes it; the slope of the gain at the lowest frequencies tells how many there are.
 */
function unstableClosedLoopPoles(samples: readonly Sample[], openLoopUnstable: number): number {
  const [first, second] = [samples[0]!, samples[1]!]
  const slope = (second.logGain - first.logGain) / Math.log(second.omega / first.omega)
  const expected = -90 * Math.max(0, Math.round(-slope))
  const angles = samples.map(({ gain }) => argumentDeg({ re: 1 + gain.re, im: gain.im }))
  const offset = wrap(angles[0]! - expected)
  const turned = angles.reduce((angle, principal) => angle + wrap(principal - angle), expected + offset)
  // A loop gain that is negative at standstill starts half a turn away.
  const start = Math.abs(offset) > 135 ? Math.sign(offset) * 180 : 0
  return openLoopUnstable - Math.round((turned - start) / 180)
}
