import type { Limit, Limits } from './Limits'
import { figure } from '@/components/format'
import { Card } from '@/components/ui/Card'
import { Figure, type Verdict } from '@/components/ui/Figure'
import { FigureGrid } from '@/components/ui/FigureGrid'
import type { Simulation, TransientReadings } from '@/converters/results'
import { formatEntry } from '@/hooks/draft/entries'

export interface ReadingsProps {
  readonly simulation: Simulation
  readonly limits: Limits
}

// One below the other on a phone: value and verdict need the width.
const LEAST = 180

/** What is read off a disturbance of the running converter, against the limits. */
export function Readings({ simulation: { readings, prediction }, limits }: ReadingsProps) {
  const { peakDeviation, peakTime, recoveryTime, restDeviation } = readings
  return (
    <Card title="Read off the output">
      <FigureGrid least={LEAST}>
        <Figure
          label="Peak deviation"
          value={figure(peakDeviation, 'V')}
          verdict={against(Math.abs(peakDeviation), limits.deviation)}
          note={`after ${figure(peakTime, 's')}${limitNote(limits.deviation, 'V')}`}
        />
        <Figure
          label="Recovery"
          value={recoveryTime === null ? 'longer' : figure(recoveryTime, 's')}
          verdict={against(recoveryTime ?? Infinity, limits.recovery)}
          note={`to a tenth of the peak${limitNote(limits.recovery, 's')}`}
        />
        <Ringing readings={readings} />
        {prediction ? (
          <Figure
            label="Averaged peak"
            value={figure(prediction.peakDeviation, 'V')}
            note={`after ${figure(prediction.peakTime, 's')}; exact for small steps only`}
          />
        ) : (
          <Figure label="At rest" value={figure(restDeviation, 'V')} note="largest deviation at the end" />
        )}
      </FigureGrid>
    </Card>
  )
}

/** What is read off a start from zero, where only what goes beyond the wanted output counts. */
export function StartReadings({
  simulation: { readings, meanOutput },
  limits,
  wanted,
}: ReadingsProps & { readonly wanted: number }) {
  const overshoot = Math.max(0, Math.max(...meanOutput) - wanted)
  const { recoveryTime, restDeviation } = readings
  return (
    <Card title="Read off the output">
      <FigureGrid least={LEAST}>
        <Figure
          label="Overshoot"
          value={figure(overshoot, 'V')}
          verdict={against(overshoot, limits.deviation)}
          note={`of the mean output${limitNote(limits.deviation, 'V')}`}
        />
        <Figure
          label="Nine tenths of the rise"
          value={recoveryTime === null ? 'not reached' : figure(recoveryTime, 's')}
          note="from the start"
        />
        <Figure label="At rest" value={figure(restDeviation, 'V')} note="largest deviation at the end" />
      </FigureGrid>
    </Card>
  )
}

function Ringing({ readings: { ringingFrequency, decayTimeConstant } }: { readonly readings: TransientReadings }) {
  const note =
    ringingFrequency === null
      ? 'does not swing back'
      : decayTimeConstant === null
        ? 'does not decay'
        : `time constant of its decay ${figure(decayTimeConstant, 's')}`
  return <Figure label="Ringing" value={figure(ringingFrequency, 'Hz')} note={note} />
}

function against(value: number, limit: Limit): Verdict | undefined {
  if (limit.value === null) return undefined
  return value <= limit.value ? 'holds' : 'short'
}

const limitNote = ({ value }: Limit, unit: 's' | 'V') => (value === null ? '' : `, limit ${formatEntry(value, unit)}`)
