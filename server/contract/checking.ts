/** Checking a value against a schema, with the same sentences on both sides of the wire. */
import type { z } from 'zod'

import type { FieldProblem } from '@/server/contract/problems'

export type Checked<T> =
  { readonly kind: 'sound'; readonly value: T } | { readonly kind: 'unsound'; readonly errors: FieldProblem[] }

/** Checks a value; an unsound one comes back with every bad field, each once, by its path: `design.output.voltage`. */
export function check<Schema extends z.ZodType>(schema: Schema, value: unknown): Checked<z.output<Schema>> {
  const result = schema.safeParse(value, { error: messageOf })
  if (result.success) return { kind: 'sound', value: result.data }
  const byField = new Map<string, FieldProblem>()
  for (const { path, message } of result.error.issues) {
    const field = path.join('.')
    if (!byField.has(field)) byField.set(field, { field, message })
  }
  return { kind: 'unsound', errors: [...byField.values()] }
}

const KINDS: Readonly<Record<string, string>> = {
  object: 'an object',
  array: 'a list',
  number: 'a number',
  int: 'a whole number',
  string: 'text',
  boolean: 'true or false',
}

/** The sentence for an issue whose schema brings none of its own. */
function messageOf(issue: z.core.$ZodRawIssue): string | undefined {
  if (issue.input === undefined) return 'This is missing.'
  switch (issue.code) {
    case 'invalid_type':
      return `Must be ${KINDS[issue.expected] ?? issue.expected}.`
    case 'invalid_value':
      return `Must be one of ${issue.values.join(', ')}.`
    case 'invalid_union':
      return Array.isArray(issue.options)
        ? `Must be one of ${issue.options.join(', ')}.`
        : 'Has none of the known forms.'
    case 'too_small':
      return `Must be ${issue.inclusive === false ? 'more than' : 'at least'} ${issue.minimum}.`
    case 'too_big':
      return `Must be ${issue.inclusive === false ? 'less than' : 'at most'} ${issue.maximum}.`
    case 'invalid_format':
      return 'Is not written as it should be.'
    default:
      return undefined
  }
}
