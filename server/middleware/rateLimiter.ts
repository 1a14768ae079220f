import type { RequestHandler } from 'express'
import { rateLimit } from 'express-rate-limit'

import { AppError } from '@/server/errors'

const WINDOW_MS = 60_000

/** Holds one address to a number of requests a minute; the usual RateLimit headers say what is left. */
export function rateLimiter(perMinute: number): RequestHandler {
  return rateLimit({
    windowMs: WINDOW_MS,
    limit: perMinute,
    standardHeaders: 'draft-8',
    legacyHeaders: false,
    handler: (_req, _res, next) => {
      next(new AppError('too-many-requests', { detail: `At most ${perMinute} requests a minute are answered.` }))
    },
  })
}
