import type { Server } from 'node:http'

import type { Logger } from 'pino'

import type { DatabaseConnection } from '@/db/client'
import type { ComputePool } from '@/server/compute/pool'
import type { SpreadRunner } from '@/server/services/spreadRuns/runner'

interface Running {
  readonly server: Server
  readonly compute: ComputePool
  readonly spreadRunner: SpreadRunner
  readonly stopSweeping: () => void
  readonly database: DatabaseConnection
  readonly logger: Logger
  /** How long requests under way may still take. */
  readonly graceMs: number
}

/** Statistical runs can be started again, so they hold up the end less long than requests may. */
const MOST_RUN_GRACE_MS = 2_000

/** On SIGTERM or SIGINT: no new requests, those under way are finished, then everything is closed. */
export function closeOnSignal(running: Running): void {
  const { server, compute, spreadRunner, database, logger, graceMs } = running
  let isClosing = false
  const close = async () => {
    if (isClosing) return
    isClosing = true
    logger.info('closing')
    running.stopSweeping()
    const runsEnded = spreadRunner.close(Math.min(graceMs, MOST_RUN_GRACE_MS))
    const cutOff = setTimeout(() => server.closeAllConnections(), graceMs)
    await new Promise((resolve) => {
      server.close(resolve)
      server.closeIdleConnections()
    })
    clearTimeout(cutOff)
    await runsEnded
    await Promise.all([compute.close(), database.close()])
    logger.info('closed')
  }
  for (const signal of ['SIGTERM', 'SIGINT'] as const) process.on(signal, () => void close())
}
