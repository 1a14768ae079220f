/**
 * One reduction for every circuit: a list of elements becomes the state equations
 *   ẋ = A·x + B·u,   measures = C·x + D·u
 * with inductor currents and capacitor voltages as states. With inductors as current sources and capacitors as voltage
 * sources the rest is a resistive network, solved by modified nodal analysis.
 * Source: Ho, Ruehli and Brennan, "The modified nodal approach to network analysis", IEEE Trans. CAS 1975.
 */
import { DesignError } from './errors'
import { solveReal } from './numeric/linearSystem'

/** Constant sources of a power stage, in the order of the columns of B and D. */
export const INPUTS = ['line', 'load', 'drop'] as const
export type Input = (typeof INPUTS)[number]

interface Between {
  readonly from: string
  readonly to: string
}

export type Element =
  /** Voltage from − to = resistance·current + source. Zero ohms is legal: a plain connection. */
  | (Between & { readonly kind: 'branch'; readonly name: string; readonly resistance: number; readonly source?: Input })
  | (Between & { readonly kind: 'conductance'; readonly conductance: number })
  /** Current of the input, flowing through the element from `from` to `to`. */
  | (Between & { readonly kind: 'current-source'; readonly source: Input })
  /** State: current from `from` to `to`, named after the element. */
  | (Between & {
      readonly kind: 'inductor'
      readonly name: string
      readonly inductance: number
      readonly resistance: number
    })
  /** State: voltage of the ideal capacitance, `from` positive; the ESR is in series. */
  | (Between & {
      readonly kind: 'capacitor'
      readonly name: string
      readonly capacitance: number
      readonly esr: number
    })
  /** Ideal: secondary voltage = ratio·primary voltage; the primary takes ratio times the secondary's current. */
  | {
      readonly kind: 'transformer'
      readonly primary: Between
      readonly secondary: Between
      readonly ratio: number
    }

/** Something to read: a voltage between two nodes, or the current of a named branch, inductor or capacitor. */
export type Measure = (Between & { readonly kind: 'voltage' }) | { readonly kind: 'current'; readonly of: string }

export interface StateEquations {
  readonly A: number[][] // n × n, per second
  readonly B: number[][] // n × 3
  /** One row a measure, in the order asked for. A current of an element that is not there is zero. */
  readonly C: number[][]
  readonly D: number[][]
}

export const GROUND = 'ground'

/**
 * Reduces a circuit.
 * @param elements - What conducts in this interval.
 * @param states - Names of inductors and capacitors, in the order of x. A state whose element is absent is held.
 * @throws DesignError 'singular-network' if currents and voltages are not unique.
 */
export function reduceNetwork(
  elements: readonly Element[],
  states: readonly string[],
  measures: readonly Measure[],
): StateEquations {
  const nodes = numberNodes(elements)
  const branches = elements.filter((e) => e.kind === 'branch' || e.kind === 'capacitor' || e.kind === 'transformer')
  const size = nodes.size + branches.length
  const n = states.length
  const width = n + INPUTS.length
  const matrix = new Float64Array(size * size)
  const right = new Float64Array(size * width)
  const currentRow = new Map<string, number>() // name of a branch or capacitor → its unknown

  const addTo = (row: number | undefined, column: number | undefined, value: number) => {
    if (row !== undefined && column !== undefined) matrix[row * size + column]! += value
  }
  const drive = (row: number | undefined, column: number, value: number) => {
    if (row !== undefined) right[row * width + column]! += value
  }

  for (const element of elements) {
    if (element.kind === 'transformer') continue
    const from = nodes.get(element.from)
    const to = nodes.get(element.to)
    if (element.kind === 'conductance') {
      addTo(from, from, element.conductance)
      addTo(to, to, element.conductance)
      addTo(from, to, -element.conductance)
      addTo(to, from, -element.conductance)
    } else if (element.kind === 'current-source' || element.kind === 'inductor') {
      const column = element.kind === 'inductor' ? states.indexOf(element.name) : n + INPUTS.indexOf(element.source)
      drive(from, column, -1) // leaves the node, so it stands on the other side of Kirchhoff's sum
      drive(to, column, 1)
    }
  }
  branches.forEach((element, i) => {
    const row = nodes.size + i
    if (element.kind === 'transformer') {
      // The unknown is the secondary's current out of its positive end.
      const { primary, secondary, ratio } = element
      const ends = [
        [secondary.from, 1],
        [secondary.to, -1],
        [primary.from, -ratio],
        [primary.to, ratio],
      ] as const
      for (const [node, weight] of ends) {
        addTo(row, nodes.get(node), weight)
        addTo(nodes.get(node), row, -weight)
      }
      return
    }
    const from = nodes.get(element.from)
    const to = nodes.get(element.to)
    currentRow.set(element.name, row)
    addTo(from, row, 1)
    addTo(to, row, -1)
    addTo(row, from, 1)
    addTo(row, to, -1)
    if (element.kind === 'capacitor') {
      addTo(row, row, -element.esr)
      drive(row, states.indexOf(element.name), 1)
    } else {
      addTo(row, row, -element.resistance)
      if (element.source) drive(row, n + INPUTS.indexOf(element.source), 1)
    }
  })

  if (!solveReal(matrix, size, right, width)) {
    throw new DesignError(
      'singular-network',
      'The circuit has no unique currents and voltages: two ideal parts fight each other, or a part has no path for its current.',
      [],
    )
  }

  /** Coefficients of one unknown over [x, u]; ground is zero. */
  const rowOf = (unknown: number | undefined): Float64Array =>
    unknown === undefined ? new Float64Array(width) : right.subarray(unknown * width, (unknown + 1) * width)
  const voltage = (from: string, to: string): number[] => {
    const low = rowOf(nodes.get(to))
    return Array.from(rowOf(nodes.get(from)), (value, j) => value - low[j]!)
  }

  const derivatives = states.map(() => new Array<number>(width).fill(0))
  for (const element of elements) {
    if (element.kind === 'inductor') {
      const index = states.indexOf(element.name)
      const row = voltage(element.from, element.to)
      row[index]! -= element.resistance
      derivatives[index] = row.map((value) => value / element.inductance)
    } else if (element.kind === 'capacitor') {
      derivatives[states.indexOf(element.name)] = Array.from(
        rowOf(currentRow.get(element.name)),
        (value) => value / element.capacitance,
      )
    }
  }
  const readings = measures.map((measure) => {
    if (measure.kind === 'voltage') return voltage(measure.from, measure.to)
    const unknown = currentRow.get(measure.of)
    if (unknown !== undefined) return Array.from(rowOf(unknown))
    const row = new Array<number>(width).fill(0)
    const inductor = elements.some((e) => e.kind === 'inductor' && e.name === measure.of)
    if (inductor) row[states.indexOf(measure.of)] = 1
    return row
  })
  return {
    A: derivatives.map((row) => row.slice(0, n)),
    B: derivatives.map((row) => row.slice(n)),
    C: readings.map((row) => row.slice(0, n)),
    D: readings.map((row) => row.slice(n)),
  }
}

function numberNodes(elements: readonly Element[]): Map<string, number> {
  const nodes = new Map<string, number>()
  const see = (node: string) => {
    if (node !== GROUND && !nodes.has(node)) nodes.set(node, nodes.size)
  }
  for (const element of elements) {
    const pairs = element.kind === 'transformer' ? [element.primary, element.secondary] : [element]
    for (const pair of pairs) {
      see(pair.from)
      see(pair.to)
    }
  }
  return nodes
}
