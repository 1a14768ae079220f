/** The plant at every corner of line and load, evaluated once and then shared by all networks that are tried on it. */
import type { DesignDocument } from '../document'
import { argumentDeg, type Complex } from '../numeric/complex'
import { openPlant, type OpenPlant } from '../plant'

const PER_DECADE = 40
const LOWEST_SHARE = 1e-5 // of the switching frequency

export interface CornerPlant {
  readonly lineVoltage: number // V
  readonly outputCurrent: number // A
  readonly plant: OpenPlant
  /** Control to output at ω in rad/s, from the switched model; asked again it is not computed again. */
  readonly gainAt: (omega: number) => Complex
  /** The same at the frequencies of the set. */
  readonly samples: readonly Complex[]
}

export interface CornerPlants {
  readonly design: DesignDocument
  /** rad/s, ascending up to half the switching frequency. */
  readonly omegas: Float64Array
  /** Nominal line at full load comes first. */
  readonly corners: readonly [CornerPlant, ...CornerPlant[]]
}

/**
 * Opens the plant at lowest, nominal and highest line, at full and at least load.
 * @throws DesignError when a corner cannot be reached or computed.
 */
export function openCorners(design: DesignDocument): CornerPlants {
  const { line, output, switchingFrequency } = design
  const omegas = sampleFrequencies(switchingFrequency)
  const lines = new Set([line.nominal, line.minimum, line.maximum])
  const loads = new Set([output.currentMaximum, output.currentMinimum])
  const open = (lineVoltage: number, outputCurrent: number): CornerPlant => {
    const plant = openPlant(design, { lineVoltage, outputCurrent })
    const gainAt = remembered((omega) => plant.switched(omega).controlToOutput)
    return { lineVoltage, outputCurrent, plant, gainAt, samples: Array.from(omegas, gainAt) }
  }
  const nominal = open(line.nominal, output.currentMaximum)
  const others = [...lines].flatMap((lineVoltage) =>
    [...loads]
      .filter((load) => lineVoltage !== line.nominal || load !== output.currentMaximum)
      .map((load) => open(lineVoltage, load)),
  )
  return { design, omegas, corners: [nominal, ...others] }
}

function sampleFrequencies(switchingFrequency: number): Float64Array {
  const lowest = 2 * Math.PI * LOWEST_SHARE * switchingFrequency
  const highest = Math.PI * switchingFrequency
  const steps = Math.ceil(Math.log10(highest / lowest) * PER_DECADE)
  return Float64Array.from({ length: steps + 1 }, (_, i) => lowest * (highest / lowest) ** (i / steps))
}

function remembered(compute: (omega: number) => Complex): (omega: number) => Complex {
  const known = new Map<number, Complex>()
  return (omega) => {
    const found = known.get(omega)
    if (found) return found
    const value = compute(omega)
    known.set(omega, value)
    return value
  }
}

/** Phase of a corner's plant in degrees at `omega`, followed without jumps from low frequency. */
export function plantPhase({ omegas }: CornerPlants, corner: CornerPlant, omega: number): number {
  let phase = 0
  const follow = (gain: Complex) => {
    const step = argumentDeg(gain) - phase
    phase += step - 360 * Math.round(step / 360)
  }
  for (let i = 0; i < omegas.length && omegas[i]! < omega; i++) follow(corner.samples[i]!)
  follow(corner.gainAt(omega))
  return phase
}

/** Poles of the open loop in the right half plane, such as a constant-power load can cause. */
export const unstablePoles = ({ plant }: CornerPlant): number =>
  plant.poles.filter((pole) => pole.halfPlane === 'right').length
