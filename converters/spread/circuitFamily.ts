/**
 * Circuits that differ only in inductances, capacitances, ESR, line and load, from one reduction of their network.
 *
 * An inductance or capacitance divides its own row of state equations. A changed ESR is a voltage δ·i added to the
 * capacitor's state, a changed load a current δG·v added to the load's: with z = (i of each capacitor, v of the output)
 * read off as z = Zx·x + Zu·u, the change feeds back as z = Zx·x + Zu·u + M·z, so that z = (I − M)⁻¹·(Zx·x + Zu·u), and
 * every other row takes its share of it.
 * Source: Woodbury, "Inverting modified matrices", Princeton Statistical Research Group memorandum 42, 1950.
 */
import { buildCircuit, linearLoad, MEASURES, type Circuit, type Interval } from '../circuit'
import { effectiveCapacitance, type DesignDocument } from '../document'
import { INPUTS } from '../network'
import { solveReal } from '../numeric/linearSystem'
import type { PlantPoint } from '../plant'

const LOAD = INPUTS.indexOf('load')

interface CapacitorValue {
  readonly capacitance: number
  readonly esr: number
}

interface CapacitorState {
  readonly state: number
  readonly base: CapacitorValue
  readonly valueIn: (design: DesignDocument) => CapacitorValue
}

/** What a member has that the base has not. */
interface Change {
  /** What each state's rate is multiplied by. */
  readonly rates: readonly number[]
  /** Ω, one a capacitor. */
  readonly esr: readonly number[]
  readonly conductance: number // S
}

/** Thousands of members are made one after another; larger arrays of their own would keep the garbage collector busy. */
interface Scratch {
  readonly z: Float64Array
  readonly feedback: Float64Array
}

/**
 * @param base - any member of the family.
 * @param measures - how many of the measures, from the first, its members have.
 * @returns the circuit of another member, whose document differs from the base's in nothing that shapes the network otherwise.
 */
export function circuitFamily(
  base: Circuit,
  measures = base.on.C.length,
): (design: DesignDocument, point: PlantPoint) => Circuit {
  const capacitors = capacitorStates(base)
  const baseLoad = linearLoad(base.design, base.outputCurrent)
  const ports = capacitors.length + 1
  const scratch: Scratch = {
    z: new Float64Array(ports * (base.states.length + base.inputs.length)),
    feedback: new Float64Array(ports * ports),
  }
  const stops = base.canStop && base.design.rectifier.kind === 'diode'
  return function member(design, { lineVoltage, outputCurrent }) {
    const load = linearLoad(design, outputCurrent)
    const values = capacitors.map(({ valueIn }) => valueIn(design))
    const change: Change = {
      rates: base.states.map((name, state) => {
        const capacitor = capacitors.findIndex((candidate) => candidate.state === state)
        if (capacitor >= 0) return capacitors[capacitor]!.base.capacitance / values[capacitor]!.capacitance
        return inductanceRatio(base.design, design, name)
      }),
      esr: capacitors.map((capacitor, k) => values[k]!.esr - capacitor.base.esr),
      conductance: load.conductance - baseLoad.conductance,
    }
    const on = changed(base.on, measures, capacitors, change, scratch)
    const off = changed(base.off, measures, capacitors, change, scratch)
    const idle = stops ? changed(base.idle, measures, capacitors, change, scratch) : base.idle
    if (!on || !off || !idle) return buildCircuit(design, lineVoltage, outputCurrent)
    return {
      ...base,
      design,
      lineVoltage,
      outputCurrent,
      inputs: [lineVoltage, load.current, ...base.inputs.slice(2)],
      on,
      off,
      idle,
      outputStates: base.outputStates.map((state) => ({ ...state, ...bankValue(design, state.banks) })),
    }
  }
}

function capacitorStates({ design, states, outputStates }: Circuit): CapacitorState[] {
  const found: CapacitorState[] = outputStates.map((base, k) => ({
    state: states.indexOf(`output${k}`),
    base,
    valueIn: (other) => bankValue(other, base.banks),
  }))
  const coupling = states.indexOf('couplingCapacitor')
  if (coupling >= 0) {
    found.push({ state: coupling, base: design.couplingCapacitor!, valueIn: (other) => other.couplingCapacitor! })
  }
  return found
}

/** Banks that share a state have no ESR. */
function bankValue({ outputCapacitors }: DesignDocument, banks: readonly number[]): CapacitorValue {
  let capacitance = 0
  for (const index of banks)
    capacitance += outputCapacitors[index]!.count * effectiveCapacitance(outputCapacitors[index]!)
  const first = outputCapacitors[banks[0]!]!
  return { capacitance, esr: first.esr / first.count }
}

function inductanceRatio(base: DesignDocument, design: DesignDocument, state: string): number {
  switch (state) {
    case 'inductor':
      return base.inductor.inductance / design.inductor.inductance
    case 'secondInductor':
      return base.secondInductor!.inductance / design.secondInductor!.inductance
    default:
      return 1
  }
}

/** One interval after the change; null where the changed network has no unique answer. */
function changed(
  { A, B, C, D }: Interval,
  measures: number,
  capacitors: readonly CapacitorState[],
  { rates, esr, conductance }: Change,
  { z, feedback }: Scratch,
): Interval | null {
  const n = A.length
  const width = n + B[0]!.length
  const ports = capacitors.length + 1
  const last = ports - 1
  // Coefficients over [x, u] of the current of capacitor p, or of the output voltage.
  for (let p = 0; p < ports; p++) {
    const capacitor = capacitors[p]
    const scale = capacitor ? capacitor.base.capacitance : 1
    const overStates = capacitor ? A[capacitor.state]! : C[MEASURES.outputVoltage]!
    const overInputs = capacitor ? B[capacitor.state]! : D[MEASURES.outputVoltage]!
    for (let j = 0; j < n; j++) z[p * width + j] = scale * overStates[j]!
    for (let j = n; j < width; j++) z[p * width + j] = scale * overInputs[j - n]!
  }
  for (let p = 0; p < ports; p++) {
    for (let q = 0; q < last; q++) feedback[p * ports + q] = -z[p * width + capacitors[q]!.state]! * esr[q]!
    feedback[p * ports + last] = -z[p * width + n + LOAD]! * conductance
    feedback[p * ports + p]! += 1
  }
  if (!solveReal(feedback, ports, z, width)) return null
  const changedA: number[][] = []
  const changedB: number[][] = []
  const changedC: number[][] = []
  const changedD: number[][] = []
  /** A row of the base, with its share of what z feeds back. */
  for (let row = 0; row < n + measures; row++) {
    const isState = row < n
    const states = (isState ? A[row]! : C[row - n]!).slice()
    const inputs = (isState ? B[row]! : D[row - n]!).slice()
    const loadShare = inputs[LOAD]! * conductance
    for (let p = last; p >= 0; p--) {
      const share = p === last ? loadShare : (isState ? A[row]! : C[row - n]!)[capacitors[p]!.state]! * esr[p]!
      if (share === 0) continue
      for (let j = 0; j < n; j++) states[j]! += share * z[p * width + j]!
      for (let j = n; j < width; j++) inputs[j - n]! += share * z[p * width + j]!
    }
    if (isState) {
      const rate = rates[row]!
      for (let j = 0; j < n; j++) states[j]! *= rate
      for (let j = 0; j < inputs.length; j++) inputs[j]! *= rate
    }
    ;(isState ? changedA : changedC).push(states)
    ;(isState ? changedB : changedD).push(inputs)
  }
  return { A: changedA, B: changedB, C: changedC, D: changedD }
}
