/** Every topology of the design document. */
import type { Topology } from '../document'
import { boost } from './boost'
import { buck } from './buck'
import { buckBoost } from './buckBoost'
import { cuk } from './cuk'
import { flyback } from './flyback'
import { forward } from './forward'
import { sepic } from './sepic'
import type { TopologyDefinition } from './topology'

export const TOPOLOGY_DEFINITIONS: Readonly<Record<Topology, TopologyDefinition>> = {
  buck,
  boost,
  'buck-boost': buckBoost,
  flyback,
  forward,
  sepic,
  cuk,
}
