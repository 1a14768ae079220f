/**
 * Margins of a candidate network at all corners, read off the shared samples by interpolation: good to tell
 * candidates apart, some microseconds each. What is shown to people is read exactly, by `cornerMargins`.
 */
import type { DesignDocument } from '../document'
import type { Complex } from '../numeric/complex'
import { unstablePoles, type CornerPlant, type CornerPlants } from './cornerPlants'
import { networkGain, type Network } from './networks'

export interface QuickMargins {
  /** How far the worst corner is above the targets, as a share of them: 0 just holds, −1 has no margin left. */
  readonly slack: number
  /** rad/s, the highest over the corners; 0 without one. */
  readonly highestCrossover: number
  /** The least of each margin over the corners; null where none has one. */
  readonly worst: {
    readonly phaseMargin: number | null
    readonly gainMargin: number | null
    readonly isStable: boolean
  }
}

type Targets = DesignDocument['targets']

/** Of an unstable corner: below anything that a stable one can have. */
const UNSTABLE = -2

export function quickMargins(plants: CornerPlants, network: Network, targets: Targets): QuickMargins {
  const { omegas, corners } = plants
  const gains = Array.from(omegas, (omega) => networkGain(network, omega))
  let slack = Infinity
  let highestCrossover = 0
  const worst: { phaseMargin: number | null; gainMargin: number | null; isStable: boolean } = {
    phaseMargin: null,
    gainMargin: null,
    isStable: true,
  }
  for (const corner of corners) {
    const read = readCorner(omegas, gains, corner)
    slack = Math.min(slack, marginSlack(read, targets))
    highestCrossover = Math.max(highestCrossover, read.crossover)
    worst.phaseMargin = least(worst.phaseMargin, read.phaseMargin)
    worst.gainMargin = least(worst.gainMargin, read.gainMargin)
    worst.isStable &&= read.isStable
  }
  return { slack, highestCrossover, worst }
}

const least = (a: number | null, b: number | null): number | null =>
  a === null || b === null ? (a ?? b) : Math.min(a, b)

/** The smaller of both margins, as a share of its target above it; a margin that does not exist cannot be short. */
export function marginSlack(
  margins: { readonly isStable: boolean; readonly phaseMargin: number | null; readonly gainMargin: number | null },
  targets: Targets,
): number {
  if (!margins.isStable) return UNSTABLE
  const share = (margin: number | null, target: number) =>
    margin === null ? Infinity : (margin - target) / Math.max(target, 1)
  return Math.min(
    share(margins.phaseMargin, targets.phaseMargin),
    share(margins.gainMargin, targets.gainMargin),
    // With neither a phase nor a gain crossing nothing limits the loop; a finite figure keeps comparisons simple.
    10,
  )
}

function readCorner(omegas: Float64Array, gains: readonly Complex[], corner: CornerPlant) {
  let phaseMargin: number | null = null
  let gainMargin: number | null = null
  let crossover = 0
  let encirclements = 0
  let beforeRe = 0
  let beforeIm = 0
  let beforeLog = 0
  for (let i = 0; i < omegas.length; i++) {
    const { re: pRe, im: pIm } = corner.samples[i]!
    const { re: gRe, im: gIm } = gains[i]!
    const re = pRe * gRe - pIm * gIm
    const im = pRe * gIm + pIm * gRe
    const log = Math.log(re * re + im * im) / 2
    if (i > 0) {
      if (beforeLog > 0 !== log > 0) {
        const share = beforeLog / (beforeLog - log)
        const angle = Math.atan2(beforeIm, beforeRe)
        const turn = Math.atan2(im * beforeRe - re * beforeIm, re * beforeRe + im * beforeIm)
        const margin = wrapDeg(180 + ((angle + share * turn) * 180) / Math.PI)
        // Of several crossings the nearest to −180° counts, from whichever side.
        phaseMargin = Math.min(phaseMargin ?? Infinity, Math.abs(margin))
        crossover = Math.max(crossover, omegas[i - 1]! * (omegas[i]! / omegas[i - 1]!) ** share)
      }
      if (beforeIm < 0 !== im < 0) {
        const share = beforeIm / (beforeIm - im)
        const real = beforeRe + share * (re - beforeRe)
        // Each passage of the axis left of −1 is half an encirclement there and half at the negative frequencies.
        if (real < -1) encirclements += im < 0 ? -1 : 1
        else if (real < 0) gainMargin = Math.min(gainMargin ?? Infinity, -20 * Math.log10(-real))
      }
    }
    beforeRe = re
    beforeIm = im
    beforeLog = log
  }
  // Gain left at half the switching frequency meets its own sampled image there.
  const isStable = beforeLog < 0 && unstablePoles(corner) + 2 * encirclements === 0
  return { phaseMargin, gainMargin, crossover, isStable }
}

const wrapDeg = (degrees: number): number => degrees - 360 * Math.ceil((degrees - 180) / 360)
