import { keepPreviousData, useQuery } from '@tanstack/react-query'
import { useMemo } from 'react'
import type { DesignDocument, OperatingPointRequest } from '@/converters/document'
import { api } from '@/hooks/api'
import { frequencyGrid } from '@/hooks/frequencyGrid'
import { circuitOf } from './circuitOf'
import { Analysis, type AnalysisRequestInput } from '@/server/contract/analyses'

/** One design at one operating point. The last answer stays in view while the next one is computed. */
export function useAnalysisQuery(design: DesignDocument, operatingPoint: OperatingPointRequest) {
  const { switchingFrequency } = design
  const frequencies = useMemo(() => frequencyGrid(switchingFrequency), [switchingFrequency])
  const request: AnalysisRequestInput = { design: circuitOf(design), operatingPoint, frequencies }
  return useQuery({
    queryKey: ['analyses', request],
    queryFn: ({ signal }) => api.post('/analyses', request, Analysis, signal),
    placeholderData: keepPreviousData,
  })
}
