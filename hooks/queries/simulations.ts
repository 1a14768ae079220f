import { keepPreviousData, useQuery } from '@tanstack/react-query'
import type { DesignDocument } from '@/converters/document'
import type { SimulationOptionsInput } from '@/converters/simulation/scenario'
import { api } from '@/hooks/api'
import { useDebounced } from '@/hooks/useDebounced'
import { circuitOf } from './circuitOf'
import { Simulation, type SimulationRequestInput } from '@/server/contract/simulations'

/** Thousands of periods take a moment: they follow once the typing pauses. */
const PAUSE = 300 // ms

/** The closed loop cycle by cycle through one scenario; asks nothing while there is no network. */
export function useSimulationQuery(latest: DesignDocument, options: SimulationOptionsInput) {
  const design = useDebounced(latest, PAUSE)
  const request: SimulationRequestInput = { design: circuitOf(design), options }
  return useQuery({
    queryKey: ['simulation', request],
    queryFn: ({ signal }) => api.post('/simulations', request, Simulation, signal),
    placeholderData: keepPreviousData,
    enabled: design.compensator != null,
  })
}
