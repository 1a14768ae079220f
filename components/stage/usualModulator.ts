import type { DesignDocument } from '@/converters/document'
import type { OperatingPoint } from '@/converters/results'
import type { ModulatorKind } from '@/hooks/draft/edits'

const RAMP = 1 // V
/** V at the comparator at the switch's peak current: above noise, below a controller's usual limit of 1 V. */
const SENSED_PEAK = 0.4
/** Of the sensed down-slope: half is what holds at every duty cycle, the rest covers parts and line. */
const SLOPE_SHARE = 0.8

/** Modulator figures to begin with, from the currents at the present operating point. Common practice, no source. */
export function usualModulator(
  design: DesignDocument,
  point: OperatingPoint,
  kind: ModulatorKind,
): DesignDocument['modulator'] {
  if (kind === 'voltage-mode') return { kind, rampAmplitude: RAMP }
  const currentSenseResistance = twoDigits(SENSED_PEAK / point.switchCurrent.peak)
  const fall = (point.inductorCurrent.ripple * design.switchingFrequency) / point.rectifierDuty
  const slopeCompensation = twoDigits(SLOPE_SHARE * currentSenseResistance * fall * throughSwitch(design))
  return { kind, currentSenseResistance, slopeCompensation }
}

/** A/A: current in the switch for each ampere of ripple in the first inductor. */
function throughSwitch({ topology, inductor, secondInductor, transformer }: DesignDocument): number {
  if (topology === 'forward') return transformer?.turnsRatio ?? 1
  // Both inductors' currents meet in the switch, and both see the same voltage.
  const isCoupled = topology === 'sepic' || topology === 'cuk'
  return isCoupled && secondInductor ? 1 + inductor.inductance / secondInductor.inductance : 1
}

const twoDigits = (value: number) => Number(value.toPrecision(2))
