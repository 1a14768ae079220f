import { fileURLToPath } from 'node:url'

import { sql } from 'drizzle-orm'
import { migrate } from 'drizzle-orm/node-postgres/migrator'

import type { Database } from '@/db/client'

// Holds from the sources (db/) and from the bundle (build/): both lie one step below the root.
const migrationsFolder = fileURLToPath(new URL('../db/migrations', import.meta.url))

/** An arbitrary number that every process of the product agrees on. */
const MIGRATION_LOCK = 7_214_033

/** Brings the database to the newest schema. Can be run again at any time, and by several processes at once. */
export async function migrateDatabase(db: Database): Promise<void> {
  await db.transaction(async (tx) => {
    // Held until the end of the transaction, so that the second of two starting processes finds nothing left to do.
    await tx.execute(sql`select pg_advisory_xact_lock(${MIGRATION_LOCK})`)
    await migrate(tx, { migrationsFolder })
  })
}
