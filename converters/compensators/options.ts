/** What may be asked of the compensator wizard. Everything may be left out; then the wizard chooses and says why. */
import { z } from 'zod'
import { COMPENSATOR_TYPES } from '../document'

/** The series of IEC 60063, by their number of values in a decade. */
export const PREFERRED_SERIES = ['E3', 'E6', 'E12', 'E24', 'E48', 'E96', 'E192'] as const
export type PreferredSeries = (typeof PREFERRED_SERIES)[number]

/** The method by which a network was found. */
export const SYNTHESIS_METHODS = ['k-factor', 'placed', 'optimised'] as const

/** What the optimiser is after: the most margin at the crossover, or the highest crossover at which every corner holds. */
export const OPTIMISER_AIMS = ['margin', 'crossover'] as const

const LONGEST_VALUE_LIST = 2000
const ohms = z.number({ error: 'Give a number in Ω.' }).positive({ error: 'Must be greater than zero.' }).max(1e9)
const farads = z.number({ error: 'Give a number in F.' }).positive({ error: 'Must be greater than zero.' }).max(1)
const hertz = z
  .number({ error: 'Give a number in Hz.' })
  .positive({ error: 'Must be greater than zero.' })
  .max(1e9, { error: 'Must be at most 1 GHz.' })

/** Limits on the network's parts. The smallest resistance also bounds what the amplifier has to drive. */
const PartLimits = z
  .object({
    smallestResistance: ohms.default(100),
    largestResistance: ohms.default(2e6),
    smallestCapacitance: farads.default(10e-12),
    largestCapacitance: farads.default(10e-6),
  })
  .refine((limits) => limits.smallestResistance < limits.largestResistance, {
    path: ['smallestResistance'],
    error: 'The smallest resistance must lie below the largest.',
  })
  .refine((limits) => limits.smallestCapacitance < limits.largestCapacitance, {
    path: ['smallestCapacitance'],
    error: 'The smallest capacitance must lie below the largest.',
  })

const series = z.enum(PREFERRED_SERIES, { error: `Must be one of ${PREFERRED_SERIES.join(', ')}.` })

const ownValues = (value: typeof ohms) =>
  z
    .array(value)
    .min(1, { error: 'Give at least one value, or choose a series.' })
    .max(LONGEST_VALUE_LIST, { error: `Must be at most ${LONGEST_VALUE_LIST} values.` })

export const CompensatorOptions = z.object({
  /** Hz; goes before the crossover among the design's targets. */
  crossover: hertz.optional(),
  type: z.enum(COMPENSATOR_TYPES, { error: `Must be one of ${COMPENSATOR_TYPES.join(', ')}.` }).optional(),
  /**
   * Zeros and poles placed by hand, Hz, the integrator left out: one of each for type II (a second pole of type II or
   * III may be left out, then its capacitor is not fitted), two of each for type III.
   */
  placement: z
    .object({
      zeros: z.array(hertz).max(2, { error: 'Must be at most 2 zeros.' }),
      poles: z.array(hertz).max(2, { error: 'Must be at most 2 poles.' }),
    })
    .optional(),
  /** Left aside when a crossover is given. */
  aim: z.enum(OPTIMISER_AIMS, { error: `Must be one of ${OPTIMISER_AIMS.join(', ')}.` }).default('margin'),
  resistorSeries: series.default('E96'),
  capacitorSeries: series.default('E12'),
  /** Values in stock, Ω and F; they replace the series. */
  ownResistors: ownValues(ohms).optional(),
  ownCapacitors: ownValues(farads).optional(),
  limits: PartLimits.prefault({}),
})
/** Checked options, every default filled in. */
export type CompensatorOptions = z.infer<typeof CompensatorOptions>
/** What may be given. */
export type CompensatorOptionsInput = z.input<typeof CompensatorOptions>
