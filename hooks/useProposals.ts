import { useDraft } from './draft/useDraft'
import { useCompensatorsQuery } from './queries/compensators'

/** The window and the networks for the open design, the wizard choosing freely. */
export function useProposals() {
  const { design, series } = useDraft()
  return useCompensatorsQuery(design, { resistorSeries: series.resistors, capacitorSeries: series.capacitors })
}
