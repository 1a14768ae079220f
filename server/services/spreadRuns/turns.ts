/** A number of places that are taken in the order of asking. */
export interface Turns {
  /**
   * Waits for a place, does the work in it and gives it back.
   * @throws the signal's reason when it is aborted while waiting, and whatever the work throws
   */
  readonly take: <T>(work: () => Promise<T>, signal: AbortSignal) => Promise<T>
}

export function createTurns(places: number): Turns {
  let free = places
  const waiting = new Set<() => void>()

  function wait(signal: AbortSignal): Promise<void> {
    signal.throwIfAborted()
    if (free > 0) {
      free -= 1
      return Promise.resolve()
    }
    return new Promise((resolve, reject) => {
      const leave = () => {
        waiting.delete(enter)
        reject(signal.reason)
      }
      const enter = () => {
        signal.removeEventListener('abort', leave)
        resolve()
      }
      waiting.add(enter)
      signal.addEventListener('abort', leave, { once: true })
    })
  }

  function giveBack(): void {
    const [next] = waiting
    if (!next) {
      free += 1
      return
    }
    waiting.delete(next)
    next()
  }

  return {
    async take(work, signal) {
      await wait(signal)
      try {
        return await work()
      } finally {
        giveBack()
      }
    },
  }
}
