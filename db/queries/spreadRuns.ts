import { and, eq, gt, inArray, lte, notInArray, sql } from 'drizzle-orm'

import type { Database } from '@/db/client'
import { type NewSpreadRun, type SpreadRunRow, spreadRuns } from '@/db/schema'

/** A run is changed only while it is unfinished, so that what has ended stays as it ended. */
const unfinished = (id: string) => and(eq(spreadRuns.id, id), inArray(spreadRuns.state, ['queued', 'running']))

export async function insertSpreadRun(db: Database, run: NewSpreadRun): Promise<SpreadRunRow> {
  const [row] = await db.insert(spreadRuns).values(run).returning()
  return row!
}

export async function findSpreadRun(db: Database, id: string): Promise<SpreadRunRow | undefined> {
  const isKept = gt(spreadRuns.expiresAt, sql`now()`)
  const [row] = await db
    .select()
    .from(spreadRuns)
    .where(and(eq(spreadRuns.id, id), isKept))
    .limit(1)
  return row
}

/** @returns whether the run was still waiting. */
export async function markSpreadRunRunning(db: Database, id: string): Promise<boolean> {
  const rows = await db
    .update(spreadRuns)
    .set({ state: 'running', startedAt: sql`now()` })
    .where(and(eq(spreadRuns.id, id), eq(spreadRuns.state, 'queued')))
    .returning({ id: spreadRuns.id })
  return rows.length > 0
}

export interface SpreadRunProgress {
  readonly evaluationsDone: number
  /** JSON; null leaves what is there. */
  readonly interim: string | null
}

/** @returns whether the run is still wanted. */
export async function updateSpreadRunProgress(
  db: Database,
  id: string,
  { evaluationsDone, interim }: SpreadRunProgress,
): Promise<boolean> {
  const rows = await db
    .update(spreadRuns)
    .set({ evaluationsDone, ...(interim !== null && { interim: sql`${interim}::jsonb` }) })
    .where(unfinished(id))
    .returning({ id: spreadRuns.id })
  return rows.length > 0
}

/** @param result - JSON. */
export async function finishSpreadRun(db: Database, id: string, result: string): Promise<void> {
  await db
    .update(spreadRuns)
    .set({
      state: 'done',
      evaluationsDone: spreadRuns.evaluationsTotal,
      interim: null,
      result: sql`${result}::jsonb`,
      finishedAt: sql`now()`,
    })
    .where(unfinished(id))
}

export async function failSpreadRun(db: Database, id: string, problem: object): Promise<void> {
  await db
    .update(spreadRuns)
    .set({ state: 'failed', problem, finishedAt: sql`now()` })
    .where(unfinished(id))
}

export async function cancelSpreadRunRow(db: Database, id: string): Promise<void> {
  await db
    .update(spreadRuns)
    .set({ state: 'cancelled', finishedAt: sql`now()` })
    .where(unfinished(id))
}

/** Fails every unfinished run that is not among `underWay`. @returns how many */
export async function failAbandonedSpreadRuns(
  db: Database,
  underWay: readonly string[],
  problem: object,
): Promise<number> {
  const rows = await db
    .update(spreadRuns)
    .set({ state: 'failed', problem, finishedAt: sql`now()` })
    .where(
      and(
        inArray(spreadRuns.state, ['queued', 'running']),
        underWay.length > 0 ? notInArray(spreadRuns.id, [...underWay]) : undefined,
      ),
    )
    .returning({ id: spreadRuns.id })
  return rows.length
}

/** @returns how many */
export async function deleteExpiredSpreadRuns(db: Database): Promise<number> {
  const rows = await db
    .delete(spreadRuns)
    .where(lte(spreadRuns.expiresAt, sql`now()`))
    .returning({ id: spreadRuns.id })
  return rows.length
}
