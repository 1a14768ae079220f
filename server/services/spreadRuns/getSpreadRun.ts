import type { Database } from '@/db/client'
import { findSpreadRun } from '@/db/queries/spreadRuns'
import { SpreadRunId, type SpreadRun } from '@/server/contract/spreadRuns'
import { AppError } from '@/server/errors'
import { presentSpreadRun } from '@/server/presenters/spreadRuns'

/** @throws AppError 'not-found', also when the run has expired or the id is none */
export async function getSpreadRun(db: Database, id: string): Promise<SpreadRun> {
  const row = SpreadRunId.safeParse(id).success ? await findSpreadRun(db, id) : undefined
  if (!row) throw new AppError('not-found', { detail: 'There is no such run; runs are kept for a day.' })
  return presentSpreadRun(row)
}
