import { Router } from 'express'

import type { Database } from '@/db/client'
import type { ComputePool } from '@/server/compute/pool'
import { checkReadiness } from '@/server/services/checkReadiness'

/** `/healthz` says that the process answers, `/readyz` that it can do its work. */
export function healthRoutes(db: Database, compute: ComputePool): Router {
  const router = Router()
  router.get('/healthz', (_req, res) => {
    res.json({ status: 'ok' })
  })
  router.get('/readyz', async (req, res) => {
    await checkReadiness({ db, compute, logger: req.log })
    res.json({ status: 'ok' })
  })
  return router
}
