/**
 * Averaged model of discontinuous conduction, full order. The mean inductor current i fixes how long the rectifier
 * conducts, d₂ = 2i/(m₁·d₁·T) − d₁, and during conduction the current's mean is i/(d₁ + d₂). The inductor's own pole,
 * far above the others, stays in the model.
 * Sources: Maksimović and Ćuk, "A unified analysis of PWM converters in discontinuous modes", IEEE Trans. Power
 * Electronics 1991; Vorpérian, "Simplified analysis of PWM converters using model of PWM switch, part II", IEEE Trans.
 * AES 1990; Sun, Mitchell, Greuel, Krein and Bass, "Averaged modeling of PWM converters operating in discontinuous
 * conduction mode", IEEE Trans. Power Electronics 2001 (the correction of the mean current).
 */
import { MEASURES, type Circuit, type Interval } from '../circuit'
import { derivative, dot, read } from '../switched/flow'
import type { LinearModel } from './linearModel'

interface Averages {
  readonly derivatives: Float64Array
  readonly output: number
}

/** Relative step of the central differences below; their error is its square. */
const STEP = 1e-5

/**
 * Linearised about the mean of the orbit, which is the rest point of the averaged equations up to the ripple that they
 * leave out.
 * @param dutyCycle - of the switch.
 * @param rest - mean state of the orbit.
 */
export function discontinuousModel(circuit: Circuit, dutyCycle: number, rest: Float64Array): LinearModel {
  const control = controlFor(circuit, rest, circuit.inputs, dutyCycle)
  const n = rest.length
  const at = (x: ArrayLike<number>, inputs: readonly number[], v: number) =>
    averages(circuit, x, inputs, dutyFor(circuit, x, inputs, v))
  const slope = (size: number, evaluate: (offset: number) => Averages) => {
    const step = STEP * Math.max(Math.abs(size), 1e-6)
    const above = evaluate(step)
    const below = evaluate(-step)
    return {
      state: Array.from(above.derivatives, (value, i) => (value - below.derivatives[i]!) / (2 * step)),
      output: (above.output - below.output) / (2 * step),
    }
  }
  const overStates = Array.from(rest, (value, j) =>
    slope(value, (offset) => at(moved(rest, j, offset), circuit.inputs, control)),
  )
  const [line, load] = circuit.inputs as [number, number]
  const withInput = (input: number, value: number) => circuit.inputs.map((old, k) => (k === input ? value : old))
  const overInputs = [
    slope(control, (offset) => at(rest, circuit.inputs, control + offset)),
    slope(line, (offset) => at(rest, withInput(0, line + offset), control)),
    slope(circuit.outputCurrent, (offset) => at(rest, withInput(1, load + offset), control)),
  ]
  return {
    A: Array.from({ length: n }, (_, i) => overStates.map((s) => s.state[i]!)),
    B: Array.from({ length: n }, (_, i) => overInputs.map((s) => s.state[i]!)),
    C: overStates.map((s) => s.output),
    D: overInputs.map((s) => s.output),
  }
}

const moved = (x: ArrayLike<number>, j: number, offset: number): Float64Array => {
  const copy = Float64Array.from(x)
  copy[j]! += offset
  return copy
}

/** Time derivatives and output, averaged over a period with switch duty d₁. */
function averages(circuit: Circuit, x: ArrayLike<number>, inputs: readonly number[], duty: number): Averages {
  const { on, off, idle, period, stoppingState } = circuit
  const mean = x[stoppingState]!
  const rise = risingSlope(circuit, x, inputs)
  const conducting = (2 * mean) / (rise * duty * period) // d₁ + d₂
  const whileConducting = moved(x, stoppingState, mean / conducting - mean)
  const whileIdle = moved(x, stoppingState, -mean)
  const parts: [Interval, Float64Array, number][] = [
    [on, whileConducting, duty],
    [off, whileConducting, conducting - duty],
    [idle, whileIdle, 1 - conducting],
  ]
  const derivatives = new Float64Array(x.length)
  let output = 0
  for (const [interval, state, share] of parts) {
    derivative(interval, state, inputs).forEach((value, i) => (derivatives[i]! += share * value))
    output += share * read(interval, MEASURES.outputVoltage, state, inputs)
  }
  return { derivatives, output }
}

/** m₁: slope of the inductor current from zero while the switch is on, A/s. */
function risingSlope({ on, stoppingState }: Circuit, x: ArrayLike<number>, inputs: readonly number[]): number {
  const fromZero = moved(x, stoppingState, -x[stoppingState]!)
  return dot(on.A[stoppingState]!, fromZero) + dot(on.B[stoppingState]!, inputs)
}

/** Duty that a control voltage sets: against the ramp, or where the sensed current plus the slope reaches it. */
function dutyFor(circuit: Circuit, x: ArrayLike<number>, inputs: readonly number[], control: number): number {
  return control / comparatorSpan(circuit, x, inputs)
}

function controlFor(circuit: Circuit, x: ArrayLike<number>, inputs: readonly number[], duty: number): number {
  return duty * comparatorSpan(circuit, x, inputs)
}

/** Control voltage per unit of duty, V. */
function comparatorSpan(circuit: Circuit, x: ArrayLike<number>, inputs: readonly number[]): number {
  const { modulator } = circuit.design
  if (modulator.kind === 'voltage-mode') return modulator.rampAmplitude
  const sensed = circuit.on.C[MEASURES.switchCurrent]![circuit.stoppingState]! * modulator.currentSenseResistance
  return (sensed * risingSlope(circuit, x, inputs) + modulator.slopeCompensation) * circuit.period
}
