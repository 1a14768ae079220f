import { figure, ratio } from '@/components/format'
import { Figure } from '@/components/ui/Figure'
import { FigureGrid } from '@/components/ui/FigureGrid'
import { formatQuantity } from '@/converters/quantities'
import type { OperatingPoint } from '@/converters/results'

/** The operating point in the figures that a designer looks for first. */
export function OperatingFigures({ point }: { readonly point: OperatingPoint }) {
  const at = `${formatQuantity(point.lineVoltage, 'V')}, ${formatQuantity(point.outputCurrent, 'A')}`
  const { boundaryCurrent, inductorCurrent } = point
  return (
    <FigureGrid>
      <Figure label="Duty cycle" value={ratio(point.dutyCycle, 4)} note={`at ${at}`} />
      <Figure
        label="Conduction"
        isWord
        value={point.conduction === 'continuous' ? 'continuous' : 'discontinuous'}
        note={boundaryCurrent === null ? 'synchronous rectifier' : `boundary at ${figure(boundaryCurrent, 'A')}`}
      />
      <Figure label="Inductor ripple" value={figure(inductorCurrent.ripple, 'A')} note="peak to peak" />
      <Figure
        label="Inductor peak"
        value={figure(inductorCurrent.peak, 'A')}
        note={`valley ${figure(inductorCurrent.valley, 'A')}`}
      />
      <Figure label="Output ripple" value={figure(point.outputRipple, 'V')} note="peak to peak" />
      <Figure label="Efficiency" value={formatQuantity(point.efficiency, '%')} note={`conduction losses only`} />
    </FigureGrid>
  )
}
