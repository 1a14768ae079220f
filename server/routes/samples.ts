import { Router } from 'express'

import type { Database } from '@/db/client'
import { methodNotAllowed } from '@/server/middleware/notFound'
import { getSample } from '@/server/services/samples/getSample'
import { listSamples } from '@/server/services/samples/listSamples'

export function sampleRoutes(db: Database): Router {
  const router = Router()
  router
    .route('/samples')
    .get(async (_req, res) => {
      res.json(await listSamples(db))
    })
    .all(methodNotAllowed('GET', 'HEAD'))
  router
    .route('/samples/:slug')
    .get(async (req, res) => {
      res.json(await getSample(db, req.params.slug))
    })
    .all(methodNotAllowed('GET', 'HEAD'))
  return router
}
