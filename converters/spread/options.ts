/** What may be asked of the spread. Everything may be left out. */
import { z } from 'zod'

/** What can vary: line and load over their ranges, everything else by its tolerance in the document. */
export const TOLERANCE_GROUPS = [
  'inductance',
  'capacitance',
  'esr',
  'resistor',
  'smallCapacitor',
  'modulator',
  'amplifier',
] as const
export type ToleranceGroup = (typeof TOLERANCE_GROUPS)[number]
export const SPREAD_GROUPS = ['line', 'load', ...TOLERANCE_GROUPS] as const
export type SpreadGroup = (typeof SPREAD_GROUPS)[number]

export const SPREAD_MODELS = ['averaged', 'switched'] as const
export type SpreadModel = (typeof SPREAD_MODELS)[number]

export const MOST_SAMPLES = 100_000
export const MOST_CORNERS = 512
const MOST_DEVIATIONS = 10_000

/** A sensitivity peak of two, 6 dB; common practice, no source. */
export const USUAL_MODULUS_MARGIN = 0.5

const between = (least: number, most: number, what: string) =>
  z
    .number({ error: `Give ${what}.` })
    .min(least, { error: `Must be at least ${least}.` })
    .max(most, { error: `Must be at most ${most}.` })
const whole = (least: number, most: number) =>
  between(least, most, 'a whole number').int({ error: 'Must be a whole number.' })

/** Multipliers of what the document says; 1 leaves it as it is. */
const Shift = z.object({
  capacitanceFactor: between(0.01, 10, 'a factor').default(1),
  esrFactor: between(0, 1000, 'a factor').default(1),
})

/**
 * Where the output capacitors stand before parts differ from one another: each factor multiplies the capacitance or ESR
 * of all banks and of the coupling capacitor. Data sheets give both, over temperature and at the end of life.
 */
export const SpreadConditions = z.object({ temperature: Shift.optional(), ageing: Shift.optional() })
export type SpreadConditions = z.infer<typeof SpreadConditions>

/** Goes before the targets of the design. */
export const SpreadTargets = z.object({
  phaseMargin: between(0, 120, 'a number of degrees').optional(),
  gainMargin: between(0, 60, 'a number of decibels').optional(),
  modulusMargin: between(0, 1, 'a number').optional(),
})
export type SpreadTargets = z.infer<typeof SpreadTargets>

const group = z.enum(SPREAD_GROUPS, { error: `Must be one of ${SPREAD_GROUPS.join(', ')}.` })
const shared = {
  vary: z
    .array(group, { error: 'Give a list of what varies.' })
    .min(1, { error: 'Something has to vary.' })
    .max(SPREAD_GROUPS.length, { error: 'Name each only once.' })
    .default([...SPREAD_GROUPS]),
  conditions: SpreadConditions.default({}),
  targets: SpreadTargets.default({}),
}
const model = z.enum(SPREAD_MODELS, { error: `Must be one of ${SPREAD_MODELS.join(', ')}.` })

/** Relative deviations that were measured on parts, such as −0.03; samples are drawn from them. */
const deviations = z
  .array(between(-0.95, 10, 'a relative deviation'))
  .min(2, { error: 'Give at least 2 deviations.' })
  .max(MOST_DEVIATIONS, { error: `Must be at most ${MOST_DEVIATIONS} deviations.` })

export const SpreadOptions = z.object({
  ...shared,
  samples: whole(100, MOST_SAMPLES).default(1000),
  /** The same seed gives the same samples. */
  seed: whole(0, 2 ** 32 - 1).default(1),
  /** Of everything with a tolerance: normal with the tolerance at three sigma and nothing beyond it, or uniform. */
  distribution: z.enum(['normal', 'uniform'], { error: 'Must be one of normal, uniform.' }).default('normal'),
  /** In place of the distribution, tolerance by tolerance. */
  measured: z.partialRecord(z.enum(TOLERANCE_GROUPS), deviations).default({}),
  model: model.default('averaged'),
  /** Probability with which the yield's interval holds the true yield. */
  confidence: between(0.5, 0.9999, 'a probability').default(0.95),
  /** Base samples of the Sobol' indices; 0 leaves them out. Each costs two evaluations and one for each thing that varies. */
  sobolSamples: whole(0, 10_000).default(0),
})
/** Checked options, every default filled in. */
export type SpreadOptions = z.infer<typeof SpreadOptions>
/** What may be given. */
export type SpreadOptionsInput = z.input<typeof SpreadOptions>

export const ToleranceCornerOptions = z.object({
  ...shared,
  model: model.default('switched'),
  mostCorners: whole(4, MOST_CORNERS).default(MOST_CORNERS),
})
export type ToleranceCornerOptions = z.infer<typeof ToleranceCornerOptions>
export type ToleranceCornerOptionsInput = z.input<typeof ToleranceCornerOptions>
