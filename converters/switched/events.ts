/**
 * What happens at the switching instants when the orbit is disturbed. A segment ends when a surface h(x, u, v, t) = 0
 * is reached; a disturbance moves that instant by
 *   δt = −(h_x·x̂ + h_u·û − v̂)/ḣ
 * and leaves the state displaced by (f_before − f_after)·δt.
 * Source: Verghese, Elbuluk and Kassakian, "A general approach to sampled-data modeling for power electronic
 * circuits", IEEE Trans. Power Electronics 1986.
 */
import { MEASURES, type Circuit, type Interval } from '../circuit'
import { DesignError } from '../errors'
import { derivative, dot } from './flow'
import type { Orbit } from './orbit'

export interface SwitchingEvent {
  /** Gradients of the surface over states and inputs; the control voltage enters with weight −`control`. */
  readonly stateGradient: Float64Array
  readonly inputGradient: Float64Array
  /** 1 for the comparator's event, 0 for the rectifier's. */
  readonly control: 0 | 1
  /** ḣ along the flow before the event, per second. */
  readonly rate: number
  /** f_before − f_after, the state's displacement per second of delay. */
  readonly displacement: Float64Array
}

/**
 * The events at the ends of all segments but the last, whose end is the clock's.
 * @throws DesignError 'no-operating-point' if a surface is not crossed but only touched.
 */
export function eventsOf(circuit: Circuit, orbit: Orbit): SwitchingEvent[] {
  const { inputs } = circuit
  return orbit.segments.slice(0, -1).map((before, k) => {
    const after = orbit.segments[k + 1]!
    const fBefore = derivative(before.interval, before.end, inputs)
    const fAfter = derivative(after.interval, after.start, inputs)
    const surface = k === 0 ? comparatorSurface(circuit) : rectifierSurface(circuit.off)
    const rate = surface.ownRate + dot(surface.stateGradient, fBefore)
    if (k === 0 ? !(rate > 0) : !(rate < 0)) throw notCrossed(k === 0)
    return {
      stateGradient: surface.stateGradient,
      inputGradient: surface.inputGradient,
      control: k === 0 ? 1 : 0,
      rate,
      displacement: fBefore.map((value, i) => value - fAfter[i]!),
    }
  })
}

/** Ramp, or sensed switch current plus slope compensation, minus what the control voltage follows by itself. */
function comparatorSurface({ design: { modulator }, on, period, control }: Circuit) {
  const resistance = modulator.kind === 'voltage-mode' ? 0 : modulator.currentSenseResistance
  const against = (sensed: readonly number[], followed: readonly number[]) =>
    Float64Array.from(followed, (value, j) => (sensed[j] ?? 0) * resistance - value)
  return {
    stateGradient: against(on.C[MEASURES.switchCurrent]!, control.overStates),
    inputGradient: against(on.D[MEASURES.switchCurrent]!, control.overInputs),
    ownRate: modulator.kind === 'voltage-mode' ? modulator.rampAmplitude / period : modulator.slopeCompensation,
  }
}

/** The rectifier's current reaching zero. */
function rectifierSurface(off: Interval) {
  return {
    stateGradient: Float64Array.from(off.C[MEASURES.rectifierCurrent]!),
    inputGradient: Float64Array.from(off.D[MEASURES.rectifierCurrent]!),
    ownRate: 0,
  }
}

function notCrossed(isComparator: boolean): DesignError {
  return isComparator
    ? DesignError.at(
        'no-operating-point',
        'modulator',
        'The sensed current with its slope compensation does not rise where the switch should turn off, so no comparator can end the pulse there. Inductance and output capacitance may resonate near the switching frequency.',
      )
    : DesignError.at(
        'no-operating-point',
        'inductor.inductance',
        'The rectifier current does not fall where it should reach zero. Inductance and output capacitance may resonate near the switching frequency.',
      )
}
