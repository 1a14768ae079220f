import { randomUUID } from 'node:crypto'

import type { Database } from '@/db/client'
import { insertSpreadRun } from '@/db/queries/spreadRuns'
import type { ComputePool } from '@/server/compute/pool'
import type { SpreadCheck } from '@/server/compute/tasks'
import type { SpreadRun, SpreadRunRequest } from '@/server/contract/spreadRuns'
import { AppError } from '@/server/errors'
import { presentSpreadRun } from '@/server/presenters/spreadRuns'
import { KEPT_MS } from '@/server/services/spreadRuns/limits'
import type { SpreadRunner } from '@/server/services/spreadRuns/runner'

export interface StartSpreadRunContext {
  readonly db: Database
  readonly compute: ComputePool
  readonly runner: SpreadRunner
  /** Samples of one run, and base samples of its Sobol' indices. */
  readonly samplesMax: number
}

interface StartSpreadRunInput {
  readonly request: SpreadRunRequest
  readonly address: string
}

/**
 * Takes in a run and answers before it has begun.
 * @throws AppError 'invalid-request' above the limit of samples, 'design-refused' when the nominal design cannot be
 * computed, 'too-many-runs', 'busy', 'computation-stopped' or, while closing, 'not-ready'
 */
export async function startSpreadRun(
  { db, compute, runner, samplesMax }: StartSpreadRunContext,
  { request, address }: StartSpreadRunInput,
): Promise<SpreadRun> {
  checkSamples(request, samplesMax)
  const id = randomUUID()
  runner.reserve(id, address)
  try {
    const check = await compute.run({ task: 'spreadCheck', input: request })
    const { evaluations } = JSON.parse(new TextDecoder().decode(check)) as SpreadCheck
    const expiresAt = new Date(Date.now() + KEPT_MS)
    const row = await insertSpreadRun(db, { id, request, evaluationsTotal: evaluations, expiresAt })
    runner.start({ id, request, evaluations })
    return presentSpreadRun(row)
  } catch (error) {
    runner.giveBack(id)
    throw error
  }
}

function checkSamples({ options }: SpreadRunRequest, most: number): void {
  const errors = (['samples', 'sobolSamples'] as const)
    .filter((field) => options[field] > most)
    .map((field) => ({ field: `options.${field}`, message: `At most ${most} samples can be run here.` }))
  const [first] = errors
  if (first) throw new AppError('invalid-request', { detail: `${first.field}: ${first.message}`, errors })
}
