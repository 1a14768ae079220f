/**
 * The design document: one converter as its designer draws it, in SI units. Everything that computes starts from it,
 * every saved revision holds one. Unknown keys are dropped, so that a newer document still loads; a missing section
 * takes the value an ideal part would have.
 */
import { z } from 'zod'

export const TOPOLOGIES = ['buck', 'boost', 'buck-boost', 'flyback', 'forward', 'sepic', 'cuk'] as const
export type Topology = (typeof TOPOLOGIES)[number]

export const LOAD_KINDS = ['resistive', 'constant-current', 'constant-power'] as const
export type LoadKind = (typeof LOAD_KINDS)[number]

export const COMPENSATOR_TYPES = ['I', 'II', 'III'] as const
export type CompensatorType = (typeof COMPENSATOR_TYPES)[number]

/** The part of the compensator that a document may name. R1 is the upper divider resistor. */
export const COMPENSATOR_PARTS = ['R1', 'R2', 'R3', 'C1', 'C2', 'C3'] as const
export type CompensatorPart = (typeof COMPENSATOR_PARTS)[number]

/** The largest share of a period that the switch may be on, unless the document says otherwise. */
export const DEFAULT_DUTY_LIMIT = 0.98

const quantity = (unit: string, least: number, most: number) =>
  z
    .number({ error: `Give a number in ${unit}.` })
    .min(least, { error: `Must be at least ${least} ${unit}.` })
    .max(most, { error: `Must be at most ${most} ${unit}.` })
const above = (unit: string, most: number) =>
  z
    .number({ error: `Give a number in ${unit}.` })
    .positive({ error: 'Must be greater than zero.' })
    .max(most, { error: `Must be at most ${most} ${unit}.` })

const resistance = quantity('Ω', 0, 1e9)
const inductance = above('H', 1e3).min(1e-12, { error: 'Must be at least 1 pH.' })
const capacitance = above('F', 1e3).min(1e-15, { error: 'Must be at least 1 fF.' })
const voltage = above('V', 1e5)

const Line = z
  .object({ minimum: voltage, nominal: voltage, maximum: voltage })
  .refine((line) => line.minimum <= line.nominal, {
    path: ['minimum'],
    error: 'The lowest line voltage is above the nominal one.',
  })
  .refine((line) => line.maximum >= line.nominal, {
    path: ['maximum'],
    error: 'The highest line voltage is below the nominal one.',
  })

const Output = z
  .object({ voltage, currentMinimum: above('A', 1e5), currentMaximum: above('A', 1e5) })
  .refine((output) => output.currentMinimum <= output.currentMaximum, {
    path: ['currentMinimum'],
    error: 'The lowest load current is above the highest one.',
  })

const OutputCapacitorBank = z.object({
  count: z
    .number()
    .int({ error: 'Must be a whole number of pieces.' })
    .min(1, { error: 'Must be at least 1.' })
    .max(10_000, { error: 'Must be at most 10 000.' }),
  capacitance, // F, one piece, without bias
  esr: resistance.default(0), // Ω, one piece
  /** Share of the capacitance that is lost at the output voltage, as ceramics of high permittivity lose it. */
  biasDerating: quantity('(a fraction)', 0, 0.95).nullish(),
})

/** F of one piece at the output voltage. */
export const effectiveCapacitance = ({
  capacitance: unbiased,
  biasDerating,
}: Pick<z.infer<typeof OutputCapacitorBank>, 'capacitance' | 'biasDerating'>): number =>
  unbiased * (1 - (biasDerating ?? 0))

const Rectifier = z.object({
  kind: z.enum(['synchronous', 'diode']),
  onResistance: resistance.default(0),
  forwardVoltage: quantity('V', 0, 100).default(0),
})

const VoltageMode = z.object({ kind: z.literal('voltage-mode'), rampAmplitude: above('V', 1e3) })
const PeakCurrentMode = z.object({
  kind: z.literal('peak-current-mode'),
  currentSenseResistance: above('Ω', 1e4),
  slopeCompensation: quantity('V/s', 0, 1e12).default(0),
})

/** V between which the amplifier's output can move; left out, what the modulator can use and a half more. */
const outputLimits = z
  .object({ minimum: quantity('V', -1e4, 1e4), maximum: quantity('V', -1e4, 1e4) })
  .refine((limits) => limits.minimum < limits.maximum, {
    path: ['maximum'],
    error: 'The upper limit must lie above the lower one.',
  })
  .nullish()

