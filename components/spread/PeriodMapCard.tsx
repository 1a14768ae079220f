import { mapSentences } from './periodMap'
import { figure, ratio } from '@/components/format'
import { Card } from '@/components/ui/Card'
import { Figure } from '@/components/ui/Figure'
import { FigureGrid } from '@/components/ui/FigureGrid'
import { Notice } from '@/components/ui/Notice'
import { Text } from '@/components/ui/Text'
import type { ClosedLoopMap } from '@/converters/results'

export interface PeriodMapCardProps {
  readonly map: ClosedLoopMap
  /** The transient ends with the duty going up and down. */
  readonly alternates: boolean
}

/** Whether the loop holds still as it switches, ripple at the comparator included. */
export function PeriodMapCard({ map, alternates }: PeriodMapCardProps) {
  const greatest = Math.max(...map.multipliers.map(({ modulus }) => modulus), 0)
  const sentences = mapSentences(map, alternates)
  return (
    <Card title="From period to period">
      <FigureGrid least={140}>
        <Figure
          label="Largest multiplier"
          value={ratio(greatest)}
          verdict={map.isStable ? 'holds' : 'short'}
          note="below 1: what disturbs dies away"
        />
        <Figure
          label="Ripple at the comparator"
          value={figure(map.controlRipple, 'V')}
          note={`against a rise of ${figure(map.rampSpan, 'V')}`}
        />
      </FigureGrid>
      {map.isStable && !map.firesEarly ? (
        sentences.map((sentence) => <Text key={sentence}>{sentence}</Text>)
      ) : (
        <Notice
          kind="fault"
          title={map.isStable ? 'The comparator fires early' : 'The switched loop does not hold still'}
        >
          {sentences.map((sentence) => (
            <Text key={sentence} variant="small">
              {sentence}
            </Text>
          ))}
        </Notice>
      )}
    </Card>
  )
}
