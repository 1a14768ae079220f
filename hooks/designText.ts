import { DesignDocument } from '@/converters/document'
import type { FieldProblem } from '@/server/contract/problems'

export type ReadDesign =
  | { readonly kind: 'design'; readonly design: DesignDocument }
  | { readonly kind: 'problems'; readonly problems: readonly FieldProblem[] }

const LARGEST_TEXT = 256_000 // characters

/** Reads a design document from text, as pasted, from a file or from a link; every bad field is named. */
export function readDesignText(text: string): ReadDesign {
  const wrong = (message: string): ReadDesign => ({ kind: 'problems', problems: [{ field: '', message }] })
  if (text.trim() === '') return wrong('There is nothing here yet. Paste a design document or choose a file.')
  if (text.length > LARGEST_TEXT) return wrong('This is too long to be a design document.')
  let json: unknown
  try {
    json = JSON.parse(text)
  } catch (error) {
    return wrong(`This is not JSON: ${error instanceof Error ? error.message : 'it cannot be read'}.`)
  }
  const check = DesignDocument.safeParse(json)
  if (check.success) return { kind: 'design', design: check.data }
  return {
    kind: 'problems',
    problems: check.error.issues.map((issue) => ({ field: issue.path.join('.'), message: issue.message })),
  }
}

/** The design document as it is copied and downloaded. */
export function writeDesignText(design: DesignDocument): string {
  return `${JSON.stringify(design, null, 2)}\n`
}
