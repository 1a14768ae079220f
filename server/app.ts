import { constants } from 'node:zlib'

import compression from 'compression'
import express, { type Express, Router } from 'express'
import type { Logger } from 'pino'

import type { Database } from '@/db/client'
import type { ComputePool } from '@/server/compute/pool'
import { API_ROOT } from '@/server/contract/endpoints'
import type { Env } from '@/server/env'
import { errorHandler } from '@/server/middleware/errorHandler'
import { jsonBody, jsonBodyErrors } from '@/server/middleware/jsonBody'
import { notFound } from '@/server/middleware/notFound'
import { rateLimiter } from '@/server/middleware/rateLimiter'
import { requestLog } from '@/server/middleware/requestLog'
import { security } from '@/server/middleware/security'
import { webApp } from '@/server/middleware/webApp'
import { computeRoutes } from '@/server/routes/compute'
import { healthRoutes } from '@/server/routes/health'
import { openApiRoutes } from '@/server/routes/openapi'
import { sampleRoutes } from '@/server/routes/samples'
import { spreadRunRoutes } from '@/server/routes/spreadRuns'
import type { SpreadRunner } from '@/server/services/spreadRuns/runner'

export interface AppDependencies {
  readonly db: Database
  readonly compute: ComputePool
  readonly spreadRunner: SpreadRunner
  readonly logger: Logger
  readonly env: Pick<Env, 'RATE_LIMIT_PER_MINUTE' | 'TRUSTED_PROXIES' | 'SPREAD_SAMPLES_MAX'>
  /** Folder of the web build. */
  readonly webRoot: string
}

/** The quickest levels: on answers of some 300 kB the next ones win a tenth of the bytes for several times the work. */
const COMPRESSION = { level: 1, brotli: { params: { [constants.BROTLI_PARAM_QUALITY]: 1 } } }

export function createApp({ db, compute, spreadRunner, logger, env, webRoot }: AppDependencies): Express {
  const app = express()
  app.disable('x-powered-by')
  // Answers of the API are never asked for twice with the same tag; hashing each would be work for nothing.
  app.disable('etag')
  app.set('trust proxy', env.TRUSTED_PROXIES)
  app.use(requestLog(logger), security, healthRoutes(db, compute), compression(COMPRESSION))

  const api = Router()
  api.use(rateLimiter(env.RATE_LIMIT_PER_MINUTE), (_req, res, next) => {
    res.setHeader('Cache-Control', 'no-store')
    next()
  })
  api.use(jsonBody, openApiRoutes(), sampleRoutes(db), computeRoutes(compute))
  api.use(spreadRunRoutes({ db, compute, runner: spreadRunner, samplesMax: env.SPREAD_SAMPLES_MAX }), notFound)
  app.use(API_ROOT, api)
  app.use('/api', notFound)

  app.use(webApp(webRoot), notFound)
  app.use(jsonBodyErrors, errorHandler)
  return app
}
