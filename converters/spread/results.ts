/** What the spread answers. SI units; margins in degrees and decibels. Nothing here is ever NaN. */
import type { DesignErrorCode } from '../errors'
import type { MarginSummary } from '../results'
import type { SpreadGroup, SpreadModel } from './options'

/** One thing that varies. */
export interface VariedQuantity {
  /** Its path in the design document; `line`, `load` and `sense.lowerResistance` are not in it. */
  readonly key: string
  readonly label: string // for people: "ESR of the output capacitors"
  readonly unit: 'H' | 'F' | 'Ω' | 'V' | 'A' | 'Hz' | 'S' | 'V/s' | ''
  readonly group: SpreadGroup
  readonly nominal: number
  readonly low: number // the end of the tolerance or range
  readonly high: number
}

/** Why samples or corners have no margins, with the first of them. */
export interface SpreadFailure {
  readonly code: DesignErrorCode
  readonly message: string
  readonly count: number
  /** In the order of the quantities. */
  readonly values: readonly number[]
}

export interface AppliedTargets {
  readonly phaseMargin: number // degrees
  readonly gainMargin: number // dB
  readonly modulusMargin: number // min |1 + T|
}

/** One corner or sample with the values that made it. */
export interface PlacedMargins {
  readonly lineVoltage: number // V
  readonly outputCurrent: number // A
  readonly margins: MarginSummary
  /** In the order of the quantities. */
  readonly values: readonly number[]
  /** The least margin above its target, as a share of it; 0 just holds, −1 has no margin left, −2 is unstable. */
  readonly slack: number
}

export interface ToleranceCorner extends PlacedMargins {
  readonly dutyCycle: number
  readonly conduction: 'continuous' | 'discontinuous'
}

export interface CornerQuantity extends VariedQuantity {
  /**
   * How far the margins move from one end to the other, each as a share of its target, summed; with everything else at
   * nominal, and line and load where they are worst before tolerances. Zero for line and load themselves.
   */
  readonly influence: number
  /** False where the corners leave it at nominal, for the sake of their number. */
  readonly isCombined: boolean
}

export interface ToleranceCornerSet {
  readonly model: SpreadModel
  readonly targets: AppliedTargets
  /** Line and load, then the others, most influential first. */
  readonly quantities: readonly CornerQuantity[]
  /** Nominal first; corners that cannot be reached are among the failures instead. */
  readonly corners: readonly ToleranceCorner[]
  readonly failures: readonly SpreadFailure[]
  /** The corner with the least slack, part values with it; null when none can be reached. */
  readonly worst: ToleranceCorner | null
  /** What was left at nominal, in a sentence; null when every quantity is combined. */
  readonly note: string | null
}

export type SpreadFigure = 'crossover' | 'phaseMargin' | 'gainMargin' | 'modulusMargin'

export interface Histogram {
  readonly edges: readonly number[] // one more than counts
  readonly counts: readonly number[]
}

export interface Distribution {
  readonly count: number
  /** Reached samples that have no such figure, such as a loop that never crosses 0 dB. */
  readonly absent: number
  readonly mean: number
  readonly standardDeviation: number
  readonly minimum: number
  readonly maximum: number
  readonly quantiles: {
    readonly p01: number
    readonly p05: number
    readonly p50: number
    readonly p95: number
    readonly p99: number
  }
  readonly histogram: Histogram
}

export interface Yield {
  readonly passed: number
  readonly share: number
  /** Clopper–Pearson at the confidence asked for. Stratified samples spread less than it allows for. */
  readonly lower: number
  readonly upper: number
}

export type YieldKey = 'all' | 'reached' | 'stable' | 'phaseMargin' | 'gainMargin' | 'modulusMargin'

/** Quantiles over the kept samples at each frequency. */
export interface QuantileBand {
  readonly low: readonly number[] // 5 %
  readonly middle: readonly number[] // 50 %
  readonly high: readonly number[] // 95 %
}

export interface LoopBands {
  readonly frequencies: readonly number[] // Hz
  readonly gainDb: QuantileBand
  readonly phaseDeg: QuantileBand
  readonly samples: number
}

export interface RegressionRanking {
  readonly figure: SpreadFigure
  /** Share of the figure's variance that a linear model explains; well below one, the coefficients mislead. */
  readonly determination: number // R²
  /** Standardised regression coefficients, largest magnitude first. */
  readonly coefficients: readonly { readonly key: string; readonly label: string; readonly value: number }[]
}

export interface SobolRanking {
  readonly figure: SpreadFigure
  readonly baseSamples: number // of which all evaluations had the figure
  /** First-order and total-effect indices, largest first-order one first. */
  readonly indices: readonly {
    readonly key: string
    readonly label: string
    readonly firstOrder: number
    readonly total: number
  }[]
}

export interface SpreadResult {
  readonly model: SpreadModel
  readonly targets: AppliedTargets
  readonly confidence: number
  readonly quantities: readonly VariedQuantity[]
  readonly samples: number // evaluated so far
  readonly yields: Readonly<Record<YieldKey, Yield>>
  /** Null for a figure that no sample has. */
  readonly distributions: Readonly<Record<SpreadFigure, Distribution | null>>
  /** Null until a sample has been reached. */
  readonly bands: LoopBands | null
  /** rad/s; closed-loop poles of the averaged model, one list a kept sample. */
  readonly closedLoopPoles: readonly (readonly { readonly real: number; readonly imaginary: number }[])[]
  readonly worst: PlacedMargins | null
  readonly failures: readonly SpreadFailure[]
  /** Reached samples whose conduction stops although it is not modelled for the topology. */
  readonly conductionNotModelled: number
  readonly regression: readonly RegressionRanking[]
  readonly sobol: readonly SobolRanking[]
}
