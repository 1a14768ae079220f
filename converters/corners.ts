/** The loop at every corner of line and load, read from the switched model. */
import { checkedFrequencies, marginsOf } from './analysis'
import { fittedNetwork } from './compensators/fitted'
import { networkGain } from './compensators/networks'
import type { DesignDocument } from './document'
import { DesignError } from './errors'
import { multiply } from './numeric/complex'
import { openPlant, rightHalfPlaneZero, type PlantPoint } from './plant'
import { curve, defaultFrequencies } from './responseCurve'
import type { CornerSet } from './results'

export interface CornerOptions {
  /** Hz; 160 from 10 Hz to half the switching frequency unless given. */
  readonly frequencies?: readonly number[] | undefined
}

const DEFAULT_FREQUENCIES = 160

/** Lowest, nominal and highest line at lowest and highest load; equal values once. */
export function lineAndLoadCorners({ line, output }: DesignDocument): PlantPoint[] {
  const lines = [...new Set([line.nominal, line.minimum, line.maximum])]
  const loads = [...new Set([output.currentMaximum, output.currentMinimum])]
  return loads.flatMap((outputCurrent) => lines.map((lineVoltage) => ({ lineVoltage, outputCurrent })))
}

/**
 * @throws DesignError 'invalid-compensator' when the document has no network, or that of the first corner which cannot be
 * reached.
 */
export function cornersOf(design: DesignDocument, options: CornerOptions = {}): CornerSet {
  const network = fittedNetwork(design)
  if (!network) {
    throw DesignError.at(
      'invalid-compensator',
      'compensator',
      'Corners of the loop need a compensator; propose or enter one first.',
    )
  }
  const frequencies = options.frequencies
    ? checkedFrequencies(design, options.frequencies)
    : defaultFrequencies(design.switchingFrequency, DEFAULT_FREQUENCIES)
  const corners = lineAndLoadCorners(design).map((point) => {
    const plant = openPlant(design, point)
    const loop = frequencies.map((frequency) => {
      const omega = 2 * Math.PI * frequency
      return multiply(plant.switched(omega).controlToOutput, networkGain(network, omega))
    })
    return {
      ...point,
      conduction: plant.orbit.conduction,
      dutyCycle: plant.orbit.dutyCycle,
      margins: marginsOf(plant, network, 'switched'),
      loop: curve(loop),
      poles: plant.poles,
      rightHalfPlaneZero: rightHalfPlaneZero(plant.zeros),
    }
  })
  /** An unstable corner is worse than any margin; a loop without a crossover cannot be short of phase. */
  const rank = ({ margins }: (typeof corners)[number]) =>
    margins.isStable ? (margins.phaseMargin ?? Infinity) : -Infinity
  const worst = corners.reduce((least, corner, i) => (rank(corner) < rank(corners[least]!) ? i : least), 0)
  return { frequencies, corners, worst }
}
