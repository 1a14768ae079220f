import type { Logger } from 'pino'

import type { Database } from '@/db/client'
import { pingDatabase } from '@/db/queries/health'
import type { ComputePool } from '@/server/compute/pool'
import { AppError } from '@/server/errors'

interface ReadinessContext {
  readonly db: Database
  readonly compute: ComputePool
  readonly logger: Logger
}

/** @throws AppError 'not-ready' when the database does not answer or no thread can compute */
export async function checkReadiness({ db, compute, logger }: ReadinessContext): Promise<void> {
  try {
    await pingDatabase(db)
  } catch (error) {
    logger.error({ err: error }, 'the database does not answer')
    throw new AppError('not-ready', { detail: 'The database does not answer.' })
  }
  if (!compute.isAlive()) throw new AppError('not-ready', { detail: 'The compute threads are down.' })
}
