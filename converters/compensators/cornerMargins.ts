/** Margins of one network at nominal and at the worst corner of line and load, read exactly from the switched model. */
import { multiply } from '../numeric/complex'
import { readMargins } from '../loop/margins'
import type { CornerMargins, MarginSummary } from '../results'
import { unstablePoles, type CornerPlant, type CornerPlants } from './cornerPlants'
import { networkGain, type Network } from './networks'
import { marginSlack } from './quickMargins'

export interface ReadCorner extends MarginSummary {
  readonly lineVoltage: number // V
  readonly outputCurrent: number // A
}

/** One reading a corner, nominal first. */
export function readCorners({ design, corners }: CornerPlants, network: Network): [ReadCorner, ...ReadCorner[]] {
  const read = (corner: CornerPlant): ReadCorner => {
    const margins = readMargins(
      (omega) => multiply(corner.gainAt(omega), networkGain(network, omega)),
      design.switchingFrequency,
      { landmarks: lightlyDamped(corner), unstablePoles: unstablePoles(corner) },
    )
    const { crossover, phaseMargin, gainMargin, modulusMargin, isStable } = margins
    const { lineVoltage, outputCurrent } = corner
    return { lineVoltage, outputCurrent, crossover, phaseMargin, gainMargin, modulusMargin, isStable }
  }
  const [nominal, ...others] = corners
  return [read(nominal), ...others.map(read)]
}

/** Nominal and the corner with the least margin beside its target. */
export function summariseCorners(read: readonly [ReadCorner, ...ReadCorner[]], plants: CornerPlants): CornerMargins {
  const { targets } = plants.design
  const worst = read.reduce((least, corner) =>
    marginSlack(corner, targets) < marginSlack(least, targets) ? corner : least,
  )
  const { lineVoltage: _line, outputCurrent: _load, ...nominal } = read[0]
  return { nominal, worst }
}

/** Hz of poles so lightly damped that the gain peaks there. */
const lightlyDamped = ({ plant }: CornerPlant): number[] =>
  plant.poles.filter((pole) => pole.imaginary > 0 && (pole.quality ?? 0) > 2).map((pole) => pole.frequency)
