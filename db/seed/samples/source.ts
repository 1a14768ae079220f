import type { DesignDocumentInput } from '@/converters/document'

/** A worked sample as it is written down; its place in the list is its place among the samples. */
export interface SampleSource {
  readonly slug: string
  readonly title: string
  readonly summary: string
  readonly design: DesignDocumentInput
}
