/** What a topology file has to say; everything else follows from the reduction in network.ts. */
import type { DesignDocument } from '../document'
import type { Element, Measure } from '../network'

/** The design at one line voltage and load current: what closed forms and starting guesses are made of. */
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
  /** Inductor states, the one that stands still when conduction stops first. */
  readonly inductors: readonly string[]
  /** Capacitor states beside the output banks. */
  readonly capacitors: readonly string[]
  /** Voltages across the open switch and the blocking rectifier, positive when they block. */
  readonly stress: { readonly switch: Measure; readonly rectifier: Measure }
  /** Textbook results with ideal parts, for insight beside the exact ones. */
  readonly closedForms: {
    readonly continuous: (point: TopologyPoint, dutyCycle: number) => IdealContinuous
    readonly discontinuous: ((point: TopologyPoint) => IdealDiscontinuous) | null
  }
}

/** Erickson and Maksimović, Fundamentals of Power Electronics, 2nd ed. 2001, table 8.2, for an ideal converter. */
export interface IdealContinuous {
  readonly controlGain: number // V per unit of duty, G_d0
  readonly controlGainEquation: string
  readonly lineGain: number // V/V, G_g0
  readonly lineGainEquation: string
  readonly resonance: number // rad/s, ω₀
  readonly resonanceEquation: string
  readonly quality: number // Q
  readonly qualityEquation: string
  readonly rightHalfPlaneZero: number | null // rad/s, ω_z
  readonly rightHalfPlaneZeroEquation: string
}

/** The same book, table 11.3: low-frequency model in discontinuous conduction. */
export interface IdealDiscontinuous {
  readonly controlGain: number // V per unit of duty
  readonly controlGainEquation: string
  readonly lineGain: number // V/V
  readonly pole: number // rad/s
  readonly poleEquation: string
}
