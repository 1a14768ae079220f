import type { Limit, Limits } from './Limits'
import { figure } from '@/components/format'
import { Card } from '@/components/ui/Card'
import { Figure, type Verdict } from '@/components/ui/Figure'
import { FigureGrid } from '@/components/ui/FigureGrid'
import type { Simulation } from '@/converters/results'
import { formatEntry } from '@/hooks/draft/entries'

export interface ReadingsProps {
  readonly simulation: Simulation
  readonly limits: Limits
}

/** What is read off the transient, against the limits. */
export function Readings({ simulation: { readings, prediction }, limits }: ReadingsProps) {
  const { peakDeviation, peakTime, recoveryTime, ringingFrequency, decayTimeConstant, restDeviation } = readings
  return (
    <Card title="Read off the output">
      <FigureGrid least={140}>
        <Figure
          label="Peak deviation"
          value={figure(peakDeviation, 'V')}
          verdict={against(Math.abs(peakDeviation), limits.deviation)}
          note={`after ${figure(peakTime, 's')}`}
        />
        <Figure
          label="Recovery"
          value={recoveryTime === null ? 'longer' : figure(recoveryTime, 's')}
          verdict={against(recoveryTime ?? Infinity, limits.recovery)}
          note={`to a tenth of the peak${limitNote(limits.recovery, 's')}`}
        />
        <Figure
          label="Ringing"
          value={figure(ringingFrequency, 'Hz')}
          note={
            ringingFrequency === null
              ? 'does not swing back'
              : decayTimeConstant === null
                ? 'does not decay'
                : `decays in ${figure(decayTimeConstant, 's')}`
          }
        />
        {prediction ? (
          <Figure
            label="Averaged peak"
            value={figure(prediction.peakDeviation, 'V')}
            note={`after ${figure(prediction.peakTime, 's')}`}
          />
        ) : (
          <Figure label="At rest" value={figure(restDeviation, 'V')} note="largest deviation at the end" />
        )}
      </FigureGrid>
    </Card>
  )
}

function against(value: number, limit: Limit): Verdict | undefined {
  if (limit.value === null) return undefined
  return value <= limit.value ? 'holds' : 'short'
}

const limitNote = ({ value }: Limit, unit: 's') => (value === null ? '' : `, limit ${formatEntry(value, unit)}`)
