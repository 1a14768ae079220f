import { keepPreviousData, useQuery } from '@tanstack/react-query'
import type { CompensatorOptionsInput } from '@/converters/compensators/options'
import type { DesignDocument } from '@/converters/document'
import { api } from '@/hooks/api'
import { useDebounced } from '@/hooks/useDebounced'
import { CompensatorProposals, type CompensatorsRequestInput } from '@/server/contract/compensators'

const PAUSE = 200 // ms

/** The crossover's window, the suggestion and the networks for it. The present network has no say in it. */
export function useCompensatorsQuery(design: DesignDocument, options: CompensatorOptionsInput) {
  const request: CompensatorsRequestInput = { design: { ...design, name: undefined, compensator: null }, options }
  const asked = JSON.stringify(request)
  const settled = useDebounced(asked, PAUSE)
  const query = useQuery({
    queryKey: ['compensators', settled],
    queryFn: ({ signal }) => api.post('/compensators', JSON.parse(settled), CompensatorProposals, signal),
    placeholderData: keepPreviousData,
  })
  /** Whether the answer in view is to the question as it stands now. */
  return { ...query, isCurrent: asked === settled && query.isSuccess && !query.isPlaceholderData }
}
