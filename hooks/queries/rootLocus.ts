import { keepPreviousData, useQuery } from '@tanstack/react-query'
import type { DesignDocument, OperatingPointRequest } from '@/converters/document'
import { api } from '@/hooks/api'
import { useDebounced } from '@/hooks/useDebounced'
import { circuitOf } from './circuitOf'
import { RootLocus, type RootLocusRequestInput } from '@/server/contract/rootLoci'

/** Drawn beside other plots, it follows once the typing pauses. */
const PAUSE = 150 // ms

/** Closed-loop poles over the loop's gain; asks nothing while it is not shown or there is no network. */
export function useRootLocusQuery(latest: DesignDocument, operatingPoint: OperatingPointRequest, isShown: boolean) {
  const design = useDebounced(latest, PAUSE)
  const request: RootLocusRequestInput = { design: circuitOf(design), operatingPoint }
  return useQuery({
    queryKey: ['root-locus', request],
    queryFn: ({ signal }) => api.post('/root-loci', request, RootLocus, signal),
    placeholderData: keepPreviousData,
    enabled: isShown && design.compensator != null,
  })
}
