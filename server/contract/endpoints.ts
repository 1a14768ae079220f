/** Every endpoint of the API, as the OpenAPI document and the tests read it. */
import type { z } from 'zod'

import { Analysis, AnalysisRequest } from '@/server/contract/analyses'
import { CompensatorProposals, CompensatorsRequest } from '@/server/contract/compensators'
import { CornerSet, CornersRequest } from '@/server/contract/corners'
import type { ProblemCode } from '@/server/contract/problems'
import { RootLocus, RootLocusRequest } from '@/server/contract/rootLoci'
import { Sample, SampleList, SampleSlug } from '@/server/contract/samples'
import { Simulation, SimulationRequest } from '@/server/contract/simulations'
import { SpreadRun, SpreadRunId, SpreadRunRequest } from '@/server/contract/spreadRuns'
import { StageProposal, StageProposalRequest } from '@/server/contract/stageProposals'
import { ToleranceCornerSet, ToleranceCornersRequest } from '@/server/contract/toleranceCorners'

export const API_ROOT = '/api/v1'

export interface Endpoint {
  readonly operation: string
  readonly method: 'get' | 'post' | 'delete'
  /** Below the root; parameters in braces. */
  readonly path: string
  readonly summary: string
  readonly parameters?: Readonly<Record<string, z.ZodType>>
  readonly request?: { readonly name: string; readonly schema: z.ZodType }
  readonly response: {
    readonly name: string
    readonly schema: z.ZodType
    readonly description: string
    /** 202 where the work goes on after the answer, which then says in Location where to ask for it. */
    readonly status?: 202
  }
  readonly problems: readonly ProblemCode[]
}

const COMPUTE_PROBLEMS: readonly ProblemCode[] = [
  'malformed-json',
  'invalid-request',
  'request-too-large',
  'unsupported-media-type',
  'design-refused',
  'too-many-requests',
  'unexpected',
  'busy',
  'computation-stopped',
]

const RUN_PROBLEMS: readonly ProblemCode[] = ['not-found', 'too-many-requests', 'unexpected']

export const ENDPOINTS: readonly Endpoint[] = [
  {
    operation: 'analyseDesign',
    method: 'post',
    path: '/analyses',
    summary: 'Computes one design at one operating point: plant, responses of both models, loop, margins and steps.',
    request: { name: 'AnalysisRequest', schema: AnalysisRequest },
    response: { name: 'Analysis', schema: Analysis, description: 'The analysis.' },
    problems: COMPUTE_PROBLEMS,
  },
  {
    operation: 'analyseCorners',
    method: 'post',
    path: '/corners',
    summary: 'Computes the loop at every corner of line and load.',
    request: { name: 'CornersRequest', schema: CornersRequest },
    response: { name: 'CornerSet', schema: CornerSet, description: 'The corners.' },
    problems: COMPUTE_PROBLEMS,
  },
  {
    operation: 'analyseToleranceCorners',
    method: 'post',
    path: '/tolerance-corners',
    summary: 'Computes the margins at every combination of line, load and the ends of the tolerances.',
    request: { name: 'ToleranceCornersRequest', schema: ToleranceCornersRequest },
    response: { name: 'ToleranceCornerSet', schema: ToleranceCornerSet, description: 'The corners, the worst named.' },
    problems: COMPUTE_PROBLEMS,
  },
  {
    operation: 'startSpreadRun',
    method: 'post',
    path: '/spread-runs',
    summary: 'Starts a statistical run over line, load and tolerances, which goes on when its client leaves.',
    request: { name: 'SpreadRunRequest', schema: SpreadRunRequest },
    response: {
      name: 'SpreadRun',
      schema: SpreadRun,
      description: 'The run, taken in; Location says where to follow it.',
      status: 202,
    },
    problems: [...COMPUTE_PROBLEMS, 'too-many-runs', 'not-ready'],
  },
  {
    operation: 'getSpreadRun',
    method: 'get',
    path: '/spread-runs/{id}',
    summary: 'Gets a statistical run: how far it is, what can be said so far, the result once it is done.',
    parameters: { id: SpreadRunId },
    response: { name: 'SpreadRun', schema: SpreadRun, description: 'The run.' },
    problems: RUN_PROBLEMS,
  },
  {
    operation: 'cancelSpreadRun',
    method: 'delete',
    path: '/spread-runs/{id}',
    summary: 'Cancels a statistical run that is not finished; one that is stays as it is.',
    parameters: { id: SpreadRunId },
    response: { name: 'SpreadRun', schema: SpreadRun, description: 'The run as it ended.' },
    problems: RUN_PROBLEMS,
  },
  {
    operation: 'proposeCompensators',
    method: 'post',
    path: '/compensators',
    summary: 'Proposes error-amplifier networks in values that can be bought, or says why none can work.',
    request: { name: 'CompensatorsRequest', schema: CompensatorsRequest },
    response: { name: 'CompensatorProposals', schema: CompensatorProposals, description: 'The proposals, best first.' },
    problems: COMPUTE_PROBLEMS,
  },
  {
    operation: 'proposeStage',
    method: 'post',
    path: '/stage-proposals',
    summary: 'Proposes a whole power stage from line, output and frequency, with the reason for every choice.',
    request: { name: 'StageProposalRequest', schema: StageProposalRequest },
    response: { name: 'StageProposal', schema: StageProposal, description: 'The design and its reasons.' },
    problems: COMPUTE_PROBLEMS,
  },
  {
    operation: 'simulateLoop',
    method: 'post',
    path: '/simulations',
    summary: 'Runs the closed loop cycle by cycle through a load step, a line step, a soft start or an overload.',
    request: { name: 'SimulationRequest', schema: SimulationRequest },
    response: {
      name: 'Simulation',
      schema: Simulation,
      description: 'The transient, what is read off it, and the period map.',
    },
    problems: COMPUTE_PROBLEMS,
  },
  {
    operation: 'analyseRootLocus',
    method: 'post',
    path: '/root-loci',
    summary: 'Follows the closed-loop poles as the loop gain is scaled.',
    request: { name: 'RootLocusRequest', schema: RootLocusRequest },
    response: { name: 'RootLocus', schema: RootLocus, description: 'The branches.' },
    problems: COMPUTE_PROBLEMS,
  },
  {
    operation: 'listSamples',
    method: 'get',
    path: '/samples',
    summary: 'Lists the worked samples.',
    response: { name: 'SampleList', schema: SampleList, description: 'The samples in their order.' },
    problems: ['too-many-requests', 'unexpected'],
  },
  {
    operation: 'getSample',
    method: 'get',
    path: '/samples/{slug}',
    summary: 'Gives one worked sample with its design.',
    parameters: { slug: SampleSlug },
    response: { name: 'Sample', schema: Sample, description: 'The sample.' },
    problems: ['not-found', 'too-many-requests', 'unexpected'],
  },
]
