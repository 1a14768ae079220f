import { z } from 'zod'

import { DesignDocument } from '@/converters/document'
import { StageRequirements } from '@/converters/stageRequirements'

export const StageProposalRequest = z.object({ requirements: StageRequirements })
export type StageProposalRequest = z.infer<typeof StageProposalRequest>
export type StageProposalRequestInput = z.input<typeof StageProposalRequest>

const StageChoice = z.object({
  field: z.string().describe('Path in the design document.'),
  value: z.number(),
  unit: z.string(),
  reason: z.string(),
})

/** A whole design from the few figures of the first day, with the reason for every choice. */
export const StageProposal = z.object({ design: DesignDocument, choices: z.array(StageChoice).readonly() })
export type StageProposal = z.infer<typeof StageProposal>
