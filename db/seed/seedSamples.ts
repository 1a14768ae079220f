import { DesignDocument } from '@/converters/document'
import type { Database } from '@/db/client'
import { replaceSampleDesigns } from '@/db/queries/sampleDesigns'
import { SAMPLES } from '@/db/seed/samples'

/** Every summary says that the sample is made up, whoever reads it and wherever. */
const NOTICE = 'Invented example of Tidegauge Works.'

/** Writes the worked samples. @throws ZodError when one of them is not a sound design document. */
export async function seedSamples(db: Database): Promise<void> {
  await replaceSampleDesigns(
    db,
    SAMPLES.map(({ slug, title, summary, design }, index) => ({
      slug,
      title,
      summary: `${summary} ${NOTICE}`,
      design: DesignDocument.parse(design),
      position: index + 1,
    })),
  )
}
