import { createContext, useContext } from 'react'
import type { Problems } from './entries'

/** What the server said about single entries of the open design, by path. */
export const ServerProblems = createContext<Problems>({})

export function useServerProblems(): Problems {
  return useContext(ServerProblems)
}
