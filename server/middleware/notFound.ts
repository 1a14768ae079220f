import type { RequestHandler } from 'express'

import { AppError } from '@/server/errors'

export const notFound: RequestHandler = (req) => {
  throw new AppError('not-found', { detail: `Nothing answers ${req.method} ${req.originalUrl.split('?')[0]}.` })
}

/** Stands behind the methods that a route does answer. */
export function methodNotAllowed(...allowed: readonly string[]): RequestHandler {
  const Allow = [...allowed, 'OPTIONS'].join(', ')
  return (req, res) => {
    if (req.method === 'OPTIONS') {
      res.status(204).set({ Allow }).end()
      return
    }
    throw new AppError('method-not-allowed', { detail: `Use ${allowed.join(' or ')}.`, headers: { Allow } })
  }
}
