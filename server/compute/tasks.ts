import { analyse, analyseCorners, analyseRootLocus, proposeCompensator, proposeStage, simulate } from '@/converters'
import { analyseToleranceCorners, startRun } from '@/converters/spread'
import type { TaskRequest } from '@/server/compute/messages'
import type { Analysis } from '@/server/contract/analyses'
import type { CompensatorProposals } from '@/server/contract/compensators'
import type { CornerSet } from '@/server/contract/corners'
import type { RootLocus } from '@/server/contract/rootLoci'
import type { Simulation } from '@/server/contract/simulations'
import type { StageProposal } from '@/server/contract/stageProposals'
import type { ToleranceCornerSet } from '@/server/contract/toleranceCorners'

/** Answer to `spreadCheck`, for the server alone. */
export interface SpreadCheck {
  readonly evaluations: number
}

type Answer =
  | Analysis
  | CornerSet
  | CompensatorProposals
  | RootLocus
  | Simulation
  | StageProposal
  | ToleranceCornerSet
  | SpreadCheck

/** Runs one task on the engine. The return type holds the engine to the contract. @throws DesignError */
export function compute(request: TaskRequest): Answer {
  switch (request.task) {
    case 'analysis': {
      const { design, operatingPoint, frequencies } = request.input
      return analyse(design, { operatingPoint, frequencies }) satisfies Analysis
    }
    case 'corners': {
      const { design, frequencies } = request.input
      return analyseCorners(design, { frequencies }) satisfies CornerSet
    }
    case 'compensators': {
      const { design, options } = request.input
      return proposeCompensator(design, options) satisfies CompensatorProposals
    }
    case 'rootLocus': {
      const { design, operatingPoint } = request.input
      return analyseRootLocus(design, operatingPoint) satisfies RootLocus
    }
    case 'simulation': {
      const { design, options } = request.input
      return simulate(design, options) satisfies Simulation
    }
    case 'stageProposal':
      return proposeStage(request.input.requirements) satisfies StageProposal
    case 'toleranceCorners': {
      const { design, options } = request.input
      return analyseToleranceCorners(design, options) satisfies ToleranceCornerSet
    }
    case 'spreadCheck': {
      const { design, options } = request.input
      return { evaluations: startRun(design, options).progress.total } satisfies SpreadCheck
    }
  }
}
