import { useEffect, useState } from 'react'
import { readDesignText, type ReadDesign } from './designText'
import { decodeText } from './linkCodec'

export type LinkedDesign =
  | { readonly kind: 'none' }
  | { readonly kind: 'reading' }
  | { readonly kind: 'damaged'; readonly message: string }
  | { readonly kind: 'read'; readonly read: ReadDesign }

/** The design in the part of the address after #, if there is one. */
export function useLinkedDesign(): LinkedDesign {
  const [linked, setLinked] = useState<LinkedDesign>({ kind: 'reading' })
  useEffect(() => {
    let isCurrent = true
    const settle = (next: LinkedDesign) => isCurrent && setLinked(next)
    const read = () => {
      const code = new URLSearchParams(window.location.hash.slice(1)).get('d')
      if (code === null) return settle({ kind: 'none' })
      settle({ kind: 'reading' })
      decodeText(code).then(
        (text) => settle({ kind: 'read', read: readDesignText(text) }),
        (error: unknown) =>
          settle({ kind: 'damaged', message: error instanceof Error ? error.message : 'The link cannot be read.' }),
      )
    }
    read()
    window.addEventListener('hashchange', read)
    return () => {
      isCurrent = false
      window.removeEventListener('hashchange', read)
    }
  }, [])
  return linked
}
