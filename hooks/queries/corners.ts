import { keepPreviousData, useQuery } from '@tanstack/react-query'
import type { DesignDocument } from '@/converters/document'
import { api } from '@/hooks/api'
import { frequencyGrid } from '@/hooks/frequencyGrid'
import { useDebounced } from '@/hooks/useDebounced'
import { circuitOf } from './circuitOf'
import { CornerSet, type CornersRequestInput } from '@/server/contract/corners'

/** A row of corners is some ten times one analysis: it follows once the typing pauses. */
const PAUSE = 150 // ms

/** The loop at every corner of line and load; asks nothing while there is no network. */
export function useCornersQuery(latest: DesignDocument) {
  const design = useDebounced(latest, PAUSE)
  const request: CornersRequestInput = {
    design: circuitOf(design),
    frequencies: frequencyGrid(design.switchingFrequency),
  }
  return useQuery({
    queryKey: ['corners', request],
    queryFn: ({ signal }) => api.post('/corners', request, CornerSet, signal),
    placeholderData: keepPreviousData,
    enabled: design.compensator != null,
  })
}
