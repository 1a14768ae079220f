import { count, shareDown, shareUp } from './words'
import { Card } from '@/components/ui/Card'
import { Figure } from '@/components/ui/Figure'
import { FigureGrid } from '@/components/ui/FigureGrid'
import { Text } from '@/components/ui/Text'
import type { YieldKey } from '@/converters/spread/results'
import type { SpreadInterim } from '@/server/contract/spreadRuns'

const NAMES: readonly { readonly key: YieldKey; readonly label: string }[] = [
  { key: 'all', label: 'All aims hold' },
  { key: 'stable', label: 'Stable' },
  { key: 'phaseMargin', label: 'Phase margin holds' },
  { key: 'gainMargin', label: 'Gain margin holds' },
  { key: 'modulusMargin', label: 'Modulus margin holds' },
  { key: 'reached', label: 'Could be computed' },
]

export interface YieldsProps {
  readonly outcome: SpreadInterim
  /** Of the intervals; not known before the end. */
  readonly confidence?: number | undefined
}

/** The share of the samples that hold each aim, with the interval in which the true yield lies. */
export function Yields({ outcome: { yields, samples }, confidence = 0.95 }: YieldsProps) {
  return (
    <Card title="Yield">
      <FigureGrid least={150}>
        {NAMES.map(({ key, label }) => {
          const { share, lower, upper, passed } = yields[key]
          return (
            <Figure
              key={key}
              label={label}
              value={shareDown(share)}
              note={`${shareDown(lower)} to ${shareUp(upper)}, ${count(passed)} of ${count(samples)}`}
            />
          )
        })}
      </FigureGrid>
      <Text variant="small" tone="quiet">
        {`Below each: its Clopper–Pearson interval at ${Math.round(100 * confidence)} % confidence.`}
      </Text>
    </Card>
  )
}