const OpAmp = z.object({
  kind: z.literal('op-amp'),
  gainBandwidth: above('Hz', 1e12).default(10e6),
  openLoopGain: above('V/V', 1e12).default(1e4),
  outputLimits,
})
const Transconductance = z.object({
  kind: z.literal('transconductance'),
  transconductance: above('S', 1e3),
  outputResistance: above('Ω', 1e12).default(1e6),
  outputLimits,
})
const ShuntOptocoupler = z.object({
  kind: z.literal('shunt-optocoupler'),
  currentTransferRatio: above('A/A', 100),
  pullUpResistance: above('Ω', 1e9),
  ledResistance: above('Ω', 1e9),
  optocouplerPole: above('Hz', 1e9),
  outputLimits,
})

/** Zero and absent both mean "not fitted"; which parts a network needs depends on its type and amplifier. */
const fitted = (most: number, unit: string) => quantity(unit, 0, most).nullish()
const Compensator = z.object({
  type: z.enum(COMPENSATOR_TYPES),
  parts: z.object({
    R1: fitted(1e9, 'Ω'),
    R2: fitted(1e9, 'Ω'),
    R3: fitted(1e9, 'Ω'),
    C1: fitted(1, 'F'),
    C2: fitted(1, 'F'),
    C3: fitted(1, 'F'),
  }),
})

const InputFilter = z.object({
  inductance,
  resistance: resistance.default(0),
  capacitance,
  esr: resistance.default(0),
  dampingCapacitance: quantity('F', 0, 1e3).nullish(),
  dampingResistance: resistance.nullish(),
})

const Targets = z.object({
  crossover: above('Hz', 1e9).nullable().default(null), // null: the wizard chooses
  phaseMargin: quantity('degrees', 0, 120).default(55),
  gainMargin: quantity('dB', 0, 60).default(10),
})

const tolerance = (usual: number) => quantity('(a fraction)', 0, 0.95).default(usual)
const Tolerances = z.object({
  inductance: tolerance(0.2),
  capacitance: tolerance(0.2),
  esr: tolerance(0.5),
  resistor: tolerance(0.01),
  smallCapacitor: tolerance(0.05),
  modulator: tolerance(0.1), // ramp, or sensed current and slope compensation
  amplifier: tolerance(0.3), // gain-bandwidth, or transconductance
})

export const DesignDocument = z.object({
  schema: z.literal(1, { error: 'This document has a version that is not known here; version 1 is.' }).default(1),
  name: z.string().trim().max(80, { error: 'Must be at most 80 characters.' }).optional(),
  topology: z.enum(TOPOLOGIES, { error: `Must be one of ${TOPOLOGIES.join(', ')}.` }),
  switchingFrequency: quantity('Hz', 100, 1e9),
  line: Line,
  output: Output,
  load: z.enum(LOAD_KINDS).default('resistive'),
  inductor: z.object({ inductance, resistance: resistance.default(0) }),
  // The next three belong to some topologies only; the others ignore them, zeros included.
  secondInductor: z.object({ inductance: quantity('H', 0, 1e3), resistance: resistance.default(0) }).nullish(),
  couplingCapacitor: z.object({ capacitance: quantity('F', 0, 1e3), esr: resistance.default(0) }).nullish(),
  transformer: z.object({ turnsRatio: above('(Ns/Np)', 1e4) }).nullish(),
  outputCapacitors: z
    .array(OutputCapacitorBank)
    .min(1, { error: 'At least one output capacitor is needed.' })
    .max(6, { error: 'Must be at most 6 banks.' }),
  switch: z.object({ onResistance: resistance }).default({ onResistance: 0 }),
  rectifier: Rectifier,
  modulator: z.discriminatedUnion('kind', [VoltageMode, PeakCurrentMode]),
  dutyLimit: z.number().gt(0).lte(1).default(DEFAULT_DUTY_LIMIT),
  inputFilter: InputFilter.nullish(),
  sense: z
    .object({ referenceVoltage: above('V', 1e4), upperResistance: above('Ω', 1e9) })
    .default({ referenceVoltage: 0.8, upperResistance: 10e3 }),
  amplifier: z
    .discriminatedUnion('kind', [OpAmp, Transconductance, ShuntOptocoupler])
    .default({ kind: 'op-amp', gainBandwidth: 10e6, openLoopGain: 1e4 }),
  compensator: Compensator.nullish(),
  targets: Targets.prefault({}),
  tolerances: Tolerances.prefault({}),
})

/** A checked document, every default filled in. */
export type DesignDocument = z.infer<typeof DesignDocument>
/** What may be given: sections with defaults may be left out. */
export type DesignDocumentInput = z.input<typeof DesignDocument>

/** The point at which a design is looked at; what is left out is nominal line and full load. */
export const OperatingPointRequest = z.object({
  lineVoltage: voltage.optional(),
  outputCurrent: above('A', 1e5).optional(),
})
export type OperatingPointRequest = z.infer<typeof OperatingPointRequest>
