/** How much of the service statistical runs may take. */

export interface SpreadLimits {
  /** From the first evaluation to the result, ms. */
  readonly timeoutMs: number
  /** Runs of one address that are not finished. */
  readonly runsOfOneAddress: number
  /** Runs that take turns on the threads. */
  readonly runsAtOnce: number
  /** Runs that wait behind them; the next one is turned away. */
  readonly queue: number
}

export const SHARED_LIMITS: Pick<SpreadLimits, 'runsOfOneAddress' | 'runsAtOnce' | 'queue'> = {
  runsOfOneAddress: 2,
  runsAtOnce: 4,
  queue: 20,
}

/** How long a run is kept from its start. */
export const KEPT_MS = 24 * 60 * 60_000
