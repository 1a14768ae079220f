/** From what is typed to a design that computes, without losing what cannot be used yet. */
import { DesignDocument } from '@/converters/document'
import { formatQuantity, parseQuantity, type Unit } from '@/converters/quantities'
import { fieldSpec } from './fields'
import { readPath, writePath } from './paths'

/** What was typed and is not (yet) part of the design, by path. */
export type Texts = Readonly<Record<string, string>>
export type Problems = Readonly<Record<string, string>>

export interface Settled {
  readonly design: DesignDocument
  readonly texts: Texts
  readonly problems: Problems
}

/**
 * Takes into the design every text that makes a sound document, alone or together with the others (raising the nominal
 * line above the highest becomes possible once the highest follows). The rest stays as typed, with its reason.
 */
export function settle(design: DesignDocument, texts: Texts): Settled {
  const problems: Record<string, string> = {}
  let waiting = new Map<string, number | null>()
  for (const [path, text] of Object.entries(texts)) {
    const entry = readEntry(path, text)
    if (entry.kind === 'problem') problems[path] = entry.message
    else waiting.set(path, entry.value)
  }
  for (;;) {
    const candidate = [...waiting].reduce((document, [path, value]) => writePath(document, path, value), design)
    const check = DesignDocument.safeParse(candidate)
    if (check.success) {
      const left = Object.entries(texts).filter(([path]) => !waiting.has(path))
      return { design: waiting.size === 0 ? design : check.data, texts: Object.fromEntries(left), problems }
    }
    const issues = check.error.issues.map((issue) => ({ path: issue.path.join('.'), message: issue.message }))
    for (const { path, message } of issues) problems[path] ??= message
    const kept = [...waiting].filter(([path]) => !issues.some((issue) => concerns(issue.path, path)))
    if (kept.length === waiting.size) return { design, texts, problems }
    waiting = new Map(kept)
  }
}

/** A rule over several entries is reported at one of them; all entries of that section wait. */
function concerns(issue: string, path: string): boolean {
  if (issue === path || path.startsWith(`${issue}.`)) return true
  const section = (of: string) => of.split('.').slice(0, -1).join('.')
  return section(issue) !== '' && section(issue) === section(path)
}

type Entry =
  { readonly kind: 'value'; readonly value: number | null } | { readonly kind: 'problem'; readonly message: string }

export function readEntry(path: string, text: string): Entry {
  const { unit, mayBeEmpty } = fieldSpec(path)
  if (mayBeEmpty && text.trim() === '') return { kind: 'value', value: null }
  return parseQuantity(text, unit)
}

/** What a field shows when nobody is typing in it. */
export function shownEntry(design: DesignDocument, texts: Texts, path: string): string {
  const text = texts[path]
  if (text !== undefined) return text
  const value = readPath(design, path)
  return typeof value === 'number' ? formatEntry(value, fieldSpec(path).unit) : ''
}

const MOST_DIGITS = 9

/** The shortest text that reads back as the same value: 4.7 µH, not 4.70 µH; 4.7123 µH, not 4.71 µH. */
export function formatEntry(value: number, unit: Unit): string {
  for (let digits = 3; digits <= MOST_DIGITS; digits += 1) {
    const text = formatQuantity(value, unit, digits)
      .replace(/(\.\d*?)0+(?=\D|$)/, '$1')
      .replace(/\.(?=\D|$)/, '')
    const back = parseQuantity(text, unit)
    if (back.kind === 'value' && Math.abs(back.value - value) <= 1e-12 * Math.abs(value)) return text
  }
  return formatQuantity(value, unit, MOST_DIGITS)
}
