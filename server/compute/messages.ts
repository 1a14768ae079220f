/** What crosses the border between the server and a worker thread: plain objects only. */
import type { DesignErrorCode, FieldProblem } from '@/converters/errors'
import type { RunPart, SpreadSummary } from '@/converters/spread'
import type { AnalysisRequest } from '@/server/contract/analyses'
import type { CompensatorsRequest } from '@/server/contract/compensators'
import type { CornersRequest } from '@/server/contract/corners'
import type { RootLocusRequest } from '@/server/contract/rootLoci'
import type { SimulationRequest } from '@/server/contract/simulations'
import type { SpreadRunRequest } from '@/server/contract/spreadRuns'
import type { StageProposalRequest } from '@/server/contract/stageProposals'
import type { ToleranceCornersRequest } from '@/server/contract/toleranceCorners'

export interface TaskInputs {
  readonly analysis: AnalysisRequest
  readonly corners: CornersRequest
  readonly compensators: CompensatorsRequest
  readonly rootLocus: RootLocusRequest
  readonly simulation: SimulationRequest
  readonly stageProposal: StageProposalRequest
  readonly toleranceCorners: ToleranceCornersRequest
  /** Whether a statistical run can begin, and of how many evaluations it is. */
  readonly spreadCheck: SpreadRunRequest
}
export type TaskName = keyof TaskInputs

export type TaskRequest = {
  [Name in TaskName]: { readonly task: Name; readonly input: TaskInputs[Name] }
}[TaskName]

export interface WorkerMessage {
  readonly request: TaskRequest
  /** One shared integer, set to 1 when the worker has begun. */
  readonly started: Int32Array
}

interface Refused {
  readonly kind: 'refused'
  readonly code: DesignErrorCode
  readonly message: string
  readonly problems: readonly FieldProblem[]
}
interface Answered {
  readonly kind: 'answered'
  readonly json: Uint8Array<ArrayBuffer>
}
export type WorkerAnswer = Answered | Refused

/** Places in the integers that a statistical run shares with the threads that work on it. */
export const RUN_CANCELLED = 0
export const RUN_EVALUATIONS_DONE = 1

/** A piece of a statistical run. */
export type SpreadWork =
  | {
      readonly kind: 'block'
      readonly request: SpreadRunRequest
      readonly part: RunPart
      readonly control: Int32Array
    }
  | { readonly kind: 'interim' | 'result'; readonly summaries: readonly SpreadSummary[] }

export type SpreadAnswer = Answered | Refused | { readonly kind: 'block'; readonly summary: SpreadSummary }
