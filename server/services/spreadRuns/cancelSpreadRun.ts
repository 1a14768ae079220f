import type { Database } from '@/db/client'
import { cancelSpreadRunRow } from '@/db/queries/spreadRuns'
import type { SpreadRun } from '@/server/contract/spreadRuns'
import { getSpreadRun } from '@/server/services/spreadRuns/getSpreadRun'
import type { SpreadRunner } from '@/server/services/spreadRuns/runner'

interface CancelSpreadRunContext {
  readonly db: Database
  readonly runner: SpreadRunner
}

/** Cancels a run that has not ended; one that has stays as it is. @throws AppError 'not-found' */
export async function cancelSpreadRun({ db, runner }: CancelSpreadRunContext, id: string): Promise<SpreadRun> {
  const run = await getSpreadRun(db, id)
  await cancelSpreadRunRow(db, run.id)
  runner.cancel(run.id)
  return getSpreadRun(db, run.id)
}
