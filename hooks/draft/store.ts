/** The draft of this browser: one store that every screen reads, kept in local storage, shared between its tabs. */
import type { DesignDocument } from '@/converters/document'
import { readStored, writeStored } from '@/hooks/browserStorage'
import { settle, type Texts } from './entries'
import {
  DRAFT_KEY,
  newDraft,
  readDraft,
  type Draft,
  type PointChoice,
  type SeriesChoice,
  type StoredDraft,
} from './schema'

const MOST_UNDO = 30
const listeners = new Set<() => void>()
let undone: readonly Draft[] = []
let current: StoredDraft = load()

function load(): StoredDraft {
  return readDraft(readStored(DRAFT_KEY))
}

function set(next: StoredDraft): void {
  current = next
  if (next.kind === 'draft') writeStored(DRAFT_KEY, JSON.stringify(next.draft))
  for (const listener of listeners) listener()
}

function change(update: (draft: Draft) => Draft): void {
  if (current.kind === 'draft') set({ kind: 'draft', draft: update(current.draft) })
}

/** A change that can be taken back in one step. */
function changeWithUndo(update: (draft: Draft) => Draft): void {
  if (current.kind !== 'draft') return
  undone = [...undone, current.draft].slice(-MOST_UNDO)
  change(update)
}

export const draftStore = {
  read: (): StoredDraft => current,
  canUndo: (): boolean => undone.length > 0,

  subscribe(listener: () => void): () => void {
    const onStorage = (event: StorageEvent) => {
      if (event.key === DRAFT_KEY) set(load())
    }
    if (listeners.size === 0 && typeof window !== 'undefined') window.addEventListener?.('storage', onStorage)
    listeners.add(listener)
    return () => {
      listeners.delete(listener)
      if (listeners.size === 0 && typeof window !== 'undefined') window.removeEventListener?.('storage', onStorage)
    }
  },

  /** Begins with a whole design: from the quick start, a sample, a link or a file. */
  open(design: DesignDocument): void {
    if (current.kind === 'draft') undone = [...undone, current.draft].slice(-MOST_UNDO)
    set({ kind: 'draft', draft: newDraft(design) })
  },

  /** One entry, as typed. */
  type(path: string, text: string): void {
    change((draft) => {
      const isPart = path.startsWith('compensator.')
      const next = withTexts(draft, draft.design, { ...draft.texts, [path]: text })
      return isPart ? { ...next, isAsProposed: false, awaitsProposal: false } : next
    })
  },

  /** Another crossover is wanted, in Hz. A network that was proposed follows; one set by hand stays. */
  wantCrossover(crossover: number): void {
    // The wish and the network that follows from it are one step back, however far the handle was drawn.
    const isFirst = current.kind === 'draft' && current.draft.isAsProposed && !current.draft.awaitsProposal
    const update = isFirst ? changeWithUndo : change
    update((draft) => ({
      ...draft,
      design: { ...draft.design, targets: { ...draft.design.targets, crossover } },
      texts: without(draft.texts, (path) => path === 'targets.crossover'),
      awaitsProposal: draft.isAsProposed,
    }))
  },

  /** Takes a proposed network over. */
  takeNetwork(compensator: NonNullable<DesignDocument['compensator']>): void {
    const isFollowing = current.kind === 'draft' && current.draft.awaitsProposal
    const update = isFollowing ? change : changeWithUndo
    update((draft) => ({
      ...draft,
      design: { ...draft.design, compensator },
      texts: without(draft.texts, (path) => path.startsWith('compensator.')),
      isAsProposed: true,
      awaitsProposal: false,
    }))
  },

  /** A change of the design that is not typed: a choice, a bank more or less, a proposal taken over. */
  edit(update: (design: DesignDocument) => DesignDocument, dropTexts: (path: string) => boolean = () => false): void {
    changeWithUndo((draft) => withTexts(draft, update(draft.design), without(draft.texts, dropTexts)))
  },

  /** An empty name is none. */
  rename: (name: string): void =>
    change((draft) => ({ ...draft, design: { ...draft.design, name: name === '' ? undefined : name } })),
  choosePoint: (point: PointChoice): void => change((draft) => ({ ...draft, point })),
  chooseSeries: (series: SeriesChoice): void => change((draft) => ({ ...draft, series })),

  undo(): void {
    const last = undone.at(-1)
    if (!last) return
    undone = undone.slice(0, -1)
    set({ kind: 'draft', draft: last })
  },
}

function without(texts: Texts, drop: (path: string) => boolean): Record<string, string> {
  return Object.fromEntries(Object.entries(texts).filter(([path]) => !drop(path)))
}

function withTexts(draft: Draft, design: DesignDocument, texts: Texts): Draft {
  const settled = settle(design, texts)
  return { ...draft, design: settled.design, texts: { ...settled.texts } }
}
