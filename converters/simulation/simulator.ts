/**
 * The closed loop cycle by cycle: power stage, network, comparator, duty limit and the amplifier's limits, piecewise
 * linear and without averaging. Between switching instants every step is exact.
 */
import { MEASURES, type Interval } from '../circuit'
import { dot } from '../switched/flow'
import { BIAS, TARGET, type ClosedCircuit } from './closedCircuit'
import { createStepper, LEVELS, type Stepper } from './stepper'

/** Coarse steps in a period. */
const COARSE = 32

/** Steps and phases in a period: some hundreds in the busiest that are in order. */
const MOST_TURNS = 5000

type Phase = 'on' | 'off' | 'idle'
type Amplifier = 'linear' | 'low' | 'high'

export interface Limits {
  readonly control: { readonly low: number; readonly high: number } // V at the amplifier's output
  readonly duty: number
}

/** What one period looked like. */
export interface Cycle {
  readonly meanOutput: number // V
  readonly lowestOutput: number
  readonly highestOutput: number
  readonly peakCurrent: number // A, inductor
  readonly control: number // V at the period's end
  readonly duty: number
}

export interface Simulator {
  /** Runs one period with these inputs and returns its summary. @throws {RangeError} if the states run away. */
  readonly run: (inputs: { readonly line: number; readonly extraLoad: number; readonly target: number }) => Cycle
  readonly state: Float64Array
}

