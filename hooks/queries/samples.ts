import { useMutation, useQuery } from '@tanstack/react-query'
import { api } from '@/hooks/api'
import { Sample, SampleList } from '@/server/contract/samples'

/** The worked samples, as cards show them. */
export function useSamplesQuery() {
  return useQuery({ queryKey: ['samples'], queryFn: ({ signal }) => api.get('/samples', SampleList, signal) })
}

/** Fetches one sample with its design. */
export function useOpenSampleMutation() {
  return useMutation({ mutationFn: (slug: string) => api.get(`/samples/${encodeURIComponent(slug)}`, Sample) })
}
