import type { Database } from '@/db/client'
import { listSampleDesigns } from '@/db/queries/sampleDesigns'
import type { SampleList } from '@/server/contract/samples'
import { presentSampleSummary } from '@/server/presenters/samples'

export async function listSamples(db: Database): Promise<SampleList> {
  const rows = await listSampleDesigns(db)
  return { samples: rows.map(presentSampleSummary) }
}
