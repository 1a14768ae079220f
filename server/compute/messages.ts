/** What crosses the border between the server and a worker thread: plain objects only. */
import type { DesignErrorCode, FieldProblem } from '@/converters/errors'
import type { AnalysisRequest } from '@/server/contract/analyses'
import type { CompensatorsRequest } from '@/server/contract/compensators'
import type { CornersRequest } from '@/server/contract/corners'
import type { SimulationRequest } from '@/server/contract/simulations'
import type { StageProposalRequest } from '@/server/contract/stageProposals'

export interface TaskInputs {
  readonly analysis: AnalysisRequest
  readonly corners: CornersRequest
  readonly compensators: CompensatorsRequest
  readonly simulation: SimulationRequest
  readonly stageProposal: StageProposalRequest
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

export type WorkerAnswer =
  | { readonly kind: 'answered'; readonly json: Uint8Array<ArrayBuffer> }
  | {
      readonly kind: 'refused'
      readonly code: DesignErrorCode
      readonly message: string
      readonly problems: readonly FieldProblem[]
    }
