/**
 * The power stage of a design at one line voltage and load current, as one linear circuit an interval: the switch on,
 * the rectifier conducting, and (where conduction can stop) neither.
 */
import { effectiveCapacitance, type DesignDocument } from './document'
import { DesignError } from './errors'
import { GROUND, INPUTS, reduceNetwork, type Element, type Measure } from './network'
import { TOPOLOGY_DEFINITIONS } from './topologies'
import type { TopologyDefinition } from './topologies/topology'

/** Rows of the measures that every interval carries; the currents of the output banks follow. */
export const MEASURES = {
  outputVoltage: 0,
  switchCurrent: 1,
  rectifierCurrent: 2,
  lineCurrent: 3, // drawn from the line source
  inductorCurrent: 4,
  switchVoltage: 5,
  rectifierVoltage: 6,
  firstBank: 7,
} as const

export interface Interval {
  readonly A: number[][]
  readonly B: number[][]
  /** Row m of C and D reads measure m of `MEASURES`. */
  readonly C: number[][]
  readonly D: number[][]
}

export interface Circuit {
  readonly design: DesignDocument
  readonly topology: TopologyDefinition
  readonly lineVoltage: number // V
  readonly outputCurrent: number // A
  readonly period: number // s
  readonly states: readonly string[]
  /** Index of the state that stops when conduction stops. */
  readonly stoppingState: number
  /** With one inductor, discontinuous conduction can be computed; with more it is only detected. */
  readonly canStop: boolean
  /** Constant inputs: line voltage, load source current, rectifier drop, and what a closed loop adds. */
  readonly inputs: readonly number[]
  /** How much of the control voltage comes from states and inputs, as rows; nothing while the loop is open. */
  readonly control: { readonly overStates: readonly number[]; readonly overInputs: readonly number[] }
  readonly on: Interval
  readonly off: Interval
  readonly idle: Interval
  /** Pieces of the output capacitance as states see them; `banks` lists which banks of the document each one holds. */
  readonly outputStates: readonly {
    readonly capacitance: number
    readonly esr: number
    readonly banks: readonly number[]
  }[]
}

/** @throws DesignError 'singular-network', or 'invalid-document' where the topology needs a part that is not there. */
export function buildCircuit(design: DesignDocument, lineVoltage: number, outputCurrent: number): Circuit {
  const topology = TOPOLOGY_DEFINITIONS[design.topology]
  const outputStates = mergeBanks(design)
  const { positive, negative } = topology.output
  const load = linearLoad(design, outputCurrent)
  const filter = filterElements(design.inputFilter)
  const supply = filter.length > 0 ? 'supply' : 'line'
  const common: Element[] = [
    { kind: 'branch', name: 'source', from: supply, to: GROUND, resistance: 0, source: 'line' },
    ...filter,
    ...topology.always(design),
    ...outputStates.map(({ capacitance, esr }, i): Element => {
      return { kind: 'capacitor', name: `output${i}`, from: positive, to: negative, capacitance, esr }
    }),
    { kind: 'conductance', from: positive, to: negative, conductance: load.conductance },
    { kind: 'current-source', from: positive, to: negative, source: 'load' },
  ]
  const filterStates = filter.map(({ name }) => name)
  const states = [
    ...topology.inductors,
    ...topology.capacitors,
    ...outputStates.map((_, i) => `output${i}`),
    ...filterStates,
  ]
  const measures: Measure[] = [
    { kind: 'voltage', from: positive, to: negative },
    { kind: 'current', of: 'switch' },
    { kind: 'current', of: 'rectifier' },
    { kind: 'current', of: 'source' },
    { kind: 'current', of: topology.inductors[0]! },
    topology.stress.switch ?? { kind: 'voltage', from: GROUND, to: GROUND },
    topology.stress.rectifier,
    ...outputStates.map((_, i): Measure => ({ kind: 'current', of: `output${i}` })),
  ]
  const reduce = (elements: readonly Element[]): Interval => {
    const reduced = reduceNetwork(elements, states, measures)
    // The source's branch current flows into its positive end; what the line delivers is its negative.
    reduced.C[MEASURES.lineCurrent] = reduced.C[MEASURES.lineCurrent]!.map((value) => -value)
    reduced.D[MEASURES.lineCurrent] = reduced.D[MEASURES.lineCurrent]!.map((value) => -value)
    return reduced
  }
  return {
    design,
    topology,
    lineVoltage,
    outputCurrent,
    period: 1 / design.switchingFrequency,
    states,
    stoppingState: 0,
    canStop: topology.inductors.length === 1,
    inputs: [lineVoltage, load.current, design.rectifier.forwardVoltage],
    control: { overStates: states.map(() => 0), overInputs: INPUTS.map(() => 0) },
    on: reduce([...common, ...topology.on(design)]),
    off: reduce([...common, ...topology.off(design)]),
    // With no current there is no voltage across the inductor, so it reads as a plain connection and its state stands.
    idle: reduce(
      common.map((element) =>
        element.kind === 'inductor' && topology.inductors.includes(element.name) ? connection(element) : element,
      ),
    ),
    outputStates,
  }
}

