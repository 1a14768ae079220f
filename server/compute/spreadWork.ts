/** What a worker thread does of a statistical run. */
import { mergeSummaries, presentSummary, startRun, type SpreadSummary } from '@/converters/spread'
import { RUN_CANCELLED, RUN_EVALUATIONS_DONE, type SpreadAnswer, type SpreadWork } from '@/server/compute/messages'
import type { SpreadInterim, SpreadResult } from '@/server/contract/spreadRuns'
import { writeAnswer } from '@/server/presenters/answer'

/** Between two looks at whether the run is still wanted: some tens of milliseconds of the slower model. */
const EVALUATIONS_AT_ONCE = 25

/** @throws DesignError */
export function doSpreadWork(work: SpreadWork): SpreadAnswer {
  if (work.kind === 'block') return { kind: 'block', summary: runBlock(work) }
  const result = presentSummary(merged(work.summaries)) satisfies SpreadResult
  const { samples, yields, distributions } = result
  const answer = work.kind === 'result' ? result : ({ samples, yields, distributions } satisfies SpreadInterim)
  return { kind: 'answered', json: writeAnswer(answer) }
}

/** Ends early, with what it has so far, once the run is cancelled. */
function runBlock({ request, part, control }: Extract<SpreadWork, { kind: 'block' }>): SpreadSummary {
  const run = startRun(request.design, request.options, part)
  let isUnfinished = true
  let counted = 0
  while (isUnfinished && Atomics.load(control, RUN_CANCELLED) === 0) {
    isUnfinished = run.next(EVALUATIONS_AT_ONCE)
    Atomics.add(control, RUN_EVALUATIONS_DONE, run.progress.done - counted)
    counted = run.progress.done
  }
  return run.summary()
}

function merged([first, ...rest]: readonly SpreadSummary[]): SpreadSummary {
  if (!first) throw new RangeError('A run without a block has no summary.')
  return mergeSummaries([first, ...rest])
}
