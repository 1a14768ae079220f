import type { ErrorRequestHandler } from 'express'

import { type Problem, PROBLEMS } from '@/server/contract/problems'
import { AppError } from '@/server/errors'

/** Turns whatever was thrown into a problem document. What we did not foresee is logged and told as a plain 500. */
export const errorHandler: ErrorRequestHandler = (thrown: unknown, req, res, next) => {
  if (res.headersSent) return next(thrown)
  const error = thrown instanceof AppError ? thrown : new AppError('unexpected')
  if (error !== thrown) req.log.error({ err: thrown }, 'unexpected error')
  const { status, title } = PROBLEMS[error.code]
  const problem: Problem = {
    type: `/problems/${error.code}`,
    title,
    status,
    detail: error.detail,
    errors: error.errors && [...error.errors],
    requestId: String(req.id),
  }
  res.status(status).set(error.headers).type('application/problem+json').send(JSON.stringify(problem))
}
