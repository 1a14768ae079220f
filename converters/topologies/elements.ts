/** The elements that several topologies share, built from the design document. */
import { effectiveCapacitance, type DesignDocument } from '../document'
import { DesignError } from '../errors'
import { GROUND, type Element } from '../network'
import type { TopologyPoint } from './topology'

export const switchBetween = (design: DesignDocument, from: string, to: string): Element => ({
  kind: 'branch',
  name: 'switch',
  from,
  to,
  resistance: design.switch.onResistance,
})

/** Conducting: forward voltage in series with the on-resistance, from anode to cathode. */
export const rectifierBetween = (
  design: DesignDocument,
  anode: string,
  cathode: string,
  name = 'rectifier',
): Element => ({
  kind: 'branch',
  name,
  from: anode,
  to: cathode,
  resistance: design.rectifier.onResistance,
  source: 'drop',
})

export const inductorBetween = (design: DesignDocument, from: string, to: string): Element => ({
  kind: 'inductor',
  name: 'inductor',
  from,
  to,
  ...design.inductor,
})

/** @throws DesignError 'invalid-document' if the document leaves it out. */
export function secondInductorBetween({ secondInductor, topology }: DesignDocument, from: string, to: string): Element {
  const inductance = secondInductor?.inductance ?? 0
  if (!(inductance > 0)) throw needed(topology, 'secondInductor.inductance', 'a second inductor')
  return { kind: 'inductor', name: 'secondInductor', from, to, inductance, resistance: secondInductor!.resistance }
}

/** @throws DesignError 'invalid-document' if the document leaves it out. */
export function couplingCapacitorBetween(design: DesignDocument, from: string, to: string): Element {
  const capacitance = design.couplingCapacitor?.capacitance ?? 0
  if (!(capacitance > 0)) throw needed(design.topology, 'couplingCapacitor.capacitance', 'a coupling capacitor')
  return { kind: 'capacitor', name: 'couplingCapacitor', from, to, capacitance, esr: design.couplingCapacitor!.esr }
}

/** Ns/Np. @throws DesignError 'invalid-document' if the document leaves it out. */
export function turnsRatioOf({ transformer, topology }: DesignDocument): number {
  if (!transformer) throw needed(topology, 'transformer.turnsRatio', 'a transformer')
  return transformer.turnsRatio
}

const needed = (topology: string, field: string, what: string): DesignError =>
  DesignError.at('invalid-document', field, `A ${topology} needs ${what}; give it a value above zero.`)

/** A load side that is ground-referenced and positive. */
export const POSITIVE_OUTPUT = { positive: 'output', negative: GROUND } as const
/** An inverting stage: the output is taken as a magnitude. */
export const NEGATIVE_OUTPUT = { positive: GROUND, negative: 'output' } as const

/** The letters of the closed forms: L, total C, V, R = V/I and M = V/(n·V_g). */
export function letters({ design, lineVoltage, outputCurrent }: TopologyPoint, turnsRatio = 1) {
  const V = design.output.voltage
  return {
    L: design.inductor.inductance,
    C: design.outputCapacitors.reduce((sum, bank) => sum + bank.count * effectiveCapacitance(bank), 0),
    V,
    R: V / outputCurrent,
    M: V / (turnsRatio * lineVoltage),
    switchingFrequency: design.switchingFrequency,
  }
}
