import { setTimeout as wait } from 'node:timers/promises'

import type { SpreadSummary } from '@/converters/spread'
import { RUN_CANCELLED, RUN_EVALUATIONS_DONE, type SpreadWork } from '@/server/compute/messages'
import { type ComputePool, jsonOf } from '@/server/compute/pool'
import type { SpreadRunRequest } from '@/server/contract/spreadRuns'
import { blocksOf } from '@/server/services/spreadRuns/blocks'
import type { Turns } from '@/server/services/spreadRuns/turns'

interface EvaluateRunContext {
  readonly compute: ComputePool
  /** The threads that runs may hold at once. */
  readonly lanes: Turns
  readonly laneCount: number
}

export interface RunProgress {
  readonly evaluationsDone: number
  /** JSON of what can be said so far; null when nothing is new. */
  readonly interim: string | null
}

interface EvaluateRunInput {
  readonly request: SpreadRunRequest
  readonly evaluations: number
  /** Called twice a second. Must not reject. */
  readonly onProgress: (progress: RunProgress) => Promise<void>
  /** Ends the run when aborted, by whoever started it or by its first failure. */
  readonly halt: AbortController
}

const PROGRESS_INTERVAL_MS = 500
/** What a block may still use after it was told to end, before its thread is ended; nearly all end much sooner. */
const HALT_GRACE_MS = 1_000

/**
 * Does a statistical run on the pool, block by block: each asks for its turn anew, so that runs share the threads evenly.
 * Settles only when nothing of the run is left in the pool.
 * @returns the result as JSON
 * @throws the reason with which `halt` was aborted, AppError when the engine refuses
 */
export async function evaluateRun(
  { compute, lanes, laneCount }: EvaluateRunContext,
  { request, evaluations, onProgress, halt }: EvaluateRunInput,
): Promise<string> {
  const control = new Int32Array(new SharedArrayBuffer(2 * Int32Array.BYTES_PER_ELEMENT))
  const kill = new AbortController()
  const finished = new AbortController()
  let grace: NodeJS.Timeout | undefined
  halt.signal.addEventListener('abort', () => {
    Atomics.store(control, RUN_CANCELLED, 1)
    grace = setTimeout(() => kill.abort(), HALT_GRACE_MS)
  })

  const onThread = (work: SpreadWork) => lanes.take(() => compute.runSpread(work, kill.signal), halt.signal)
  const guarded = (work: () => Promise<void>) => work().catch((error: unknown) => halt.abort(error))

  const summaries: SpreadSummary[] = []
  const blocks = blocksOf(request, evaluations)
  let interim: string | null = null
  let isInterimDue = true
  async function doBlocks(): Promise<void> {
    for (let part = blocks.shift(); part; part = blocks.shift()) {
      const answer = await onThread({ kind: 'block', request, part, control })
      if (answer.kind === 'block') summaries.push(answer.summary)
      if (isInterimDue && blocks.length > 0) {
        isInterimDue = false
        interim = textOf(jsonOf(await onThread({ kind: 'interim', summaries: withoutCurves(summaries) })))
      }
    }
  }

  async function report(): Promise<void> {
    while (await pause(finished.signal)) {
      const news = interim
      interim = null
      // Made with the next block, so that the count does not wait for a thread.
      isInterimDue = true
      await onProgress({ evaluationsDone: Atomics.load(control, RUN_EVALUATIONS_DONE), interim: news })
    }
  }

  try {
    halt.signal.throwIfAborted()
    const reporting = guarded(report)
    await Promise.all(Array.from({ length: laneCount }, () => guarded(doBlocks)))
    finished.abort()
    await reporting
    halt.signal.throwIfAborted()
    return textOf(jsonOf(await onThread({ kind: 'result', summaries })))
  } catch (error) {
    // A thread that was ended says only that it was; why is what counts.
    halt.signal.throwIfAborted()
    throw error
  } finally {
    clearTimeout(grace)
  }
}

/** @returns false once there is no need to wait any more. */
const pause = (finished: AbortSignal): Promise<boolean> =>
  wait(PROGRESS_INTERVAL_MS, true, { signal: finished }).catch(() => false)

const textOf = (json: Uint8Array): string => new TextDecoder().decode(json)

/** Distributions and yields need no curves, which are most of what there is to carry. */
const withoutCurves = (summaries: readonly SpreadSummary[]) => summaries.map((summary) => ({ ...summary, kept: [] }))
