import { figure } from '@/components/format'
import { LaterStep } from '@/components/plots/later'
import { Card } from '@/components/ui/Card'
import { Figure } from '@/components/ui/Figure'
import { FigureGrid } from '@/components/ui/FigureGrid'
import { Text } from '@/components/ui/Text'
import type { Mode, StepResponse } from '@/converters/results'
import type { Analysis } from '@/server/contract/analyses'

/** What the output does after a step of the load and of the line. */
export function Steps({ steps }: { readonly steps: NonNullable<Analysis['steps']> }) {
  return (
    <Card title="After a step">
      <Step name="Load step" unit="A" step={steps.load} />
      <Step name="Line step" unit="V" step={steps.line} />
      <Text variant="small" tone="quiet">
        Averaged model, small steps: no limits of duty or current. Deviation of the output from its resting value.
      </Text>
    </Card>
  )
}

function Step({ name, unit, step }: { readonly name: string; readonly unit: 'A' | 'V'; readonly step: StepResponse }) {
  const size = figure(step.size, unit)
  const mode = step.modes[0]
  return (
    <>
      <LaterStep
        title={`${name} of ${size}`}
        fileName={`steadrail-${name.toLowerCase().replace(' ', '-')}`}
        summary={`${name} of ${size}: peak ${figure(step.peakDeviation, 'V')} after ${figure(step.peakTime, 's')}.`}
        time={step.time}
        deviation={step.outputDeviation}
      />
      <FigureGrid least={120}>
        <Figure label="Peak" value={figure(step.peakDeviation, 'V')} note={`after ${figure(step.peakTime, 's')}`} />
        <Figure
          label="Recovery"
          value={step.recoveryTime === null ? 'longer' : figure(step.recoveryTime, 's')}
          note="to a tenth of the peak"
        />
        {mode ? <Figure label="Leading mode" value={figure(mode.timeConstant, 's')} note={modeNote(mode)} /> : null}
      </FigureGrid>
    </>
  )
}

function modeNote({ ringingFrequency }: Mode): string {
  return ringingFrequency > 0 ? `rings at ${figure(ringingFrequency, 'Hz')}` : 'decays without ringing'
}