export function createSimulator(circuit: ClosedCircuit, start: Float64Array, limits: Limits): Simulator {
  const { period, design, amplifierState, amplifierSign, control: controlRow, stoppingState } = circuit
  const coarse = period / COARSE
  const intervals: Record<Phase, Interval> = { on: circuit.on, off: circuit.off, idle: circuit.idle }
  const finest = coarse / 2 ** (LEVELS - 1)
  const steppers = new Map<string, Stepper>()
  const inputs = Float64Array.from(circuit.inputs)
  const load = inputs[1]!
  let x = Float64Array.from(start)
  let trial = new Float64Array(x.length)
  const slope = new Float64Array(x.length)
  const isDiode = design.rectifier.kind === 'diode' && circuit.canStop
  const { modulator } = design
  const resistance = modulator.kind === 'voltage-mode' ? 0 : modulator.currentSenseResistance
  const rampRate = modulator.kind === 'voltage-mode' ? modulator.rampAmplitude / period : modulator.slopeCompensation
  const row = (phase: Phase, measure: number) => {
    const { C, D } = intervals[phase]
    return { c: Float64Array.from(C[measure]!), d: Float64Array.from(D[measure]!) }
  }
  const measured = ({ c, d }: { c: Float64Array; d: Float64Array }, state: Float64Array) =>
    dot(c, state) + dot(d, inputs)
  const overStates = Float64Array.from(controlRow.overStates)
  const outputRows = {
    on: row('on', MEASURES.outputVoltage),
    off: row('off', MEASURES.outputVoltage),
    idle: row('idle', MEASURES.outputVoltage),
  }
  const inductorRow = row('on', MEASURES.inductorCurrent)
  const switchRow = row('on', MEASURES.switchCurrent)
  const rectifierRow = row('off', MEASURES.rectifierCurrent)
  const blockingRow = row('idle', MEASURES.rectifierVoltage)
  let amplifier: Amplifier = 'linear'

  const stepperOf = (phase: Phase): Stepper => {
    const held = amplifier === 'linear' ? null : amplifierState
    const key = `${phase} ${held}`
    const known = steppers.get(key)
    if (known) return known
    const made = createStepper(intervals[phase], coarse, held)
    steppers.set(key, made)
    return made
  }
  const controlAt = (state: Float64Array) => inputs[BIAS]! + dot(overStates, state)
  /** Positive until the phase ends by itself. */
  const guard = (phase: Phase, state: Float64Array, sinceClock: number): number => {
    if (phase === 'on') return controlAt(state) - resistance * measured(switchRow, state) - rampRate * sinceClock
    if (phase === 'off') return isDiode ? measured(rectifierRow, state) : 1
    // Blocking voltage and forward drop gone: the rectifier takes up current again.
    return measured(blockingRow, state) + design.rectifier.forwardVoltage
  }

  /** Puts the amplifier at its limit, or takes it off it when its own currents lead back. */
  function limitAmplifier(phase: Phase): void {
    const level = controlAt(x)
    if (amplifier === 'linear') {
      if (level > limits.control.high) hold('high', limits.control.high)
      else if (level < limits.control.low) hold('low', limits.control.low)
      return
    }
    const kept = amplifier
    amplifier = 'linear'
    stepperOf(phase).slope(x, inputs, slope)
    const rising = slope[amplifierState]! * amplifierSign > 0
    if (rising === (kept === 'high')) amplifier = kept
  }

  function hold(side: Amplifier, level: number): void {
    amplifier = side
    x[amplifierState] = (level - inputs[BIAS]!) * amplifierSign
  }

  return {
    get state() {
      return x
    },
    run({ line, extraLoad, target }) {
      inputs[0] = line
      inputs[1] = load + extraLoad
      inputs[TARGET] = target
      let t = 0
      let phase: Phase = guard('on', x, 0) > 0 ? 'on' : afterPulse()
      let onTime = 0
      let integral = 0
      let lowest = Infinity
      let highest = -Infinity
      let peak = -Infinity
      let before = measured(outputRows[phase], x)
      const look = (width: number, output: number) => {
        integral += ((before + output) / 2) * width
        lowest = Math.min(lowest, output)
        highest = Math.max(highest, output)
        peak = Math.max(peak, phase === 'idle' ? 0 : measured(inductorRow, x))
        before = output
      }
      /** Where the phase is left at the latest, after the clock. */
      const deadline = () => (phase === 'on' ? limits.duty * period : period)
      for (let turns = 0; ; turns++) {
        // States beyond the range of numbers end no phase, and currents near nothing may end them all at once.
        if (turns > MOST_TURNS) throw new RangeError('a period does not end')
        limitAmplifier(phase)
        const stepper = stepperOf(phase)
        let level = 0
        let ended = false
        // The widest step that stays before both the deadline and the guard's crossing; then on from there.
        for (; level < LEVELS; level++) {
          const width = coarse / 2 ** level
          if (t + width > deadline() + 1e-9 * width) continue
          stepper.step(level, x, inputs, trial)
          if (guard(phase, trial, t + width) > 0) {
            const kept = x
            x = trial
            trial = kept
            t += width
            look(width, measured(outputRows[phase], x))
            break
          }
          ended = true
        }
        if (level < LEVELS) continue
        const isDeadline = !ended
        if (isDeadline) {
          // What is left is shorter than the finest step.
          advanceBy(stepper, deadline() - t)
          t = deadline()
        }
        if (phase === 'on') {
          onTime = t
          phase = afterPulse()
        } else if (isDeadline) break
        else if (phase === 'off') {
          x[stoppingState] = 0
          phase = 'idle'
        } else {
          phase = 'off'
          // From no current at all the rectifier needs a moment to carry some; without it the phases would chase each other.
          advanceBy(stepperOf(phase), finest)
          t += finest
        }
        before = measured(outputRows[phase], x)
        look(0, before)
      }
      return {
        meanOutput: integral / period,
        lowestOutput: lowest,
        highestOutput: highest,
        peakCurrent: peak,
        control: controlAt(x),
        duty: onTime / period,
      }
    },
  }

  /** Off if the rectifier has current to carry, else idle. */
  function afterPulse(): Phase {
    return isDiode && measured(rectifierRow, x) <= 0 && guard('idle', x, 0) > 0 ? 'idle' : 'off'
  }

  function advanceBy(stepper: Stepper, width: number): void {
    if (!(width > 0)) return
    stepper.slope(x, inputs, slope)
    for (let i = 0; i < x.length; i++) x[i]! += slope[i]! * width
  }
}
