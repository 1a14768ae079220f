import type { Logger } from 'pino'

import type { Database } from '@/db/client'
import { deleteExpiredSpreadRuns, failAbandonedSpreadRuns } from '@/db/queries/spreadRuns'
import { problemOf } from '@/server/presenters/problem'
import { interrupted, type SpreadRunner } from '@/server/services/spreadRuns/runner'

interface SweepContext {
  readonly db: Database
  readonly runner: SpreadRunner
  readonly logger: Logger
}

const SWEEP_INTERVAL_MS = 5 * 60_000

/** Removes runs that have expired, and fails those that an earlier process has left unfinished. */
export async function sweepSpreadRuns({ db, runner, logger }: SweepContext): Promise<void> {
  try {
    const failed = await failAbandonedSpreadRuns(db, runner.underWay(), problemOf(interrupted()))
    const deleted = await deleteExpiredSpreadRuns(db)
    if (failed + deleted > 0) logger.info({ failed, deleted }, 'statistical runs were swept')
  } catch (error) {
    logger.error({ err: error }, 'statistical runs could not be swept')
  }
}

/** Sweeps now and from then on. @returns a way to stop, once the first sweep is done */
export async function startSweeping(context: SweepContext): Promise<() => void> {
  await sweepSpreadRuns(context)
  const timer = setInterval(() => void sweepSpreadRuns(context), SWEEP_INTERVAL_MS)
  return () => clearInterval(timer)
}
