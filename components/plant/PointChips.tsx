import { Choice } from '@/components/ui/Choice'
import type { DesignDocument } from '@/converters/document'
import { operatingPointOf, type PointChoice } from '@/hooks/draft/schema'
import { draftStore } from '@/hooks/draft/store'
import { useDraft } from '@/hooks/draft/useDraft'
import { formatEntry } from '@/hooks/draft/entries'

const POINTS: readonly PointChoice[] = [
  { line: 'nominal', load: 'maximum' },
  { line: 'minimum', load: 'maximum' },
  { line: 'maximum', load: 'maximum' },
  { line: 'nominal', load: 'minimum' },
  { line: 'minimum', load: 'minimum' },
  { line: 'maximum', load: 'minimum' },
]

const keyOf = ({ line, load }: PointChoice) => `${line} ${load}`

/** The operating point at which everything on the screens is shown: nominal first, then the corners. */
export function PointChips() {
  const { design, point } = useDraft()
  return (
    <Choice
      label="Operating point"
      value={keyOf(point)}
      options={distinct(design).map((choice) => ({ value: keyOf(choice), label: pointLabel(design, choice) }))}
      onChange={(key) => {
        const chosen = POINTS.find((choice) => keyOf(choice) === key)
        if (chosen) draftStore.choosePoint(chosen)
      }}
    />
  )
}

export function pointLabel(design: DesignDocument, choice: PointChoice): string {
  const { lineVoltage, outputCurrent } = operatingPointOf(design, choice)
  return `${formatEntry(lineVoltage, 'V')}, ${formatEntry(outputCurrent, 'A')}`
}

/** A fixed line or load has no corners. */
function distinct(design: DesignDocument): readonly PointChoice[] {
  const seen = new Set<string>()
  return POINTS.filter((choice) => {
    const label = pointLabel(design, choice)
    if (seen.has(label)) return false
    seen.add(label)
    return true
  })
}
