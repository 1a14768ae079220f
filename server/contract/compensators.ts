import { z } from 'zod'

import { CompensatorOptions, SYNTHESIS_METHODS } from '@/converters/compensators/options'
import { COMPENSATOR_TYPES, DesignDocument } from '@/converters/document'
import { Roots } from '@/server/contract/curves'
import { CornerMargins } from '@/server/contract/margins'

export { PREFERRED_SERIES } from '@/converters/compensators/options'

export const CompensatorsRequest = z.object({ design: DesignDocument, options: CompensatorOptions.prefault({}) })
export type CompensatorsRequest = z.infer<typeof CompensatorsRequest>
export type CompensatorsRequestInput = z.input<typeof CompensatorsRequest>

const Bound = z.object({
  side: z.enum(['lower', 'upper']),
  kind: z.enum(['resonance', 'right-half-plane-zero', 'switching-frequency', 'amplifier', 'load-pole']),
  frequency: z.number().describe('Hz'),
  text: z.string(),
  source: z.string(),
})

const PartValues = z.object({
  R1: z.number().optional().describe('Ω'),
  R2: z.number().optional().describe('Ω'),
  R3: z.number().optional().describe('Ω'),
  C1: z.number().optional().describe('F'),
  C2: z.number().optional().describe('F'),
  C3: z.number().optional().describe('F'),
})

const Proposal = z.object({
  type: z.enum(COMPENSATOR_TYPES),
  method: z.enum(SYNTHESIS_METHODS),
  crossover: z.number().describe('Hz, the one asked for'),
  parts: z.object({ ideal: PartValues, preferred: PartValues }),
  poles: Roots,
  zeros: Roots,
  margins: z.object({ ideal: CornerMargins, preferred: CornerMargins }),
  loadStepDip: z
    .number()
    .nullable()
    .describe('V, largest deviation after half of the load range comes at nominal line'),
  reasons: z.array(z.string()).readonly(),
  shortfalls: z.array(z.string()).readonly().describe('What still falls short of the targets; empty when all hold.'),
})

/** Where the crossover may sit, what is suggested, and the networks for it, best first. */
export const CompensatorProposals = z.object({
  window: z.object({
    lower: z.number().describe('Hz'),
    upper: z.number().describe('Hz'),
    bounds: z.array(Bound).readonly(),
  }),
  suggestion: z
    .object({
      crossover: z.number().describe('Hz'),
      type: z.enum(COMPENSATOR_TYPES),
      phaseBoost: z.number().describe('degrees'),
      reasons: z.array(z.string()).readonly(),
    })
    .nullable(),
  proposals: z.array(Proposal).readonly(),
  refusal: z.string().nullable().describe('Why nothing can work.'),
})
export type CompensatorProposals = z.infer<typeof CompensatorProposals>
