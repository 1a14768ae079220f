import { operatingPointOf } from './draft/schema'
import { useDraft } from './draft/useDraft'
import { useAnalysisQuery } from './queries/analyses'
import { useLast } from './useLast'

/**
 * The open design at its chosen operating point. While the design cannot be computed the last answer stays in view,
 * marked by `isStale`.
 */
export function useDesignAnalysis() {
  const { design, point } = useDraft()
  const query = useAnalysisQuery(design, operatingPointOf(design, point))
  const analysis = useLast(query.data)
  return {
    analysis,
    error: query.error,
    isUpdating: query.isFetching,
    isStale: query.isError && analysis !== undefined,
    retry: () => void query.refetch(),
  }
}
