import { type Problem, PROBLEMS } from '@/server/contract/problems'
import { AppError } from '@/server/errors'

/** The problem document for whatever was thrown; what was not foreseen is told without its details. */
export function problemOf(thrown: unknown, requestId?: string): Problem {
  const { code, detail, errors } = thrown instanceof AppError ? thrown : new AppError('unexpected')
  const { status, title } = PROBLEMS[code]
  return { type: `/problems/${code}`, title, status, detail, errors: errors && [...errors], requestId }
}
