/** What the engine answers. SI units throughout; angles in degrees, gains in decibels, roots in rad/s. */
import type { CompensatorPart, CompensatorType } from './document'

export interface ResponsePoint {
  readonly gainDb: number
  /** Unwrapped along the frequency list. */
  readonly phaseDeg: number
}
export type ResponseCurve = readonly ResponsePoint[]

/** The same quantity from both models. `averaged` is empty where the averaged model does not hold. */
export interface ModelPair<T> {
  readonly averaged: T
  readonly switched: T
}

/** A pole or a zero. A conjugate pair is two roots, the one with positive imaginary part first. */
export interface Root {
  readonly real: number // rad/s
  readonly imaginary: number // rad/s
  readonly frequency: number // Hz, |s|/2π
  readonly dampingRatio: number // −Re/|s|; negative in the right half plane
  readonly quality: number | null // Q = |s|/(2·|Re|); null for a real root or one on the imaginary axis
  readonly timeConstant: number | null // s, 1/|Re|; null on the imaginary axis
  readonly ringingFrequency: number // Hz, |Im|/2π; 0 for a real root
  readonly halfPlane: 'left' | 'right' | 'axis'
  readonly role: RootRole
}
export type RootRole =
  | 'output-filter' // the L-C pair, or the two real poles it has become
  | 'capacitor-esr'
  | 'input-filter'
  | 'coupling' // of the coupling capacitor with its inductors
  | 'right-half-plane-zero'
  | 'sampling' // the pair near half the switching frequency in current mode
  | 'inductor' // the fast pole of discontinuous conduction
  | 'load-capacitor' // the slow pole of current mode or of discontinuous conduction
  | 'integrator'
  | 'compensator'
  | 'amplifier'
  | 'loop' // a closed-loop pole
  | 'other'

export interface CurrentFigures {
  readonly average: number // A
  readonly rms: number // A
  readonly peak: number // A
}

export interface OperatingPoint {
  readonly lineVoltage: number // V
  readonly outputCurrent: number // A
  readonly dutyCycle: number
  readonly conduction: 'continuous' | 'discontinuous'
  /** Share of the period in which the rectifier conducts: 1 − D in continuous conduction, less otherwise. */
  readonly rectifierDuty: number
  readonly outputRipple: number // V peak to peak
  readonly inductorCurrent: CurrentFigures & { readonly valley: number; readonly ripple: number } // A
  readonly switchCurrent: CurrentFigures
  readonly rectifierCurrent: CurrentFigures
  readonly outputCapacitorRmsCurrent: readonly number[] // A, one a bank
  /** V, highest while open; null where it hangs on a part that the document does not describe. */
  readonly switchVoltage: number | null
  readonly rectifierVoltage: number // V, highest reverse
  /** Load current at which conduction becomes discontinuous with a diode; null for a synchronous rectifier. */
  readonly boundaryCurrent: number | null // A
  /** V at the comparator when the switch turns off. */
  readonly controlVoltage: number
  readonly inputPower: number // W, conduction losses of the circuit as drawn included
  readonly efficiency: number // 0 to 1, conduction losses only
}

export interface ClosedForm {
  readonly key:
    | 'resonance'
    | 'quality'
    | 'esr-zero'
    | 'right-half-plane-zero'
    | 'control-gain'
    | 'line-gain'
    | 'load-pole'
    | 'sampling-quality'
    | 'critical-slope'
    | 'high-frequency-pole'
  readonly label: string // for people: "Resonance of the output filter"
  readonly value: number
  readonly unit: 'Hz' | '' | 'V' | 'V/V' | 'V/s'
  readonly equation: string // f₀ = D′/(2π√(LC))
  readonly source: string // author, year
}

export interface Plant {
  readonly poles: readonly Root[]
  readonly zeros: readonly Root[] // of control to output
  readonly closedForms: readonly ClosedForm[]
}

/** Multipliers of the open-loop period map; a modulus above 1 means that a disturbance grows from period to period. */
export interface PeriodMap {
  readonly multipliers: readonly { readonly real: number; readonly imaginary: number; readonly modulus: number }[]
  readonly isStable: boolean
  /** V/s of slope compensation from which the orbit is stable; null where slope compensation is not what is missing. */
  readonly slopeNeeded: number | null
}

/** The closed loop as it switches: comparator, ripple and network in one period map. */
export interface ClosedLoopMap {
  readonly multipliers: PeriodMap['multipliers']
  readonly isStable: boolean
  readonly controlRipple: number // V peak to peak that the network lets through to the comparator
  readonly rampSpan: number // V that the comparator's other input rises by during the pulse
  /** The ripple makes the comparator fire before the pulse should end. */
  readonly firesEarly: boolean
}

export interface Crossing {
  readonly frequency: number // Hz
  readonly gainDb: number
  readonly phaseDeg: number
  /** At a gain crossing: phase margin in degrees. At a phase crossing: gain margin in decibels. */
  readonly margin: number
}

