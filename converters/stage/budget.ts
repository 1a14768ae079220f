/**
 * What the currents and voltages of a stage at full load ask of its parts, from the ideal conversion ratio with the
 * rectifier's drop: good enough to choose parts by; the exact operating point follows from the whole document.
 * Source of the ratios and ripples: Erickson and Maksimović, Fundamentals of Power Electronics, 2nd ed. 2001, chapter 2.
 */
import type { StageRequirements } from '../stageRequirements'

/** V; a Schottky diode's usual drop. */
const DIODE_DROP = 0.5

export interface StagePoint {
  readonly dutyCycle: number
  /** Mean of the inductor current at full load, A. */
  readonly inductorCurrent: number
  /** Voltage across the inductor while the switch is on, V. */
  readonly onVoltage: number
  /** The same while it is off, as a magnitude, V. */
  readonly offVoltage: number
}

export const rectifierDrop = ({ rectifier }: StageRequirements): number => (rectifier === 'diode' ? DIODE_DROP : 0)

/** The stage at one line voltage and full load. */
export function stageAt(requirements: StageRequirements, lineVoltage: number): StagePoint {
  const { topology, output } = requirements
  const drop = rectifierDrop(requirements)
  if (topology === 'boost') {
    const dutyCycle = 1 - lineVoltage / (output.voltage + drop)
    return {
      dutyCycle,
      inductorCurrent: output.currentMaximum / (1 - dutyCycle),
      onVoltage: lineVoltage,
      offVoltage: output.voltage + drop - lineVoltage,
    }
  }
  return {
    dutyCycle: (output.voltage + drop) / (lineVoltage + drop),
    inductorCurrent: output.currentMaximum,
    onVoltage: lineVoltage - output.voltage,
    offVoltage: output.voltage + drop,
  }
}

/** Inductor current, peak to peak, of an inductance of 1 H; divide by L. */
export const unitRipple = ({ dutyCycle, onVoltage }: StagePoint, switchingFrequency: number): number =>
  (onVoltage * dutyCycle) / switchingFrequency

/** Line voltage at which ripple is largest beside the mean inductor current. */
export function worstRippleLine({ topology, line, output }: StageRequirements): number {
  if (topology === 'buck') return line.maximum
  // A boost's ripple over its input current goes as V²·(1 − V/Vout), which peaks at two thirds of the output.
  return Math.min(line.maximum, Math.max(line.minimum, (2 / 3) * output.voltage))
}

/** Lowest right-half-plane zero of a boost stage, Hz: D′²·R/(2πL) (the same book, table 8.2). */
function lowestRightHalfPlaneZero(requirements: StageRequirements, inductance: number): number | null {
  if (requirements.topology !== 'boost') return null
  const { dutyCycle } = stageAt(requirements, requirements.line.minimum)
  const load = requirements.output.voltage / requirements.output.currentMaximum
  return ((1 - dutyCycle) ** 2 * load) / (2 * Math.PI * inductance)
}

/** Crossover that the output capacitors are chosen for: a tenth of switching, a quarter of the right-half-plane zero. */
export function assumedCrossover(requirements: StageRequirements, inductance: number): number {
  const zero = lowestRightHalfPlaneZero(requirements, inductance) ?? Infinity
  return Math.min(requirements.switchingFrequency / 10, zero / 4)
}
