/** Unchecked input to a checked design document. */
import type { z } from 'zod'
import { DesignDocument } from './document'
import { DesignError, type FieldProblem } from './errors'

/** @throws DesignError 'invalid-document' that lists every bad field. */
export function parseDesign(design: unknown): DesignDocument {
  const result = DesignDocument.safeParse(design)
  if (result.success) return result.data
  throw invalid(problemsOf(result.error))
}

/** zod's findings as field paths such as `outputCapacitors[0].esr`. */
export function problemsOf(error: z.ZodError): FieldProblem[] {
  return error.issues.map((issue) => ({
    field: issue.path.reduce<string>(
      (path, key) =>
        typeof key === 'number' ? `${path}[${key}]` : path === '' ? String(key) : `${path}.${String(key)}`,
      '',
    ),
    message: issue.message,
  }))
}

/** A refusal that names every field in its message. */
export function invalid(problems: readonly FieldProblem[]): DesignError {
  const sentence = problems.map(({ field, message }) => (field ? `${field}: ${message}` : message)).join(' ')
  return new DesignError('invalid-document', sentence, problems)
}
