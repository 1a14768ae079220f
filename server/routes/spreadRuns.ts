import { Router } from 'express'

import { API_ROOT } from '@/server/contract/endpoints'
import { SpreadRunRequest } from '@/server/contract/spreadRuns'
import { methodNotAllowed } from '@/server/middleware/notFound'
import { parse } from '@/server/middleware/parse'
import { cancelSpreadRun } from '@/server/services/spreadRuns/cancelSpreadRun'
import { getSpreadRun } from '@/server/services/spreadRuns/getSpreadRun'
import { startSpreadRun, type StartSpreadRunContext } from '@/server/services/spreadRuns/startSpreadRun'

export function spreadRunRoutes(context: StartSpreadRunContext): Router {
  const router = Router()
  router
    .route('/spread-runs')
    .post(async (req, res) => {
      const request = parse(SpreadRunRequest, req.body)
      const run = await startSpreadRun(context, { request, address: req.ip ?? '' })
      res.status(202).location(`${API_ROOT}/spread-runs/${run.id}`).json(run)
    })
    .all(methodNotAllowed('POST'))
  router
    .route('/spread-runs/:id')
    .get(async (req, res) => {
      res.json(await getSpreadRun(context.db, req.params.id))
    })
    .delete(async (req, res) => {
      res.json(await cancelSpreadRun(context, req.params.id))
    })
    .all(methodNotAllowed('GET', 'HEAD', 'DELETE'))
  return router
}