/** Read up to half the switching frequency. A margin that does not exist is null. */
export interface Margins {
  readonly crossover: number | null // Hz, the highest gain crossing
  readonly phaseMargin: number | null // degrees, the smallest over all gain crossings
  readonly gainMargin: number | null // dB, the smallest over the phase crossings at which gain is below one
  readonly gainReductionMargin: number | null // dB that the gain may fall, where a fall would make the loop unstable
  readonly modulusMargin: number // min |1 + T|
  readonly modulusMarginFrequency: number // Hz
  readonly sensitivityPeak: number // 1/modulusMargin
  readonly delayMargin: number | null // s
  readonly gainCrossings: readonly Crossing[]
  readonly phaseCrossings: readonly Crossing[]
  /** Encirclements counted along the curve: whether the loop closes to a stable system. */
  readonly isStable: boolean
}

export interface Loop {
  readonly response: ModelPair<ResponseCurve>
  readonly compensator: ResponseCurve
  readonly compensatorPoles: readonly Root[]
  readonly compensatorZeros: readonly Root[]
  readonly closedLoopPoles: readonly Root[] // averaged model with its network
  /** Stability of the switched loop itself, ripple at the comparator included. */
  readonly periodMap: ClosedLoopMap
  readonly closedLoop: {
    readonly lineToOutput: ModelPair<ResponseCurve>
    readonly outputImpedance: ModelPair<ResponseCurve>
  }
}

/** One closed-loop pole (or pair) seen in time. */
export interface Mode {
  readonly timeConstant: number // s
  readonly ringingFrequency: number // Hz
  readonly amplitude: number // V, its share of the deviation just after the step
}

export interface StepResponse {
  readonly size: number // A for the load step, V for the line step
  readonly time: readonly number[] // s
  readonly outputDeviation: readonly number[] // V
  readonly peakDeviation: number // V, signed
  readonly peakTime: number // s
  readonly recoveryTime: number | null // s until within a tenth of the peak for good; null if not in the window
  readonly modes: readonly Mode[] // largest first
}

/** Closed-loop poles of the averaged model over the loop's gain. */
export interface RootLocus {
  readonly gainsDb: readonly number[] // beside the present gain
  /** One a pole, a point a gain; rad/s. */
  readonly branches: readonly (readonly { readonly real: number; readonly imaginary: number }[])[]
  /** Index of the present gain, 0 dB. */
  readonly present: number
  /** Between these gains the loop is stable; null in one of them: to the end of what is drawn. Null if unstable now. */
  readonly stableRange: { readonly lowestDb: number | null; readonly highestDb: number | null } | null
}

/** Read off a simulated transient; deviations are of the mean over a period from the wanted output. */
export interface TransientReadings {
  readonly peakDeviation: number // V, signed
  readonly peakTime: number // s after the disturbance
  readonly recoveryTime: number | null // s until within a tenth of the peak for good; null if not in the run
  readonly ringingFrequency: number | null // Hz; null where the output does not swing back
  readonly decayTimeConstant: number | null // s; null where it does not ring or does not decay
  readonly restDeviation: number // V, largest distance from rest in the last periods
  /** The duty goes up and down from one period to the next at the end: oscillation at half the switching frequency. */
  readonly alternates: boolean
}

/** One value a period in every list. */
export interface Simulation {
  readonly map: ClosedLoopMap
  /** As an analyser reads it on the running converter; null where the orbit is not the one that runs. */
  readonly loopWithRipple: { readonly frequencies: readonly number[]; readonly response: ResponseCurve } | null
  readonly disturbedAt: number // s
  readonly time: readonly number[] // s, middle of the period
  readonly meanOutput: readonly number[] // V
  readonly lowestOutput: readonly number[] // V
  readonly highestOutput: readonly number[] // V
  readonly peakCurrent: readonly number[] // A, inductor
  readonly control: readonly number[] // V, at the period's end
  readonly duty: readonly number[]
  readonly readings: TransientReadings
  /** The averaged model's answer to the same step; null for other disturbances and where it does not settle. */
  readonly prediction: StepResponse | null
}

export type WarningCode =
  | 'subharmonic-oscillation'
  | 'unstable-orbit'
  | 'unstable-loop'
  | 'unstable-switching' // the averaged margins do not show it: ripple at the comparator, or subharmonic oscillation
  | 'models-part' // averaged and switched differ by more than 1 dB or 10° below twice the crossover
  | 'duty-near-limit'
  | 'conduction-not-modelled' // the rectifier's current would reverse where only continuous conduction is computed
  | 'crossover-above-right-half-plane-zero'
  | 'crossover-near-switching'
  | 'conditionally-stable'
  | 'several-crossovers'
  | 'ripple-large'
  | 'input-filter' // its impedance comes too near the converter's
  | 'optocoupler-bias' // the LED resistor leaves too little current
  | 'hazardous-voltage'

export interface Warning {
  readonly code: WarningCode
  readonly message: string
  readonly field: string | null
}

