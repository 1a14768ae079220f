import { useMemo } from 'react'
import { readForm } from './runForm'
import { ApiError, fieldProblems } from '@/hooks/api'
import { useDraft } from '@/hooks/draft/useDraft'
import {
  isUnderWay,
  useCancelSpreadRunMutation,
  useSpreadRunQuery,
  useStartSpreadRunMutation,
} from '@/hooks/queries/spreadRuns'
import { isSameDesign, spreadStore, useKeptSpread } from '@/hooks/spread/keptSpread'

/** The statistical run that this browser started last, wherever it stands, and what can be done about it. */
export function useStatisticalRun() {
  const { design } = useDraft()
  const { form, run: kept } = useKeptSpread()
  const query = useSpreadRunQuery(kept?.id ?? null)
  const starting = useStartSpreadRunMutation()
  const cancelling = useCancelSpreadRunMutation()
  const read = useMemo(() => readForm(form), [form])
  const isOlder = useMemo(() => kept !== null && !isSameDesign(kept.design, design), [kept, design])
  const run = query.data
  const isGone = isNotFound(query.error)
  const start = () => {
    if (read.kind !== 'options') return
    starting.mutate({ design, options: read.options }, { onSuccess: ({ id }) => spreadStore.keepRun(id, design) })
  }
  return {
    run: isGone ? undefined : run,
    /** The design that the run is of. */
    design: kept?.design ?? design,
    isOlder,
    isGone,
    isBusy: isUnderWay(run) || starting.isPending,
    isLoading: kept !== null && query.isPending,
    isCancelling: cancelling.isPending,
    /** False while an entry cannot be read; what the server refused may be tried again. */
    canStart: read.kind === 'options',
    problems: { ...refusedOptions(starting.error), ...(read.kind === 'problems' ? read.problems : {}) },
    error: starting.error ?? cancelling.error ?? (isGone ? null : query.error),
    start,
    cancel: () => kept && cancelling.mutate(kept.id),
    retry: () => void (starting.error ? start() : query.refetch()),
  }
}
export type StatisticalRun = ReturnType<typeof useStatisticalRun>

function isNotFound(error: Error | null): boolean {
  return error instanceof ApiError && error.failure.kind === 'problem' && error.failure.problem.status === 404
}

function refusedOptions(error: Error | null): Record<string, string> {
  return Object.fromEntries(
    fieldProblems(error)
      .filter(({ field }) => field.startsWith('options.'))
      .map(({ field, message }) => [field.slice('options.'.length), message]),
  )
}
