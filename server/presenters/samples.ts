import { DesignDocument } from '@/converters/document'
import type { SampleDesignRow } from '@/db/schema'
import type { Sample, SampleSummary } from '@/server/contract/samples'

export function presentSample({ slug, title, summary, design }: SampleDesignRow): Sample {
  const document = DesignDocument.parse(design)
  const { topology, modulator, switchingFrequency, line, output } = document
  return { slug, title, summary, topology, control: modulator.kind, switchingFrequency, line, output, design: document }
}

export function presentSampleSummary(row: SampleDesignRow): SampleSummary {
  const { design: _, ...summary } = presentSample(row)
  return summary
}
