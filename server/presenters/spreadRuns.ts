import type { SpreadRunRow } from '@/db/schema'
import { Problem } from '@/server/contract/problems'
import { SpreadInterim, SpreadResult, type SpreadRun } from '@/server/contract/spreadRuns'

/** What a run's row tells whoever knows its id; the request itself stays here. */
export function presentSpreadRun(row: SpreadRunRow): SpreadRun {
  const { id, state, evaluationsDone: done, evaluationsTotal: total } = row
  return {
    id,
    state,
    progress: done / total,
    evaluations: { done, total },
    createdAt: row.createdAt.toISOString(),
    startedAt: row.startedAt?.toISOString() ?? null,
    finishedAt: row.finishedAt?.toISOString() ?? null,
    expiresAt: row.expiresAt.toISOString(),
    interim: SpreadInterim.nullable().parse(row.interim),
    result: SpreadResult.nullable().parse(row.result),
    problem: Problem.nullable().parse(row.problem),
  }
}
