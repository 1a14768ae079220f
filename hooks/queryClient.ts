import { QueryClient } from '@tanstack/react-query'
import { ApiError } from './api'

const MOST_TRIES = 3

/** Only what may pass by itself is tried again: a busy server, a lost connection. */
function mayPass(error: Error): boolean {
  if (!(error instanceof ApiError)) return false
  return (
    error.failure.kind === 'unreachable' || (error.failure.kind === 'problem' && error.failure.problem.status === 503)
  )
}

function waitBefore(attempt: number, error: Error): number {
  const asked = error instanceof ApiError && error.failure.kind === 'problem' ? error.failure.retryAfter : null
  return asked === null ? 400 * 2 ** attempt : Math.min(asked, 10) * 1000
}

export function createQueryClient(): QueryClient {
  return new QueryClient({
    defaultOptions: {
      queries: {
        // The same question has the same answer for as long as the engine's version stands.
        staleTime: Number.POSITIVE_INFINITY,
        gcTime: 5 * 60_000,
        networkMode: 'always',
        refetchOnWindowFocus: false,
        refetchOnReconnect: (query) => query.state.status === 'error',
        retry: (count, error) => count < MOST_TRIES - 1 && mayPass(error),
        retryDelay: waitBefore,
      },
      mutations: {
        networkMode: 'always',
        retry: (count, error) => count < 1 && mayPass(error),
        retryDelay: waitBefore,
      },
    },
  })
}
