/** The statistical runs under way in this process. One process at a time works on the runs of a database. */
import type { Logger } from 'pino'

import type { Database } from '@/db/client'
import { failSpreadRun, finishSpreadRun, markSpreadRunRunning, updateSpreadRunProgress } from '@/db/queries/spreadRuns'
import type { ComputePool } from '@/server/compute/pool'
import type { SpreadRunRequest } from '@/server/contract/spreadRuns'
import { AppError } from '@/server/errors'
import { problemOf } from '@/server/presenters/problem'
import { evaluateRun, type RunProgress } from '@/server/services/spreadRuns/evaluateRun'
import type { SpreadLimits } from '@/server/services/spreadRuns/limits'
import { createTurns } from '@/server/services/spreadRuns/turns'

interface RunnerContext {
  readonly db: Database
  readonly compute: ComputePool
  readonly logger: Logger
  readonly limits: SpreadLimits
}

interface RunToDo {
  readonly id: string
  readonly request: SpreadRunRequest
  readonly evaluations: number
}

export interface SpreadRunner {
  /**
   * Keeps a place for a run of this address, until it has ended or was given back.
   * @throws AppError 'too-many-runs', 'busy' or, while closing, 'not-ready'
   */
  readonly reserve: (id: string, address: string) => void
  readonly giveBack: (id: string) => void
  /** Starts a run that has a place and a row, as soon as it is its turn. */
  readonly start: (run: RunToDo) => void
  /** Stops working on a run; its row is the caller's. */
  readonly cancel: (id: string) => void
  /** Runs that have a place or that a thread still works on. */
  readonly underWay: () => readonly string[]
  /** Takes in no more runs, gives those under way a little time, and fails what is left. */
  readonly close: (graceMs: number) => Promise<void>
}

interface Place {
  readonly address: string
  readonly halt: AbortController
  /** Settles when nothing of the run is left in the pool. */
  work?: Promise<void>
}

const RETRY_AFTER_SECONDS = 10

export function createSpreadRunner({ db, compute, logger, limits }: RunnerContext): SpreadRunner {
  const places = new Map<string, Place>()
  // One thread stays free for visitors who wait for an answer; the only one is shared, block by block.
  const laneCount = Math.max(1, compute.threads - 1)
  const lanes = createTurns(laneCount)
  const running = createTurns(limits.runsAtOnce)
  let isClosing = false

  function reserve(id: string, address: string): void {
    if (isClosing) throw new AppError('not-ready', { detail: 'The server is being stopped.' })
    const wanted = [...places.values()].filter(({ halt }) => !halt.signal.aborted)
    if (wanted.filter((place) => place.address === address).length >= limits.runsOfOneAddress) {
      throw new AppError('too-many-runs', {
        detail: `At most ${limits.runsOfOneAddress} statistical runs of one address are taken in at once. Wait for one to end, or cancel it.`,
      })
    }
    if (wanted.length >= limits.runsAtOnce + limits.queue) {
      throw new AppError('busy', {
        detail: `${wanted.length} statistical runs are waiting or running. Try again in ${RETRY_AFTER_SECONDS} seconds.`,
        headers: { 'Retry-After': String(RETRY_AFTER_SECONDS) },
      })
    }
    places.set(id, { address, halt: new AbortController() })
  }

  async function execute({ id, request, evaluations }: RunToDo, halt: AbortController): Promise<void> {
    if (!(await markSpreadRunRunning(db, id))) return
    const timeout = setTimeout(() => halt.abort(tookTooLong(limits.timeoutMs)), limits.timeoutMs)
    const onProgress = async (progress: RunProgress) => {
      try {
        const isWanted = await updateSpreadRunProgress(db, id, progress)
        if (!isWanted) halt.abort(new RunGivenUp())
      } catch (error) {
        // The next one is due in half a second; the result is what has to get through.
        logger.warn({ err: error, run: id }, 'the progress of a run could not be written')
      }
    }
    try {
      const result = await evaluateRun({ compute, lanes, laneCount }, { request, evaluations, onProgress, halt })
      await finishSpreadRun(db, id, result)
    } finally {
      clearTimeout(timeout)
    }
  }

  async function toItsEnd(run: RunToDo, halt: AbortController): Promise<void> {
    try {
      await running.take(() => execute(run, halt), halt.signal)
    } catch (error) {
      if (error instanceof RunGivenUp) return
      if (!(error instanceof AppError)) logger.error({ err: error, run: run.id }, 'a statistical run broke')
      await failSpreadRun(db, run.id, problemOf(error))
    }
  }

  function start(run: RunToDo): void {
    const place = places.get(run.id)
    if (!place) throw new Error(`Run ${run.id} has no place.`)
    place.work = toItsEnd(run, place.halt)
      // The row stays unfinished; the next sweep fails it.
      .catch((error: unknown) => logger.error({ err: error, run: run.id }, 'the end of a run could not be written'))
      .finally(() => places.delete(run.id))
  }

  async function close(graceMs: number): Promise<void> {
    isClosing = true
    // Still being taken in: they are told when they start.
    for (const { work, halt } of places.values()) if (!work) halt.abort(interrupted())
    const cutOff = setTimeout(() => {
      for (const { halt } of places.values()) halt.abort(interrupted())
    }, graceMs)
    await Promise.all([...places.values()].map(({ work }) => work))
    clearTimeout(cutOff)
  }

  return {
    reserve,
    giveBack: (id) => places.delete(id),
    start,
    cancel: (id) => places.get(id)?.halt.abort(new RunGivenUp()),
    underWay: () => [...places.keys()],
    close,
  }
}

/** Nobody wants the run any more, and its row says so already. */
class RunGivenUp extends Error {
  override readonly name = 'RunGivenUp'
}

function tookTooLong(timeoutMs: number): AppError {
  return new AppError('computation-stopped', {
    detail: `No result within ${timeoutMs / 1000} s. Ask for fewer samples, or for the averaged model.`,
  })
}

/** What a run is told that the server left unfinished. */
export function interrupted(): AppError {
  return new AppError('not-ready', { detail: 'The server was restarted while this ran; start it again.' })
}
