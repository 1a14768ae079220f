import { Notice } from '@/components/ui/Notice'
import { fieldSpec, isEntry } from '@/hooks/draft/fields'
import { useEntryProblems } from '@/hooks/draft/useDraft'

/** Says on every screen that some entries are not part of the figures, and which. */
export function EntryNotice() {
  const paths = Object.keys(useEntryProblems())
  if (paths.length === 0) return null
  const names = [...new Set(paths.map((path) => (isEntry(path) ? fieldSpec(path).label : path)))]
  return (
    <Notice
      kind="caution"
      isLive
      title={names.length === 1 ? 'One entry is not used yet' : 'Some entries are not used yet'}
    >
      {`${names.join(', ')}: see the reason beside the entry. The figures are for the values before.`}
    </Notice>
  )
}
