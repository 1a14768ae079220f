import { asc, eq, notInArray, sql } from 'drizzle-orm'

import type { Database } from '@/db/client'
import { type NewSampleDesign, type SampleDesignRow, sampleDesigns } from '@/db/schema'

export async function listSampleDesigns(db: Database): Promise<SampleDesignRow[]> {
  return db.select().from(sampleDesigns).orderBy(asc(sampleDesigns.position))
}

export async function findSampleDesign(db: Database, slug: string): Promise<SampleDesignRow | undefined> {
  const [row] = await db.select().from(sampleDesigns).where(eq(sampleDesigns.slug, slug)).limit(1)
  return row
}

/** Makes the table hold exactly these samples. Can be run again at any time. */
export async function replaceSampleDesigns(db: Database, samples: readonly NewSampleDesign[]): Promise<void> {
  await db.transaction(async (tx) => {
    const slugs = samples.map(({ slug }) => slug)
    await tx.delete(sampleDesigns).where(slugs.length > 0 ? notInArray(sampleDesigns.slug, slugs) : undefined)
    // Two samples may trade places: out of the way first, since a position is unique.
    await tx.update(sampleDesigns).set({ position: sql`${sampleDesigns.position} + 1000` })
    for (const sample of samples) {
      await tx.insert(sampleDesigns).values(sample).onConflictDoUpdate({ target: sampleDesigns.slug, set: sample })
    }
  })
}
