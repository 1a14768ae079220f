import { sql } from 'drizzle-orm'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'

import { connectDatabase, type DatabaseConnection } from '@/db/client'
import { migrateDatabase } from '@/db/migrate'
import { findSampleDesign, listSampleDesigns, replaceSampleDesigns } from '@/db/queries/sampleDesigns'
import { sampleDesigns } from '@/db/schema'
import { SAMPLES } from '@/db/seed/samples'
import { seedSamples } from '@/db/seed/seedSamples'
import { createTestDatabase, type TestDatabase } from '@/tests/support/database'

let database: TestDatabase
let connection: DatabaseConnection
beforeEach(async () => {
  database = await createTestDatabase()
  connection = connectDatabase({ url: database.url, poolSize: 4, onIdleError: () => undefined })
})
afterEach(async () => {
  await connection.close()
  await database.drop()
})

const slugs = async () => (await listSampleDesigns(connection.db)).map(({ slug }) => slug)

describe('migrations', () => {
  it('apply to an empty database, and again without a change', async () => {
    await migrateDatabase(connection.db)
    const applied = async () => (await connection.db.execute(sql`select * from drizzle.__drizzle_migrations`)).rows
    const before = await applied()
    await migrateDatabase(connection.db)
    expect(before.length).toBeGreaterThan(0)
    expect(await applied()).toEqual(before)
  })

  it('apply once when several processes start at the same moment', async () => {
    await Promise.all([1, 2, 3].map(() => migrateDatabase(connection.db)))
    expect(await slugs()).toEqual([])
  })
})

describe('the seed', () => {
  it('writes the samples in their order, and again without doubling them', async () => {
    await migrateDatabase(connection.db)
    await seedSamples(connection.db)
    await seedSamples(connection.db)
    expect(await slugs()).toEqual(SAMPLES.map(({ slug }) => slug))
  })

  it('changes places, changes texts and takes away what is gone', async () => {
    await migrateDatabase(connection.db)
    const sample = (slug: string, position: number, title: string) => ({
      ...{ slug, position, title, summary: 'Invented.', design: { topology: 'buck' } },
    })
    await replaceSampleDesigns(connection.db, [sample('a', 1, 'A'), sample('b', 2, 'B'), sample('c', 3, 'C')])
    await replaceSampleDesigns(connection.db, [sample('b', 1, 'Bee'), sample('a', 2, 'A')])
    expect(await slugs()).toEqual(['b', 'a'])
    expect((await findSampleDesign(connection.db, 'b'))?.title).toBe('Bee')
    expect(await findSampleDesign(connection.db, 'c')).toBeUndefined()
  })
})

describe('the table of samples', () => {
  const sound = { slug: 'rail', title: 'Rail', summary: 'Invented.', design: {}, position: 1 }
  it.each([
    ['a slug that is no address', { slug: 'Not a slug' }, 'sample_designs_slug_shape'],
    ['a blank title', { title: '  ' }, 'sample_designs_title_filled'],
    ['a position below one', { position: 0 }, 'sample_designs_position_range'],
    ['a design that is no object', { design: [1, 2] }, 'sample_designs_design_object'],
  ])('refuses %s by itself', async (_what, bad, constraint) => {
    await migrateDatabase(connection.db)
    await expect(connection.db.insert(sampleDesigns).values({ ...sound, ...bad })).rejects.toMatchObject({
      cause: { constraint },
    })
    await connection.db.insert(sampleDesigns).values(sound)
    expect(await slugs()).toEqual(['rail'])
  })
})
