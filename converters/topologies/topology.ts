/** What a topology file has to say; everything else follows from the reduction in network.ts. */
import type { DesignDocument } from '../document'
import type { Element, Measure } from '../network'

/** The design at one line voltage and load current: what closed forms are made of. */
export interface TopologyPoint {
  readonly design: DesignDocument
  readonly lineVoltage: number // V
  readonly outputCurrent: number // A
}

export interface TopologyDefinition {
  /** Elements that are there in every interval, the line source and the output excluded. */
  readonly always: (design: DesignDocument) => readonly Element[]
  /** The element named `switch`, and what else conducts only while it is on. */
  readonly on: (design: DesignDocument) => readonly Element[]
  /** The element named `rectifier`, and what else conducts only while the switch is off. */
  readonly off: (design: DesignDocument) => readonly Element[]
  /** Nodes of the output, positive first. An inverting stage has ground first: its output is a magnitude. */
  readonly output: { readonly positive: string; readonly negative: string }
  /** Inductor states. With a single one, that is the current which stops in discontinuous conduction. */
  readonly inductors: readonly string[]
  /** Capacitor states beside the output banks. */
  readonly capacitors: readonly string[]
  /**
   * Voltages across the open switch and the blocking rectifier, positive when they block. The switch's is null where it
   * hangs on a part that the document does not describe.
   */
  readonly stress: { readonly switch: Measure | null; readonly rectifier: Measure }
  /** Textbook results with ideal parts, for insight beside the exact ones. */
  readonly closedForms: {
    readonly continuous: (point: TopologyPoint, dutyCycle: number) => IdealContinuous
    readonly discontinuous: ((point: TopologyPoint) => IdealDiscontinuous) | null
  }
}

export interface Formula {
  readonly value: number
  readonly equation: string
}

/** Erickson and Maksimović, Fundamentals of Power Electronics, 2nd ed. 2001, table 8.2, for an ideal converter. */
export interface IdealContinuous {
  readonly controlGain: Formula // V per unit of duty, G_d0
  readonly lineGain: Formula // V/V, G_g0
  /** Null where the stage is not of second order. */
  readonly filter: { readonly resonance: Formula /* rad/s */; readonly quality: Formula } | null
  readonly rightHalfPlaneZero: Formula | null // rad/s
}

/** The same book, table 11.3: low-frequency model in discontinuous conduction. */
export interface IdealDiscontinuous {
  readonly controlGain: Formula // V per unit of duty
  readonly lineGain: Formula // V/V
  readonly pole: Formula // rad/s
}
