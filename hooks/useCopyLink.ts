import { useState } from 'react'
import { writeDesignText } from './designText'
import { useDraft } from './draft/useDraft'
import { encodeText } from './linkCodec'

type Outcome = 'none' | 'copied' | 'failed'
const SHOWN_FOR = 3000 // ms

/** Copies text and says for a moment how that went. */
export function useCopy(text: () => Promise<string>) {
  const [outcome, setOutcome] = useState<Outcome>('none')
  const copy = () => {
    text()
      .then((whole) => navigator.clipboard.writeText(whole))
      .then(
        () => setOutcome('copied'),
        () => setOutcome('failed'),
      )
      .finally(() => setTimeout(() => setOutcome('none'), SHOWN_FOR))
  }
  return { copy, outcome }
}

/** The address that opens a design in any browser; the design is in the part after #, which no server sees. */
export async function designLink(text: string): Promise<string> {
  return `${window.location.origin}/open#d=${await encodeText(text)}`
}

export function useCopyLink() {
  const { design } = useDraft()
  return useCopy(() => designLink(JSON.stringify(design)))
}

export function useCopyJson() {
  const { design } = useDraft()
  return useCopy(() => Promise.resolve(writeDesignText(design)))
}
