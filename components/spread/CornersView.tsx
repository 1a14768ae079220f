import { BarList } from './BarList'
import { Failures } from './Failures'
import { PlacedFigures } from './PlacedFigures'
import { VariedValues } from './VariedValues'
import { ViewChips } from './Views'
import { count, sentence } from './words'
import { ratio } from '@/components/format'
import { Caution } from '@/components/design/Cautions'
import { Columns } from '@/components/design/Columns'
import { EntryNotice } from '@/components/design/EntryNotice'
import { Fault } from '@/components/design/Fault'
import { Card } from '@/components/ui/Card'
import { Notice } from '@/components/ui/Notice'
import { Loading } from '@/components/ui/states'
import { Text } from '@/components/ui/Text'
import type { CornerQuantity, ToleranceCornerSet } from '@/converters/spread/results'
import { useDraft } from '@/hooks/draft/useDraft'
import { useToleranceCornersQuery } from '@/hooks/queries/toleranceCorners'
import { useLast } from '@/hooks/useLast'

/** Line, load and every tolerance at its ends: the worst of it, what makes it, what counts most. */
export function CornersView() {
  const { design } = useDraft()
  const query = useToleranceCornersQuery(design)
  const corners = useLast(query.data)
  const { error } = query
  return (
    <Columns
      phoneOrder={['inputs', 'curves', 'figures']}
      inputs={
        <>
          <ViewChips />
          <EntryNotice />
          {error ? <Fault error={error} isStale={corners !== undefined} onRetry={() => void query.refetch()} /> : null}
          {corners ? (
            <Worst corners={corners} />
          ) : error ? null : (
            <Loading label="Computing the corners" bars={[330]} />
          )}
        </>
      }
      curves={
        corners ? (
          <Making corners={corners} />
        ) : error ? null : (
          <Loading label="Looking for what makes the worst corner" bars={[420]} />
        )
      }
      figures={
        <>
          {corners ? <Influences quantities={corners.quantities} /> : null}
          <Caution />
        </>
      }
    />
  )
}

function Worst({ corners }: { readonly corners: ToleranceCornerSet }) {
  const { worst, targets, failures, model } = corners
  return (
    <>
      <Card title="Worst corner">
        {worst ? (
          <>
            <Text>{verdictSentence(worst.margins.isStable, worst.slack)}</Text>
            <PlacedFigures placed={worst} targets={targets} />
            <Text variant="small" tone="quiet">
              {`Worst of ${count(corners.corners.length)} corners of line, load and tolerances, ${model} model. Duty cycle ${ratio(worst.dutyCycle)}, ${worst.conduction} conduction.`}
            </Text>
          </>
        ) : (
          <Text>No corner has an operating point, so there are no margins to compare.</Text>
        )}
      </Card>
      <Failures failures={failures} of="corners" />
    </>
  )
}

function verdictSentence(isStable: boolean, slack: number): string {
  if (!isStable) return 'At its worst corner the loop is unstable.'
  return slack >= 0
    ? 'Every aim holds, even at the worst corner.'
    : 'At the worst corner at least one margin is short of its aim.'
}

function Making({ corners }: { readonly corners: ToleranceCornerSet }) {
  const { worst, quantities, note } = corners
  if (!worst) return null
  return (
    <Card title="What makes the worst corner">
      <VariedValues label="Values at the worst corner" quantities={quantities} values={worst.values} />
      {note ? <Notice kind="note">{note}</Notice> : null}
    </Card>
  )
}

function Influences({ quantities }: { readonly quantities: readonly CornerQuantity[] }) {
  const ranked = quantities
    .filter(({ group }) => group !== 'line' && group !== 'load')
    .sort((a, b) => b.influence - a.influence)
  return (
    <Card title="What counts most">
      {ranked.length === 0 ? (
        <Text>Nothing but line and load varies: give the parts tolerances on the Stage screen.</Text>
      ) : (
        <>
          <Text variant="small" tone="quiet">
            How far the margins move while one part goes from end to end and all else stays nominal: shares of their
            aims, summed.
          </Text>
          <BarList
            label="Quantities by influence"
            items={ranked.map(({ key, label, influence }) => ({
              key,
              name: sentence(label),
              text: influence.toFixed(2),
              value: influence,
            }))}
          />
        </>
      )}
    </Card>
  )
}
