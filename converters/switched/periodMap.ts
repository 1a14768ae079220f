/**
 * The map that carries a disturbance from one period to the next. Its eigenvalues decide whether the orbit is stable: in
 * peak current mode above half duty, too little slope compensation puts one at or beyond −1, and the current alternates
 * from period to period at half the switching frequency.
 */
import type { Circuit } from '../circuit'
import { modulus } from '../numeric/complex'
import { eigenvalues } from '../numeric/eigen'
import type { PeriodMap } from '../results'
import { eventsOf, type SwitchingEvent } from './events'
import type { Orbit } from './orbit'

/** @returns n × n, over the states of the circuit. */
export function periodMatrix(orbit: Orbit, events: readonly SwitchingEvent[]): number[][] {
  const n = orbit.segments[0]!.start.length
  const columns = Array.from({ length: n }, (_, j) => {
    let x = Array.from({ length: n }, (_, i): number => (i === j ? 1 : 0))
    orbit.segments.forEach(({ transition }, k) => {
      x = x.map((_, i) => x.reduce((sum, value, m) => sum + transition[i * n + m]! * value, 0))
      const event = events[k]
      if (!event) return
      const delay = -x.reduce((sum, value, i) => sum + event.stateGradient[i]! * value, 0) / event.rate
      x = x.map((value, i) => value + event.displacement[i]! * delay)
    })
    return x
  })
  return columns.map((_, i) => columns.map((c) => c[i]!))
}

export function periodMap(circuit: Circuit, orbit: Orbit): PeriodMap {
  const events = eventsOf(circuit, orbit)
  const multipliers = eigenvalues(periodMatrix(orbit, events)).map((value) => ({
    real: value.re,
    imaginary: value.im,
    modulus: modulus(value),
  }))
  const isStable = multipliers.every((multiplier) => multiplier.modulus < 1)
  return { multipliers, isStable, slopeNeeded: isStable ? null : slopeNeeded(circuit, orbit, events[0]!) }
}

/**
 * Slope compensation from which no multiplier lies outside the unit circle, by bisection; the comparator's rate is the
 * only thing that it changes. Null where slope compensation does not help.
 */
function slopeNeeded(circuit: Circuit, orbit: Orbit, comparator: SwitchingEvent): number | null {
  const { modulator } = circuit.design
  if (modulator.kind !== 'peak-current-mode') return null
  const later = eventsOf(circuit, orbit).slice(1)
  const isStableWith = (extra: number) => {
    const matrix = periodMatrix(orbit, [{ ...comparator, rate: comparator.rate + extra }, ...later])
    return eigenvalues(matrix).every((value) => modulus(value) < 1)
  }
  let high = Math.abs(comparator.rate)
  for (let tries = 0; !isStableWith(high); tries++) {
    if (tries === 20) return null
    high *= 2
  }
  let low = 0
  for (let step = 0; step < 40; step++) {
    const middle = (low + high) / 2
    if (isStableWith(middle)) high = middle
    else low = middle
  }
  return modulator.slopeCompensation + high
}
