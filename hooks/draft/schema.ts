/** What this browser keeps of the work: one design with what was typed into it. */
import { z } from 'zod'
import { DesignDocument } from '@/converters/document'
import { PREFERRED_SERIES } from '@/server/contract/compensators'

export const DRAFT_KEY = 'steadrail.draft'

const PointChoice = z.object({
  line: z.enum(['minimum', 'nominal', 'maximum']).default('nominal'),
  load: z.enum(['minimum', 'maximum']).default('maximum'),
})
export type PointChoice = z.infer<typeof PointChoice>

const SeriesChoice = z.object({
  resistors: z.enum(PREFERRED_SERIES).default('E96'),
  capacitors: z.enum(PREFERRED_SERIES).default('E12'),
})
export type SeriesChoice = z.infer<typeof SeriesChoice>

export const Draft = z.object({
  version: z.literal(1).default(1),
  design: DesignDocument,
  texts: z.record(z.string(), z.string()).default({}),
  point: PointChoice.prefault({}),
  series: SeriesChoice.prefault({}),
  /** The network is as it was proposed: it follows when another crossover is wanted. Parts set by hand stay put. */
  isAsProposed: z.boolean().default(false),
  /** Another crossover was asked for; the network that is proposed for it goes in when it arrives. */
  awaitsProposal: z.boolean().default(false),
})
export type Draft = z.infer<typeof Draft>

export type StoredDraft =
  | { readonly kind: 'none' }
  | { readonly kind: 'draft'; readonly draft: Draft }
  | { readonly kind: 'unreadable'; readonly text: string }

/** Reads a stored draft; one that cannot be read is handed back as text, so that nothing is thrown away. */
export function readDraft(text: string | null): StoredDraft {
  if (text === null) return { kind: 'none' }
  try {
    const draft = Draft.safeParse(JSON.parse(text))
    return draft.success ? { kind: 'draft', draft: draft.data } : { kind: 'unreadable', text }
  } catch {
    return { kind: 'unreadable', text }
  }
}

export function newDraft(design: DesignDocument): Draft {
  return Draft.parse({ design })
}

/** The operating point that a choice stands for. */
export function operatingPointOf(design: DesignDocument, { line, load }: PointChoice) {
  return {
    lineVoltage: design.line[line],
    outputCurrent: load === 'maximum' ? design.output.currentMaximum : design.output.currentMinimum,
  }
}
