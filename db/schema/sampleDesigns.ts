import { sql } from 'drizzle-orm'
import { check, integer, jsonb, pgTable, text, unique } from 'drizzle-orm/pg-core'

import { timestamps } from '@/db/schema/timestamps'

/** Worked samples that anybody can open. They are written by the seed alone. */
export const sampleDesigns = pgTable(
  'sample_designs',
  {
    // The slug stands in addresses, so it never changes once published.
    slug: text('slug').primaryKey(),
    title: text('title').notNull(),
    summary: text('summary').notNull(),
    // Read back through the document's schema, because a stored document may be older than the code.
    design: jsonb('design').$type<unknown>().notNull(),
    position: integer('position').notNull(),
    ...timestamps,
  },
  (table) => [
    unique('sample_designs_position_key').on(table.position),
    check('sample_designs_slug_shape', sql`${table.slug} ~ '^[a-z0-9]+(-[a-z0-9]+)*$'`),
    check('sample_designs_title_filled', sql`length(trim(${table.title})) > 0`),
    check('sample_designs_position_range', sql`${table.position} >= 1`),
    check('sample_designs_design_object', sql`jsonb_typeof(${table.design}) = 'object'`),
  ],
)
export type SampleDesignRow = typeof sampleDesigns.$inferSelect
export type NewSampleDesign = Pick<
  typeof sampleDesigns.$inferInsert,
  'slug' | 'title' | 'summary' | 'design' | 'position'
>
