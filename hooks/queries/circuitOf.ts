import type { DesignDocument, DesignDocumentInput } from '@/converters/document'

/** The part of a design that its figures depend on: a new name or another wish asks for nothing to be computed again. */
export function circuitOf(design: DesignDocument): DesignDocumentInput {
  return { ...design, name: undefined, targets: undefined }
}
