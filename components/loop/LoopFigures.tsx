import { figure, modulusVerdict, ratio, verdictOf } from '@/components/format'
import { Figure } from '@/components/ui/Figure'
import { FigureGrid } from '@/components/ui/FigureGrid'
import { formatQuantity } from '@/converters/quantities'
import type { Corner, CornerSet, Margins } from '@/converters/results'
import { formatEntry } from '@/hooks/draft/entries'
import type { DesignDocument } from '@/converters/document'

export interface LoopFiguresProps {
  readonly margins: Margins
  readonly corners: CornerSet | undefined
  readonly targets: DesignDocument['targets']
}

/** Crossover and margins, each with its verdict, and the worst corner behind them. */
export function LoopFigures({ margins, corners, targets }: LoopFiguresProps) {
  const worst = corners?.corners[corners.worst]
  const least = leastGainMargin(corners)
  const unstable = margins.isStable ? undefined : 'unstable'
  return (
    <FigureGrid least={150}>
      <Figure label="Crossover" value={figure(margins.crossover, 'Hz')} note={unstable} />
      <Figure
        label="Phase margin"
        value={figure(margins.phaseMargin, '°')}
        verdict={verdictOf(margins.phaseMargin, targets.phaseMargin, '°')}
        note={`aim ${formatEntry(targets.phaseMargin, '°')}`}
      />
      <Figure
        label="Gain margin"
        value={figure(margins.gainMargin, 'dB')}
        verdict={verdictOf(margins.gainMargin, targets.gainMargin, 'dB')}
        note={margins.gainMargin === null ? 'phase stays above −180°' : `aim ${formatEntry(targets.gainMargin, 'dB')}`}
      />
      <Figure
        label="Modulus margin"
        value={ratio(margins.modulusMargin)}
        verdict={modulusVerdict(margins.modulusMargin)}
        note={margins.delayMargin === null ? undefined : `delay margin ${figure(margins.delayMargin, 's')}`}
      />
      <Figure
        label="Phase margin, worst corner"
        value={worst ? (worst.margins.isStable ? figure(worst.margins.phaseMargin, '°') : 'unstable') : '…'}
        verdict={
          worst && (worst.margins.isStable ? verdictOf(worst.margins.phaseMargin, targets.phaseMargin, '°') : 'short')
        }
        note={worst ? cornerName(worst) : 'over line and load'}
      />
      <Figure
        label="Gain margin, worst corner"
        value={least ? figure(least.margins.gainMargin, 'dB') : corners ? 'none' : '…'}
        verdict={least && verdictOf(least.margins.gainMargin, targets.gainMargin, 'dB')}
        note={least ? cornerName(least) : 'over line and load'}
      />
    </FigureGrid>
  )
}

/** The corner whose gain margin is the smallest; undefined where no corner has one. */
function leastGainMargin(corners: CornerSet | undefined): Corner | undefined {
  return corners?.corners
    .filter((corner) => corner.margins.gainMargin !== null)
    .reduce<Corner | undefined>(
      (least, corner) => ((least?.margins.gainMargin ?? Infinity) <= (corner.margins.gainMargin ?? 0) ? least : corner),
      undefined,
    )
}

function cornerName({ lineVoltage, outputCurrent }: Corner): string {
  return `${formatQuantity(lineVoltage, 'V')}, ${formatQuantity(outputCurrent, 'A')}`
}