function connection({ name, from, to }: { name: string; from: string; to: string }): Element {
  return { kind: 'branch', name: `${name}, at rest`, from, to, resistance: 0 }
}

/** Banks without ESR sit on the same voltage, so together they are one state; every other bank is its own. */
function mergeBanks(design: DesignDocument): Circuit['outputStates'] {
  const pieces = design.outputCapacitors.map((bank, index) => ({
    capacitance: bank.count * effectiveCapacitance(bank),
    esr: bank.esr / bank.count,
    banks: [index],
  }))
  const ideal = pieces.filter((piece) => piece.esr === 0)
  const real = pieces.filter((piece) => piece.esr > 0)
  if (ideal.length === 0) return real
  const capacitance = ideal.reduce((sum, piece) => sum + piece.capacitance, 0)
  return [{ capacitance, esr: 0, banks: ideal.flatMap((piece) => piece.banks) }, ...real]
}

/** The load as a conductance in parallel with a current source, linear about the mean output voltage. */
export function linearLoad(
  { load, output }: DesignDocument,
  current: number,
): { conductance: number; current: number } {
  switch (load) {
    case 'resistive':
      return { conductance: current / output.voltage, current: 0 }
    case 'constant-current':
      return { conductance: 0, current }
    case 'constant-power':
      // i = P/v ≈ 2P/V − v·P/V²
      return { conductance: -current / output.voltage, current: 2 * current }
  }
}

type FilterElement = Extract<Element, { kind: 'inductor' | 'capacitor' }>

/** Inductor from the supply to the line node, capacitor there, and the damping branch where it is fitted. */
function filterElements(filter: DesignDocument['inputFilter']): FilterElement[] {
  if (!filter) return []
  const { inductance, resistance, capacitance, esr, dampingCapacitance, dampingResistance } = filter
  const elements: FilterElement[] = [
    { kind: 'inductor', name: 'filterInductor', from: 'supply', to: 'line', inductance, resistance },
    { kind: 'capacitor', name: 'filterCapacitor', from: 'line', to: GROUND, capacitance, esr },
  ]
  if (!dampingCapacitance) return elements
  if (!dampingResistance) {
    throw DesignError.at(
      'invalid-document',
      'inputFilter.dampingResistance',
      'A damping capacitor without its resistor damps nothing; give the resistor a value above zero.',
    )
  }
  const damping = { from: 'line', to: GROUND, capacitance: dampingCapacitance, esr: dampingResistance }
  return [...elements, { kind: 'capacitor', name: 'filterDamping', ...damping }]
}

/** States to start a search from: output voltages and line as they should be, currents as the power asks. */
export function roughState({ states, design, lineVoltage, outputCurrent }: Circuit): Float64Array {
  return Float64Array.from(states, (state) => {
    if (state.startsWith('output')) return design.output.voltage
    if (state === 'filterInductor') return (design.output.voltage * outputCurrent) / lineVoltage
    return state.startsWith('filter') ? lineVoltage : 0
  })
}
