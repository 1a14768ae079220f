import { sql } from 'drizzle-orm'

import type { Database } from '@/db/client'

/** Rejects when the database cannot be reached. */
export async function pingDatabase(db: Database): Promise<void> {
  await db.execute(sql`select 1`)
}
