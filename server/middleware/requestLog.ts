import { randomUUID } from 'node:crypto'

import type { RequestHandler } from 'express'
import type { Logger } from 'pino'
import { pinoHttp } from 'pino-http'

const REQUEST_ID = /^[\w-]{1,64}$/

/** Gives every request an id, sends it back, and logs one line a request: no bodies, no headers. */
export function requestLog(logger: Logger): RequestHandler {
  return pinoHttp({
    logger,
    genReqId: (req, res) => {
      const given = req.headers['x-request-id']
      const id = typeof given === 'string' && REQUEST_ID.test(given) ? given : randomUUID()
      res.setHeader('X-Request-Id', id)
      return id
    },
    customLogLevel: (_req, res, error) => {
      if (error || res.statusCode >= 500) return 'error'
      return res.statusCode >= 400 ? 'warn' : 'info'
    },
    serializers: {
      req: ({ id, method, url }: { id: string; method: string; url: string }) => ({ id, method, url }),
      res: ({ statusCode }: { statusCode: number }) => ({ statusCode }),
    },
  })
}
