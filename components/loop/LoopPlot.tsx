import { useMemo } from 'react'
import { figure } from '@/components/format'
import { BodePlot } from '@/components/plots/BodePlot'
import { bandOf, type BodeCurve } from '@/components/plots/bode'
import type { CornerSet, Margins } from '@/converters/results'
import type { Analysis } from '@/server/contract/analyses'

export interface LoopPlotProps {
  readonly loop: NonNullable<Analysis['loop']>
  readonly margins: Margins
  readonly corners: CornerSet | undefined
  readonly frequencies: readonly number[]
}

/** The loop gain: switched solid, averaged dashed, the spread of the corners behind them. */
export function LoopPlot({ loop, margins, corners, frequencies }: LoopPlotProps) {
  const band = useMemo(() => {
    const matches = corners?.frequencies.length === frequencies.length
    return matches ? bandOf(corners.corners.map((corner) => corner.loop)) : null
  }, [corners, frequencies])
  const curves: BodeCurve[] = [{ key: 'switched', label: 'switched', response: loop.response.switched }]
  if (loop.response.averaged.length > 0) {
    curves.push({ key: 'averaged', label: 'averaged', response: loop.response.averaged, isDashed: true })
  }
  const { crossover, phaseMargin } = margins
  return (
    <BodePlot
      title="Loop gain"
      fileName="steadrail-loop-gain"
      summary={`Loop gain. Crossover ${figure(crossover, 'Hz')}, phase margin ${figure(phaseMargin, '°')}, gain margin ${figure(
        margins.gainMargin,
        'dB',
      )}.`}
      frequencies={frequencies}
      curves={curves}
      band={band}
      gainTitle="Gain, dB"
      crossover={crossover === null || phaseMargin === null ? null : { frequency: crossover, phaseMargin }}
      height={460}
    />
  )
}
