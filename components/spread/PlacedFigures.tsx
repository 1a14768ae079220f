import { figure, modulusVerdict, ratio, verdictOf } from '@/components/format'
import { Figure } from '@/components/ui/Figure'
import { FigureGrid } from '@/components/ui/FigureGrid'
import { formatEntry } from '@/hooks/draft/entries'
import type { AppliedTargets, PlacedMargins } from '@/converters/spread/results'

export interface PlacedFiguresProps {
  readonly placed: PlacedMargins
  readonly targets: AppliedTargets
}

/** The loop at one corner or sample, each margin against its aim. */
export function PlacedFigures({ placed, targets }: PlacedFiguresProps) {
  const { crossover, phaseMargin, gainMargin, modulusMargin, isStable } = placed.margins
  return (
    <FigureGrid least={160}>
      <Figure
        label="Phase margin"
        isWord={!isStable}
        value={isStable ? figure(phaseMargin, '°') : 'unstable'}
        verdict={isStable ? verdictOf(phaseMargin, targets.phaseMargin, '°') : 'short'}
        note={`aim ${formatEntry(targets.phaseMargin, '°')}`}
      />
      <Figure
        label="Gain margin"
        value={figure(gainMargin, 'dB')}
        verdict={verdictOf(gainMargin, targets.gainMargin, 'dB')}
        note={gainMargin === null ? 'phase stays above −180°' : `aim ${formatEntry(targets.gainMargin, 'dB')}`}
      />
      <Figure
        label="Modulus margin"
        value={ratio(modulusMargin)}
        verdict={isStable ? modulusVerdict(modulusMargin) : 'short'}
        note={`aim ${ratio(targets.modulusMargin)}`}
      />
      <Figure
        label="Crossover"
        value={figure(crossover, 'Hz')}
        note={`${formatEntry(Number(placed.lineVoltage.toPrecision(3)), 'V')}, ${formatEntry(Number(placed.outputCurrent.toPrecision(3)), 'A')}`}
      />
    </FigureGrid>
  )
}
