import { Router } from 'express'

import { methodNotAllowed } from '@/server/middleware/notFound'
import { buildOpenApi } from '@/server/presenters/openapi'

export function openApiRoutes(): Router {
  const document = buildOpenApi()
  const router = Router()
  router
    .route('/openapi.json')
    .get((_req, res) => {
      res.json(document)
    })
    .all(methodNotAllowed('GET', 'HEAD'))
  return router
}
