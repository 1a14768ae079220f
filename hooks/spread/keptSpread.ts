/** What this browser keeps of the spread: what was entered, and which run was started for which design. */
import { useSyncExternalStore } from 'react'
import { z } from 'zod'
import { DesignDocument } from '@/converters/document'
import { readStored, writeStored } from '@/hooks/browserStorage'
import { SpreadModel } from '@/server/contract/spread'
import { SpreadRunId } from '@/server/contract/spreadRuns'

const KEY = 'steadrail.spread'

const RunForm = z.object({
  samples: z.string().default('1000'),
  seed: z.string().default('1'),
  distribution: z.enum(['normal', 'uniform']).default('normal'),
  model: SpreadModel.default('averaged'),
  /** What temperature and age leave of the output capacitance, and what they make of its ESR. */
  capacitanceLeft: z.string().default('100 %'),
  esrTimes: z.string().default('1'),
})
export type RunForm = z.infer<typeof RunForm>

const LimitTexts = z.object({
  /** Null until something is entered: a share of the output then stands in. */
  deviation: z.string().nullable().default(null),
  recovery: z.string().default(''),
})
export type LimitTexts = z.infer<typeof LimitTexts>

const KeptSpread = z.object({
  form: RunForm.prefault({}),
  limits: LimitTexts.prefault({}),
  run: z.object({ id: SpreadRunId, design: DesignDocument }).nullable().default(null),
})
export type KeptSpread = z.infer<typeof KeptSpread>

const listeners = new Set<() => void>()
let current = load()

function load(): KeptSpread {
  try {
    const kept = KeptSpread.safeParse(JSON.parse(readStored(KEY) ?? '{}'))
    return kept.success ? kept.data : KeptSpread.parse({})
  } catch {
    return KeptSpread.parse({})
  }
}

function change(next: Partial<KeptSpread>): void {
  current = { ...current, ...next }
  writeStored(KEY, JSON.stringify(current))
  for (const listener of listeners) listener()
}

export const spreadStore = {
  enter: (form: Partial<RunForm>): void => change({ form: { ...current.form, ...form } }),
  limit: (limits: Partial<LimitTexts>): void => change({ limits: { ...current.limits, ...limits } }),
  keepRun: (id: string, design: DesignDocument): void => change({ run: { id, design } }),
}

function subscribe(listener: () => void): () => void {
  listeners.add(listener)
  return () => listeners.delete(listener)
}

export function useKeptSpread(): KeptSpread {
  return useSyncExternalStore(
    subscribe,
    () => current,
    () => current,
  )
}

/** Whether two designs give the same spread: their names do not matter. */
export function isSameDesign(a: DesignDocument, b: DesignDocument): boolean {
  return textOf(a) === textOf(b)
}

// Parsed, so that the order in which a design was put together makes no difference.
const textOf = (design: DesignDocument) => JSON.stringify(DesignDocument.parse({ ...design, name: undefined }))
