import { keepPreviousData, useQuery } from '@tanstack/react-query'
import type { DesignDocument } from '@/converters/document'
import { api } from '@/hooks/api'
import { useDebounced } from '@/hooks/useDebounced'
import { ToleranceCornerSet, type ToleranceCornersRequestInput } from '@/server/contract/toleranceCorners'

/** Hundreds of corners take a good moment: they follow once the typing pauses. */
const PAUSE = 300 // ms

/** The loop at every combination of line, load and tolerance ends; asks nothing while there is no network. */
export function useToleranceCornersQuery(latest: DesignDocument) {
  const design = useDebounced(latest, PAUSE)
  // The targets stay in: the worst corner is the one with the least margin beside them.
  const request: ToleranceCornersRequestInput = { design: { ...design, name: undefined }, options: {} }
  return useQuery({
    queryKey: ['tolerance-corners', request],
    queryFn: ({ signal }) => api.post('/tolerance-corners', request, ToleranceCornerSet, signal),
    placeholderData: keepPreviousData,
    enabled: design.compensator != null,
  })
}
