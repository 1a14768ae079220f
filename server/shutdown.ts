import type { Server } from 'node:http'

import type { Logger } from 'pino'

import type { DatabaseConnection } from '@/db/client'
import type { ComputePool } from '@/server/compute/pool'

interface Running {
  readonly server: Server
  readonly compute: ComputePool
  readonly database: DatabaseConnection
  readonly logger: Logger
  /** How long requests under way may still take. */
  readonly graceMs: number
}

/** On SIGTERM or SIGINT: no new requests, those under way are finished, then everything is closed. */
export function closeOnSignal({ server, compute, database, logger, graceMs }: Running): void {
  let isClosing = false
  const close = async () => {
    if (isClosing) return
    isClosing = true
    logger.info('closing')
    const cutOff = setTimeout(() => server.closeAllConnections(), graceMs)
    await new Promise((resolve) => {
      server.close(resolve)
      server.closeIdleConnections()
    })
    clearTimeout(cutOff)
    await Promise.all([compute.close(), database.close()])
    logger.info('closed')
  }
  for (const signal of ['SIGTERM', 'SIGINT'] as const) process.on(signal, () => void close())
}
