import { useDebounced } from './useDebounced'
import { useDesignAnalysis } from './useDesignAnalysis'

/** Work that is over sooner than this is not worth a word. */
const PATIENCE = 250 // ms

/** Whether the figures in view are about to change and have been for a noticeable while. */
export function useIsUpdating(): boolean {
  const { isUpdating } = useDesignAnalysis()
  return useDebounced(isUpdating, PATIENCE) && isUpdating
}
