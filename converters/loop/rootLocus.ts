/**
 * Where the closed-loop poles go as the loop gain is scaled: the averaged plant with its network, whose output is
 * multiplied by a factor from a hundredth to a hundred. Poles are followed from one gain to the next, so that each branch
 * is one line.
 * Source: Evans, "Control system synthesis by root locus method", Trans. AIEE 1950.
 */
import { fittedNetwork } from '../compensators/fitted'
import { networkStateSpace } from '../compensators/networks'
import type { DesignDocument } from '../document'
import { DesignError } from '../errors'
import type { Complex } from '../numeric/complex'
import { eigenvalues } from '../numeric/eigen'
import { openPlant, type PlantPoint } from '../plant'
import type { RootLocus } from '../results'
import { closeLoop } from './closedLoop'

/** Decibels on each side of the present gain, and points a decade of gain. */
const REACH = 40
const STEP = 1

export function rootLocusOf(design: DesignDocument, point: PlantPoint): RootLocus {
  const network = fittedNetwork(design)
  if (!network) {
    throw DesignError.at(
      'invalid-compensator',
      'compensator',
      'A root locus needs a compensator; propose or enter one first.',
    )
  }
  const { model } = openPlant(design, point)
  const amplifier = networkStateSpace(network)
  const polesAt = (gainDb: number) => {
    const factor = 10 ** (gainDb / 20)
    const scaled = (rows: number[][]) => rows.map((row) => row.map((value) => value * factor))
    return eigenvalues(closeLoop(model, { ...amplifier, C: scaled(amplifier.C), D: scaled(amplifier.D) }).A)
  }
  const gainsDb = Array.from({ length: (2 * REACH) / STEP + 1 }, (_, i) => -REACH + i * STEP)
  let previous: Complex[] | null = null
  const rows = gainsDb.map((gainDb) => {
    previous = previous === null ? polesAt(gainDb) : followed(previous, polesAt(gainDb))
    return previous
  })
  const stable = (row: readonly Complex[]) => row.every(({ re }) => re < 0)
  return {
    gainsDb,
    branches: rows[0]!.map((_, k) => rows.map((row) => ({ real: row[k]!.re, imaginary: row[k]!.im }))),
    present: gainsDb.indexOf(0),
    stableRange: rangeAround(gainsDb, rows.map(stable)),
  }
}

/** The new poles in the order of the old ones they lie nearest to, distances taken as shares of |s|. */
function followed(before: readonly Complex[], after: readonly Complex[]): Complex[] {
  const free = [...after]
  return before.map((old) => {
    const distance = (pole: Complex) =>
      Math.hypot(pole.re - old.re, pole.im - old.im) / (Math.hypot(old.re, old.im) + Math.hypot(pole.re, pole.im))
    const nearest = free.reduce((best, pole, i) => (distance(pole) < distance(free[best]!) ? i : best), 0)
    return free.splice(nearest, 1)[0]!
  })
}

/** Gain in dB down to and up to which the loop stays stable around the present one; null where it is not stable there. */
function rangeAround(gainsDb: readonly number[], isStable: readonly boolean[]): RootLocus['stableRange'] {
  const present = gainsDb.indexOf(0)
  if (!isStable[present]) return null
  const above = isStable.findIndex((stable, i) => i > present && !stable)
  const below = isStable.findLastIndex((stable, i) => i < present && !stable)
  return { lowestDb: below < 0 ? null : gainsDb[below + 1]!, highestDb: above < 0 ? null : gainsDb[above - 1]! }
}
