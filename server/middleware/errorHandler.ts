import type { ErrorRequestHandler } from 'express'

import { AppError } from '@/server/errors'
import { problemOf } from '@/server/presenters/problem'

/** Turns whatever was thrown into a problem document. What we did not foresee is logged and told as a plain 500. */
export const errorHandler: ErrorRequestHandler = (thrown: unknown, req, res, next) => {
  if (res.headersSent) return next(thrown)
  if (thrown instanceof AppError) res.set(thrown.headers)
  else req.log.error({ err: thrown }, 'unexpected error')
  const problem = problemOf(thrown, String(req.id))
  res.status(problem.status).type('application/problem+json').send(JSON.stringify(problem))
}
