/**
 * The input filter against the converter. The loop with the filter in place is exact already: the filter's parts are part
 * of the circuit. Here is why it changes: the filter's output impedance beside the converter's input impedance, with the
 * output held still by the control (Z_N) and with the control held still (Z_D). While both are much larger the filter
 * hardly touches the loop.
 * Source: Middlebrook, "Input filter considerations in design and application of switching regulators", IEEE IAS 1976.
 */
import { MEASURES } from './circuit'
import { networkGain, type Network } from './compensators/networks'
import type { DesignDocument } from './document'
import { add, complex, decibels, divide, modulus, multiply, subtract, type Complex } from './numeric/complex'
import { openPlant, type PlantPoint } from './plant'
import type { InputFilterCheck } from './results'
import { curve, defaultFrequencies } from './responseCurve'
import { measureResponses } from './switched/response'

const POINTS = 160
/** The filter stays this many times below the converter: common practice, no source. */
const DISTANCE = 2

type Filter = NonNullable<DesignDocument['inputFilter']>

export function checkInputFilter(
  design: DesignDocument,
  point: PlantPoint,
  network: Network | null,
): InputFilterCheck | null {
  const { inputFilter } = design
  if (!inputFilter) return null
  const plant = openPlant({ ...design, inputFilter: null }, point)
  const lineCurrent = measureResponses(plant.circuit, plant.orbit, MEASURES.lineCurrent)
  const frequencies = defaultFrequencies(design.switchingFrequency, POINTS)
  const rows = frequencies.map((frequency) => {
    const omega = 2 * Math.PI * frequency
    const output = plant.switched(omega)
    const current = lineCurrent(omega)
    const openAdmittance = current.toLine
    // The control that keeps the output still while the line moves by one volt.
    const holding = divide(output.lineToOutput, output.controlToOutput)
    const nullAdmittance = subtract(current.toLine, multiply(current.toControl, holding))
    const loop = network && multiply(output.controlToOutput, networkGain(network, omega))
    return {
      filter: filterImpedance(inputFilter, omega),
      open: divide(complex(1), openAdmittance),
      null: divide(complex(1), nullAdmittance),
      closed: loop && closedLoopImpedance(openAdmittance, nullAdmittance, loop),
    }
  })
  const converter = rows.map((row) => Math.min(modulus(row.open), modulus(row.null)))
  const distances = (filter: Filter) =>
    frequencies.map((f, i) => converter[i]! / modulus(filterImpedance(filter, 2 * Math.PI * f)))
  const ratios = distances(inputFilter)
  const least = ratios.reduce((best, ratio, i) => (ratio < ratios[best]! ? i : best), 0)
  const margin = 20 * Math.log10(ratios[least]!)
  const closed = rows.flatMap((row) => (row.closed ? [row.closed] : []))
  return {
    frequencies,
    filterImpedance: curve(rows.map((row) => row.filter)),
    nullImpedance: curve(rows.map((row) => row.null)),
    openLoopImpedance: curve(rows.map((row) => row.open)),
    closedLoopImpedance: closed.length > 0 ? curve(closed) : null,
    margin,
    marginFrequency: frequencies[least]!,
    suggestion:
      margin >= decibels(complex(DISTANCE))
        ? null
        : suggestDamping(inputFilter, (filter) => Math.min(...distances(filter)) >= DISTANCE),
  }
}

/** 1/Z = T/(1 + T)/Z_N + 1/(1 + T)/Z_D. */
function closedLoopImpedance(openAdmittance: Complex, nullAdmittance: Complex, loop: Complex): Complex {
  const sum = add(multiply(loop, nullAdmittance), openAdmittance)
  return divide(complex(1 + loop.re, loop.im), sum)
}

/** Inductor, capacitor and damping branch in parallel, Ω. */
export function filterImpedance(filter: Filter, omega: number): Complex {
  const inductor = divide(complex(1), complex(filter.resistance, omega * filter.inductance))
  const capacitor = divide(complex(1), complex(filter.esr, -1 / (omega * filter.capacitance)))
  const { dampingCapacitance, dampingResistance } = filter
  const damping = dampingCapacitance
    ? divide(complex(1), complex(dampingResistance ?? 0, -1 / (omega * dampingCapacitance)))
    : complex(0)
  return divide(complex(1), add(add(inductor, capacitor), damping))
}

/**
 * Optimum damping by a resistor and a capacitor of n times the filter's in parallel, R = R₀·Q with
 * Q = √((4 + 3n)(2 + n)/(2n²(4 + n))): the smallest n that keeps the filter far enough, or the largest that is tried.
 * Source: Erickson and Maksimović 2001, section 10.4 (from memory; its peak, R₀·√(2(2 + n))/n, is checked in the tests).
 */
export function suggestDamping(
  filter: Filter,
  isFarEnough: (damped: Filter) => boolean,
): NonNullable<InputFilterCheck['suggestion']> {
  const characteristic = Math.sqrt(filter.inductance / filter.capacitance)
  const withRatio = (n: number) => ({
    dampingCapacitance: n * filter.capacitance,
    dampingResistance: characteristic * Math.sqrt(((4 + 3 * n) * (2 + n)) / (2 * n * n * (4 + n))),
  })
  const ratio = RATIOS.find((n) => isFarEnough({ ...filter, ...withRatio(n) })) ?? RATIOS.at(-1)!
  return {
    ...withRatio(ratio),
    peakImpedance: (characteristic * Math.sqrt(2 * (2 + ratio))) / ratio,
    source: 'Erickson and Maksimović 2001',
  }
}

/** Damping over filter capacitance, in steps of a tenth of a decade. */
const RATIOS = Array.from({ length: 23 }, (_, i) => 0.5 * 10 ** (i / 10))
