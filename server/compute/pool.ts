/** The engine in worker threads, so that a long computation never holds up the server's event loop. */
import { fileURLToPath } from 'node:url'

import { Piscina } from 'piscina'

import type { SpreadAnswer, SpreadWork, TaskRequest, WorkerAnswer, WorkerMessage } from '@/server/compute/messages'
import { warmUpRequest } from '@/server/compute/warmUp'
import { AppError } from '@/server/errors'

export interface ComputePoolOptions {
  readonly threads: number
  /** Tasks that may wait; the next one is turned away. */
  readonly queue: number
  /** From being asked to being answered, waiting included. */
  readonly timeoutMs: number
}

export interface ComputePool {
  /**
   * Computes the answer, as JSON.
   * @param gone - Aborted when nobody wants the answer any more.
   * @throws AppError 'design-refused', 'busy', 'computation-stopped' or, while closing, 'not-ready'
   */
  readonly run: (request: TaskRequest, gone?: AbortSignal) => Promise<Uint8Array>
  /**
   * Does a piece of a statistical run. It waits its turn among the tasks, but is neither turned away nor timed: whoever
   * runs the whole holds to few pieces at once and says when to stop.
   * @param stop - Drops the piece while it waits, and ends its thread once it has begun.
   * @throws AppError 'design-refused' or, while closing, 'not-ready'; AbortError when stopped
   */
  readonly runSpread: (work: SpreadWork, stop: AbortSignal) => Promise<Exclude<SpreadAnswer, { kind: 'refused' }>>
  readonly threads: number
  /** Starts the threads and loads the engine in each. */
  readonly warmUp: () => Promise<void>
  readonly isAlive: () => boolean
  readonly close: () => Promise<void>
}

/** What an abandoned task may still use before its thread is ended; nearly all finish sooner, and a thread is dear. */
const ABANDONED_GRACE_MS = 1_000
const RETRY_AFTER_SECONDS = 2

const isSource = import.meta.url.endsWith('.ts')
const workerFile = fileURLToPath(new URL(isSource ? './worker.ts' : './worker.js', import.meta.url))

export function createComputePool({ threads, queue, timeoutMs }: ComputePoolOptions): ComputePool {
  let isClosed = false
  let pending = 0
  const piscina = new Piscina<WorkerMessage | SpreadWork, WorkerAnswer | SpreadAnswer>({
    filename: workerFile,
    execArgv: isSource ? ['--import', 'tsx'] : [],
    minThreads: threads,
    maxThreads: threads,
  })

  async function run(request: TaskRequest, gone?: AbortSignal): Promise<Uint8Array> {
    if (pending >= threads + queue) throw busy()
    const started = sharedInteger()
    const stop = new AbortController()
    const timeout = setTimeout(() => stop.abort(), timeoutMs)
    let grace: NodeJS.Timeout | undefined
    const abandon = () => {
      if (Atomics.load(started, 0) === 0) stop.abort()
      else grace = setTimeout(() => stop.abort(), ABANDONED_GRACE_MS)
    }
    if (gone?.aborted) abandon()
    else gone?.addEventListener('abort', abandon, { once: true })
    pending += 1
    try {
      return jsonOf(accepted(await piscina.run({ request, started }, { signal: stop.signal })))
    } catch (error) {
      if (isClosed) throw closing()
      if (!stop.signal.aborted) throw error
      throw new AppError('computation-stopped', {
        detail: `No answer within ${timeoutMs / 1000} s. Ask for fewer frequencies, or try again in a moment.`,
        headers: { 'Retry-After': String(RETRY_AFTER_SECONDS) },
      })
    } finally {
      pending -= 1
      clearTimeout(timeout)
      clearTimeout(grace)
      gone?.removeEventListener('abort', abandon)
    }
  }

  async function runSpread(work: SpreadWork, stop: AbortSignal) {
    try {
      return accepted(await piscina.run(work, { name: 'spread', signal: stop }))
    } catch (error) {
      throw isClosed ? closing() : error
    }
  }

  return {
    run,
    runSpread,
    threads,
    warmUp: async () => {
      // Not timed: a thread that starts on a busy machine may take its time, and nobody waits for its answer.
      const warm = () => piscina.run({ request: warmUpRequest, started: sharedInteger() })
      await Promise.all(Array.from({ length: threads }, warm))
    },
    isAlive: () => !isClosed && piscina.threads.length > 0,
    close: async () => {
      isClosed = true
      await piscina.destroy()
    },
  }
}

const sharedInteger = () => new Int32Array(new SharedArrayBuffer(Int32Array.BYTES_PER_ELEMENT))

function accepted<Answer extends WorkerAnswer | SpreadAnswer>(answer: Answer): Exclude<Answer, { kind: 'refused' }> {
  if (answer.kind === 'refused')
    throw new AppError('design-refused', { detail: answer.message, errors: answer.problems })
  return answer as Exclude<Answer, { kind: 'refused' }>
}

/** The JSON of an answer that has one; only the pieces of a statistical run have none. */
export function jsonOf(answer: Exclude<SpreadAnswer, { kind: 'refused' }>): Uint8Array {
  if (answer.kind === 'answered') return answer.json
  throw new TypeError(`A worker answered with a ${answer.kind} in place of JSON.`)
}

function closing(): AppError {
  return new AppError('not-ready', { detail: 'The server is being stopped.' })
}

function busy(): AppError {
  return new AppError('busy', {
    detail: `Try again in ${RETRY_AFTER_SECONDS} seconds.`,
    headers: { 'Retry-After': String(RETRY_AFTER_SECONDS) },
  })
}
