/** The elements that several topologies share, built from the design document. */
import type { DesignDocument } from '../document'
import type { Element } from '../network'

export const switchBetween = (design: DesignDocument, from: string, to: string): Element => ({
  kind: 'branch',
  name: 'switch',
  from,
  to,
  resistance: design.switch.onResistance,
})

/** Conducting: forward voltage in series with the on-resistance, from anode to cathode. */
export const rectifierBetween = (design: DesignDocument, anode: string, cathode: string): Element => ({
  kind: 'branch',
  name: 'rectifier',
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

/** Effective output capacitance, all banks: F. */
export const totalCapacitance = (design: DesignDocument): number =>
  design.outputCapacitors.reduce((sum, bank) => sum + bank.count * bank.capacitance, 0)
