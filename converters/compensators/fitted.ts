/** The network that a document carries. */
import type { DesignDocument } from '../document'
import { buildNetwork, type Network } from './networks'

/** Null when the document has no compensator, or one of which nothing has been fitted yet. */
export function fittedNetwork(design: DesignDocument): Network | null {
  const { compensator } = design
  if (!compensator) return null
  const { R1: _divider, ...rest } = compensator.parts
  if (Object.values(rest).every((value) => !value)) return null
  return buildNetwork(design, compensator)
}
