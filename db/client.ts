import { drizzle, type NodePgDatabase } from 'drizzle-orm/node-postgres'
import { Pool } from 'pg'

import * as schema from '@/db/schema'

export type Database = NodePgDatabase<typeof schema>

export interface DatabaseConnection {
  readonly db: Database
  readonly close: () => Promise<void>
}

export interface DatabaseOptions {
  readonly url: string
  readonly poolSize: number
  /** Told when an idle connection breaks; the pool replaces it, so this is for the log. */
  readonly onIdleError: (error: Error) => void
}

const CONNECT_TIMEOUT_MS = 5_000
const STATEMENT_TIMEOUT_MS = 10_000

/** Opens a pool of connections; nothing is sent before the first query. */
export function connectDatabase({ url, poolSize, onIdleError }: DatabaseOptions): DatabaseConnection {
  const pool = new Pool({
    connectionString: url,
    max: poolSize,
    connectionTimeoutMillis: CONNECT_TIMEOUT_MS,
    statement_timeout: STATEMENT_TIMEOUT_MS,
  })
  // Without a listener, a restart of PostgreSQL would end the whole process.
  pool.on('error', onIdleError)
  return { db: drizzle(pool, { schema }), close: () => pool.end() }
}
