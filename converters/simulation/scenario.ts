/** What may be asked of the cycle-by-cycle simulation. */
import { z } from 'zod'

const cycles = z
  .number()
  .int({ error: 'Must be a whole number of periods.' })
  .min(20, { error: 'Must be at least 20.' })
const amperes = z.number({ error: 'Give a number in A.' }).min(0, { error: 'Must not be negative.' }).max(1e5)
const volts = z.number({ error: 'Give a number in V.' }).positive({ error: 'Must be greater than zero.' }).max(1e5)

/** Currents and voltages that are left out come from the design's ranges. */
export const Scenario = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('load-step'), from: amperes.optional(), to: amperes.optional() }),
  z.object({ kind: z.literal('line-step'), from: volts.optional(), to: volts.optional() }),
  /** The target rises from zero over this time, s. */
  z.object({ kind: z.literal('soft-start'), rise: z.number().positive().max(1).optional() }),
  /** Full load, then this current for a while, then full load again. */
  z.object({ kind: z.literal('overload'), current: amperes.optional(), cycles: cycles.max(5000).optional() }),
])
export type Scenario = z.infer<typeof Scenario>

export const MOST_CYCLES = 20_000

export const SimulationOptions = z.object({
  scenario: Scenario.default({ kind: 'load-step' }),
  lineVoltage: volts.optional(),
  outputCurrent: amperes.optional(),
  cycles: cycles.max(MOST_CYCLES, { error: `Must be at most ${MOST_CYCLES} periods.` }).optional(),
})
export type SimulationOptions = z.infer<typeof SimulationOptions>
export type SimulationOptionsInput = z.input<typeof SimulationOptions>
