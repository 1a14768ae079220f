import { TOPOLOGY_NAMES } from '@/components/design/summary'
import { Select } from '@/components/ui/Select'
import { TOPOLOGIES } from '@/converters/document'
import { setTopology } from '@/hooks/draft/edits'
import { useDraft } from '@/hooks/draft/useDraft'

const OPTIONS = TOPOLOGIES.map((value) => ({ value, label: TOPOLOGY_NAMES[value] }))

/** Line, load and parts stay; what the other circuit needs besides is filled in. */
export function TopologyField() {
  const { topology } = useDraft().design
  return <Select label="Topology" value={topology} options={OPTIONS} onChange={setTopology} />
}
