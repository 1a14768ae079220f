/** Figures of the steady state, read off the orbit. */
import { MEASURES, type Circuit } from './circuit'
import { averageStage } from './averaged/continuous'
import { effectiveCapacitance } from './document'
import { DesignError } from './errors'
import type { CurrentFigures, OperatingPoint } from './results'
import { exponential } from './numeric/exponential'
import { flatten } from './numeric/linearSystem'
import { dot, read } from './switched/flow'
import { findContinuousOrbit, type Orbit, type Segment } from './switched/orbit'
import { buildCircuit } from './circuit'

/** Points in each segment, an even number so that Simpson's rule applies. */
const POINTS = 64

/** Share of the period, for a segment's samples and the value of a measure at each. */
interface Trace {
  readonly duration: number
  readonly values: Float64Array
}

export function describeOperatingPoint(circuit: Circuit, orbit: Orbit): OperatingPoint {
  const { inputs, period, design, lineVoltage, outputCurrent } = circuit
  const states = orbit.segments.map((segment) => sampleStates(segment, inputs))
  const trace = (measure: number): Trace[] =>
    orbit.segments.map((segment, k) => ({
      duration: segment.duration,
      values: Float64Array.from(states[k]!, (x) => read(segment.interval, measure, x, inputs)),
    }))
  const output = extremes(trace(MEASURES.outputVoltage))
  const inductor = trace(MEASURES.inductorCurrent)
  inductor[2]?.values.fill(0)
  const inductorExtremes = extremes(inductor)
  const switchCurrent = trace(MEASURES.switchCurrent)
  const lineCurrent = mean(trace(MEASURES.lineCurrent), period)
  const inputPower = lineVoltage * lineCurrent
  const outputPower = design.output.voltage * outputCurrent
  const turnOff = switchCurrent[0]!.values[POINTS]!
  return {
    lineVoltage,
    outputCurrent,
    dutyCycle: orbit.dutyCycle,
    conduction: orbit.conduction,
    rectifierDuty: orbit.rectifierDuty,
    outputRipple: output.highest - output.lowest,
    inductorCurrent: {
      ...figures(inductor, period),
      valley: inductorExtremes.lowest,
      ripple: inductorExtremes.highest - inductorExtremes.lowest,
    },
    switchCurrent: figures(switchCurrent, period),
    rectifierCurrent: figures(trace(MEASURES.rectifierCurrent), period),
    outputCapacitorRmsCurrent: bankCurrents(circuit, (k) => rms(trace(MEASURES.firstBank + k), period)),
    switchVoltage: circuit.topology.stress.switch && extremes(trace(MEASURES.switchVoltage)).highest,
    rectifierVoltage: extremes(trace(MEASURES.rectifierVoltage)).highest,
    boundaryCurrent: design.rectifier.kind === 'diode' ? boundaryCurrent(circuit) : null,
    controlVoltage: controlVoltage(circuit, orbit, turnOff),
    inputPower,
    efficiency: outputPower / inputPower,
  }
}

/** Comparator input at the turn-off instant. */
function controlVoltage({ design: { modulator }, period }: Circuit, orbit: Orbit, turnOffCurrent: number): number {
  if (modulator.kind === 'voltage-mode') return modulator.rampAmplitude * orbit.dutyCycle
  return modulator.currentSenseResistance * turnOffCurrent + modulator.slopeCompensation * orbit.dutyCycle * period
}

/** States at POINTS + 1 equally spaced instants of a segment. */
function sampleStates({ interval, start, duration }: Segment, inputs: readonly number[]): Float64Array[] {
  const n = start.length
  const size = n + 1
  const extended = new Float64Array(size * size)
  extended.set(
    flatten([...interval.A.map((row, i) => [...row, dot(interval.B[i]!, inputs)]), new Array<number>(size).fill(0)]),
  )
  const step = exponential(extended, size, duration / POINTS)
  const samples = [start]
  for (let k = 0; k < POINTS; k++) {
    const x = samples[k]!
    samples.push(Float64Array.from(x, (_, i) => dot(step.subarray(i * size, i * size + n), x) + step[i * size + n]!))
  }
  return samples
}

const extremes = (traces: readonly Trace[]) => ({
  highest: traces.reduce((most, { values }) => values.reduce((a, b) => Math.max(a, b), most), -Infinity),
  lowest: traces.reduce((least, { values }) => values.reduce((a, b) => Math.min(a, b), least), Infinity),
})

const mean = (traces: readonly Trace[], period: number): number =>
  traces.reduce((sum, { duration, values }) => sum + simpson(values, duration), 0) / period

const rms = (traces: readonly Trace[], period: number): number =>
  Math.sqrt(
    mean(
      traces.map(({ duration, values }) => ({ duration, values: values.map((value) => value * value) })),
      period,
    ),
  )

const figures = (traces: readonly Trace[], period: number): CurrentFigures => ({
  average: mean(traces, period),
  rms: rms(traces, period),
  peak: extremes(traces).highest,
})

function simpson(values: Float64Array, duration: number): number {
  let sum = values[0]! + values[values.length - 1]!
  for (let i = 1; i < values.length - 1; i++) sum += values[i]! * (i % 2 === 1 ? 4 : 2)
  return (sum * duration) / (3 * (values.length - 1))
}

/** RMS current of each bank of the document; banks that share a state share its current by capacitance. */
function bankCurrents(circuit: Circuit, rmsOfState: (k: number) => number): number[] {
  const currents = new Array<number>(circuit.design.outputCapacitors.length).fill(0)
  circuit.outputStates.forEach(({ capacitance, banks }, k) => {
    const whole = rmsOfState(k)
    for (const bank of banks) {
      const piece = circuit.design.outputCapacitors[bank]!
      currents[bank] = (whole * piece.count * effectiveCapacitance(piece)) / capacitance
    }
  })
  return currents
}

/**
 * Load current at which the rectifier's current just touches zero. The ripple hardly depends on the load, so the load
 * is scaled by how far the valley is from zero, until it is there.
 */
function boundaryCurrent(circuit: Circuit): number | null {
  let current = circuit.outputCurrent
  for (let step = 0; step < 6; step++) {
    const here = step === 0 ? circuit : buildCircuit(circuit.design, circuit.lineVoltage, current)
    const orbit = findContinuousOrbit(here)
    if (orbit instanceof DesignError) return null
    const off = orbit.segments[1]!
    const valley = read(off.interval, MEASURES.rectifierCurrent, off.end, here.inputs)
    const middle = dot(rectifierRow(here), averageStage(here, orbit.dutyCycle).rest)
    const next = (current * (middle - valley)) / middle
    if (!(next > 0)) return null
    if (Math.abs(next - current) < 1e-4 * current) return next
    current = next
  }
  return current
}

const rectifierRow = ({ off }: Circuit): number[] => off.C[MEASURES.rectifierCurrent]!