/** An input filter against the converter that it feeds (Middlebrook 1976). */
export interface InputFilterCheck {
  readonly frequencies: readonly number[] // Hz
  readonly filterImpedance: ResponseCurve // Ω, seen from the converter
  readonly nullImpedance: ResponseCurve // Ω, converter input with the output held still by the control
  readonly openLoopImpedance: ResponseCurve // Ω, control held still
  readonly closedLoopImpedance: ResponseCurve | null // Ω, null without a compensator
  /** Least ratio of the converter's null and open-loop impedance to the filter's, dB, and where it is. */
  readonly margin: number
  readonly marginFrequency: number // Hz
  /** A parallel damping branch that keeps the filter a factor of two below the converter; null if it already is. */
  readonly suggestion: {
    readonly dampingCapacitance: number // F
    readonly dampingResistance: number // Ω
    readonly peakImpedance: number // Ω with it
    readonly source: string
  } | null
}

export interface Analysis {
  readonly engineVersion: string
  readonly operatingPoint: OperatingPoint
  readonly periodMap: PeriodMap
  readonly plant: Plant
  readonly frequencies: readonly number[] // Hz
  readonly responses: {
    readonly controlToOutput: ModelPair<ResponseCurve>
    readonly lineToOutput: ModelPair<ResponseCurve>
    readonly outputImpedance: ModelPair<ResponseCurve>
  }
  /** Null without an input filter. */
  readonly inputFilter: InputFilterCheck | null
  /** Current mode only: the loop that the current comparator closes. */
  readonly innerCurrentLoop: ResponseCurve | null
  /** Null while the document has no compensator. */
  readonly loop: Loop | null
  /** From the switched model; null without a compensator. */
  readonly margins: Margins | null
  /** The same read from the averaged model. */
  readonly averagedMargins: Margins | null
  /** Averaged model, closed loop; null without a compensator or when the loop is unstable. */
  readonly steps: { readonly load: StepResponse; readonly line: StepResponse } | null
  readonly warnings: readonly Warning[]
}

/** One corner of line and load, read from the switched model. */
export interface Corner {
  readonly lineVoltage: number
  readonly outputCurrent: number
  readonly conduction: 'continuous' | 'discontinuous'
  readonly dutyCycle: number
  readonly margins: Margins
  readonly loop: ResponseCurve // at the frequencies of the set
  readonly poles: readonly Root[]
  readonly rightHalfPlaneZero: number | null // Hz
}

export interface CornerSet {
  readonly frequencies: readonly number[]
  readonly corners: readonly Corner[]
  /** Index into `corners` of the smallest phase margin. */
  readonly worst: number
}

export interface Bound {
  readonly side: 'lower' | 'upper'
  readonly kind: 'resonance' | 'right-half-plane-zero' | 'switching-frequency' | 'amplifier' | 'load-pole'
  readonly frequency: number // Hz
  readonly text: string // why, in a sentence
  readonly source: string // "common practice, no source" or author, year
}

/** Where the crossover may sit. `lower` may exceed `upper`: then nothing fits, and the bounds say why. */
export interface CrossoverWindow {
  readonly lower: number // Hz
  readonly upper: number // Hz
  readonly bounds: readonly Bound[]
}

export type PartValues = Partial<Record<CompensatorPart, number>>

export interface MarginSummary {
  readonly crossover: number | null // Hz
  readonly phaseMargin: number | null // degrees
  readonly gainMargin: number | null // dB
  readonly modulusMargin: number
  readonly isStable: boolean
}

export interface CornerMargins {
  readonly nominal: MarginSummary
  readonly worst: MarginSummary & { readonly lineVoltage: number; readonly outputCurrent: number }
}

export interface Proposal {
  readonly type: CompensatorType
  readonly method: 'k-factor' | 'placed' | 'optimised'
  readonly crossover: number // Hz, the one asked for
  readonly parts: { readonly ideal: PartValues; readonly preferred: PartValues }
  readonly poles: readonly Root[] // of the preferred network
  readonly zeros: readonly Root[]
  /** Before and after snapping to preferred values. */
  readonly margins: { readonly ideal: CornerMargins; readonly preferred: CornerMargins }
  /** V, largest deviation after half of the load range comes at nominal line; null where the loop does not settle. */
  readonly loadStepDip: number | null
  readonly reasons: readonly string[]
  /** What still falls short of the targets, in sentences; empty when all hold. */
  readonly shortfalls: readonly string[]
}

export interface CompensatorProposals {
  readonly window: CrossoverWindow
  readonly suggestion: {
    readonly crossover: number
    readonly type: CompensatorType
    readonly phaseBoost: number // degrees needed from the network beyond the integrator
    readonly reasons: readonly string[]
  } | null
  /** Best first; empty with a refusal. */
  readonly proposals: readonly Proposal[]
  /** A plain no, with the reason, when nothing can work. */
  readonly refusal: string | null
}

/** One reasoned choice of the quick start. */
export interface StageChoice {
  readonly field: string // path in the design document
  readonly value: number
  readonly unit: string
  readonly reason: string
}
