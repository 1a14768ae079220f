import { sql } from 'drizzle-orm'
import { check, index, integer, jsonb, pgTable, text, timestamp, uuid } from 'drizzle-orm/pg-core'

import { timestamps } from '@/db/schema/timestamps'

export const SPREAD_RUN_STATES = ['queued', 'running', 'done', 'failed', 'cancelled'] as const
export type SpreadRunState = (typeof SPREAD_RUN_STATES)[number]

const moment = (name: string) => timestamp(name, { withTimezone: true })

/** Statistical runs: whoever knows the id reads the run, from whatever page, until it expires. */
export const spreadRuns = pgTable(
  'spread_runs',
  {
    // Random, since knowing it is the only key to the run.
    id: uuid('id').primaryKey(),
    state: text('state', { enum: SPREAD_RUN_STATES }).notNull().default('queued'),
    evaluationsDone: integer('evaluations_done').notNull().default(0),
    evaluationsTotal: integer('evaluations_total').notNull(),
    request: jsonb('request').$type<unknown>().notNull(),
    /** What can be said before the end. */
    interim: jsonb('interim').$type<unknown>(),
    result: jsonb('result').$type<unknown>(),
    problem: jsonb('problem').$type<unknown>(),
    ...timestamps,
    startedAt: moment('started_at'),
    finishedAt: moment('finished_at'),
    expiresAt: moment('expires_at').notNull(),
  },
  (table) => [
    index('spread_runs_expired_idx').on(table.expiresAt),
    // Serves the search for runs that nobody works on any more; nearly all rows are finished and stay out of it.
    index('spread_runs_unfinished_idx')
      .on(table.id)
      .where(sql`${table.state} in ('queued', 'running')`),
    check('spread_runs_state_known', sql`${table.state} in ('queued', 'running', 'done', 'failed', 'cancelled')`),
    check(
      'spread_runs_evaluations_range',
      sql`${table.evaluationsDone} between 0 and ${table.evaluationsTotal} and ${table.evaluationsTotal} > 0`,
    ),
    check('spread_runs_result_when_done', sql`(${table.state} = 'done') = (${table.result} is not null)`),
    check('spread_runs_problem_when_failed', sql`(${table.state} = 'failed') = (${table.problem} is not null)`),
    check(
      'spread_runs_finished_at_end',
      sql`(${table.state} in ('queued', 'running')) = (${table.finishedAt} is null)`,
    ),
  ],
)
export type SpreadRunRow = typeof spreadRuns.$inferSelect
export type NewSpreadRun = Pick<typeof spreadRuns.$inferInsert, 'id' | 'evaluationsTotal' | 'request' | 'expiresAt'>
