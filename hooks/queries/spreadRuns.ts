import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query'
import type { DesignDocument } from '@/converters/document'
import type { SpreadOptionsInput } from '@/converters/spread/options'
import { api } from '@/hooks/api'
import { SpreadRun, type SpreadRunRequestInput } from '@/server/contract/spreadRuns'

/** How often a run under way is asked for; the server notes its progress as often. */
const INTERVAL = 500 // ms

const spreadRunKeys = { one: (id: string | null) => ['spread-run', id] as const }

export const isUnderWay = (run: SpreadRun | undefined): boolean => run?.state === 'queued' || run?.state === 'running'

/** A statistical run by its id, from whatever page; asked for again and again until it has ended. */
export function useSpreadRunQuery(id: string | null) {
  return useQuery({
    queryKey: spreadRunKeys.one(id),
    queryFn: ({ signal }) => api.get(`/spread-runs/${id}`, SpreadRun, signal),
    enabled: id !== null,
    refetchInterval: ({ state }) => (isUnderWay(state.data) ? INTERVAL : false),
    refetchIntervalInBackground: true,
  })
}

export function useStartSpreadRunMutation() {
  const queryClient = useQueryClient()
  return useMutation({
    mutationFn: ({ design, options }: { design: DesignDocument; options: SpreadOptionsInput }) => {
      const request: SpreadRunRequestInput = { design, options }
      return api.post('/spread-runs', request, SpreadRun)
    },
    onSuccess: (run) => queryClient.setQueryData(spreadRunKeys.one(run.id), run),
  })
}

export function useCancelSpreadRunMutation() {
  const queryClient = useQueryClient()
  return useMutation({
    mutationFn: (id: string) => api.delete(`/spread-runs/${id}`, SpreadRun),
    onSuccess: (run) => queryClient.setQueryData(spreadRunKeys.one(run.id), run),
  })
}
