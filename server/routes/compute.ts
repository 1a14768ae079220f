import { type RequestHandler, Router } from 'express'

import type { ComputePool } from '@/server/compute/pool'
import type { TaskRequest } from '@/server/compute/messages'
import { AnalysisRequest } from '@/server/contract/analyses'
import { CompensatorsRequest } from '@/server/contract/compensators'
import { CornersRequest } from '@/server/contract/corners'
import { RootLocusRequest } from '@/server/contract/rootLoci'
import { SimulationRequest } from '@/server/contract/simulations'
import { StageProposalRequest } from '@/server/contract/stageProposals'
import { ToleranceCornersRequest } from '@/server/contract/toleranceCorners'
import { methodNotAllowed } from '@/server/middleware/notFound'
import { parse } from '@/server/middleware/parse'

/** Routes that hand a checked request to the engine and pass its answer on. */
export function computeRoutes(compute: ComputePool): Router {
  const answer =
    (read: (body: unknown) => TaskRequest): RequestHandler =>
    async (req, res) => {
      const request = read(req.body)
      const gone = new AbortController()
      res.on('close', () => gone.abort())
      const json = await compute.run(request, gone.signal)
      if (!res.destroyed) res.type('json').send(json)
    }

  const router = Router()
  const post = (path: string, read: (body: unknown) => TaskRequest) =>
    router.route(path).post(answer(read)).all(methodNotAllowed('POST'))

  post('/analyses', (body) => ({ task: 'analysis', input: parse(AnalysisRequest, body) }))
  post('/corners', (body) => ({ task: 'corners', input: parse(CornersRequest, body) }))
  post('/compensators', (body) => ({ task: 'compensators', input: parse(CompensatorsRequest, body) }))
  post('/root-loci', (body) => ({ task: 'rootLocus', input: parse(RootLocusRequest, body) }))
  post('/simulations', (body) => ({ task: 'simulation', input: parse(SimulationRequest, body) }))
  post('/stage-proposals', (body) => ({ task: 'stageProposal', input: parse(StageProposalRequest, body) }))
  post('/tolerance-corners', (body) => ({ task: 'toleranceCorners', input: parse(ToleranceCornersRequest, body) }))
  return router
}
