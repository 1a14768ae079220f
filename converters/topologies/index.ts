/** Topologies that the engine can compute. */
import type { Topology } from '../document'
import { DesignError } from '../errors'
import { boost } from './boost'
import { buck } from './buck'
import type { TopologyDefinition } from './topology'

const DEFINITIONS: Partial<Record<Topology, TopologyDefinition>> = { buck, boost }

/** Topologies that answer today. */
export const COMPUTED_TOPOLOGIES = Object.keys(DEFINITIONS) as Topology[]

/** @throws DesignError 'not-yet-supported' for a topology that the document may name but nothing computes yet. */
export function topologyOf(name: Topology): TopologyDefinition {
  const definition = DEFINITIONS[name]
  if (!definition) {
    throw DesignError.at(
      'not-yet-supported',
      'topology',
      `The ${name} cannot be computed yet. Today these can: ${COMPUTED_TOPOLOGIES.join(', ')}.`,
    )
  }
  return definition
}
