import { useState, useSyncExternalStore } from 'react'
import { formatEntry, settle, shownEntry, type Problems } from './entries'
import { fieldSpec, type FieldSpec } from './fields'
import { readPath } from './paths'
import type { Draft, StoredDraft } from './schema'
import { draftStore } from './store'

/** What this browser holds: a draft, none, or one that cannot be read. */
export function useStoredDraft(): StoredDraft {
  return useSyncExternalStore(draftStore.subscribe, draftStore.read, draftStore.read)
}

/** The draft. @throws Error where no design is open; the screens of a design are drawn only when one is. */
export function useDraft(): Draft {
  const stored = useStoredDraft()
  if (stored.kind !== 'draft') throw new Error('no design is open')
  return stored.draft
}

export function useCanUndo(): boolean {
  return useSyncExternalStore(draftStore.subscribe, draftStore.canUndo, draftStore.canUndo)
}

/** What is wrong with the entries that are not part of the design yet, by path. */
export function useEntryProblems(): Problems {
  return problemsOf(useDraft())
}

const known = new WeakMap<Draft, Problems>()

/** Found once for each state of the draft, however many entries ask. */
function problemsOf(draft: Draft): Problems {
  const problems = known.get(draft) ?? settle(draft.design, draft.texts).problems
  known.set(draft, problems)
  return problems
}

export interface EntryBinding {
  readonly spec: FieldSpec
  readonly text: string
  readonly problem: string | undefined
  readonly onChangeText: (text: string) => void
  readonly onFocus: () => void
  readonly onBlur: () => void
}

/** One entry of the design: shows what is typed while it is typed, the tidy value afterwards. */
export function useEntry(path: string): EntryBinding {
  const { design, texts } = useDraft()
  const problems = useEntryProblems()
  const [typed, setTyped] = useState<string | null>(null)
  const spec = fieldSpec(path)
  return {
    spec,
    text: typed ?? shownEntry(design, texts, path),
    problem: problems[path],
    onFocus: () => setTyped(shownEntry(design, texts, path)),
    onBlur: () => setTyped(null),
    onChangeText: (text) => {
      setTyped(text)
      draftStore.type(path, text)
    },
  }
}

/** An entry's value as it stands in the design, for labels beside drawings. */
export function useEntryText(path: string): string {
  const { design } = useDraft()
  const value = readPath(design, path)
  return typeof value === 'number' ? formatEntry(value, fieldSpec(path).unit) : '–'
}
