import type { Database } from '@/db/client'
import { findSampleDesign } from '@/db/queries/sampleDesigns'
import type { Sample } from '@/server/contract/samples'
import { AppError } from '@/server/errors'
import { presentSample } from '@/server/presenters/samples'

/** @throws AppError 'not-found' */
export async function getSample(db: Database, slug: string): Promise<Sample> {
  const row = await findSampleDesign(db, slug)
  if (!row) throw new AppError('not-found', { detail: `There is no sample called ${slug}.` })
  return presentSample(row)
}
