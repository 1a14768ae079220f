import { VictoryAxis, VictoryBar, VictoryChart, VictoryLabel, VictoryLine } from 'victory-native'
import { PlotFrame } from './PlotFrame'
import { PADDING, ticksAcross, tickText, unitFor, useAxisStyles } from './victoryStyle'
import { figure } from '@/components/format'
import type { Unit } from '@/converters/quantities'
import { formatEntry } from '@/hooks/draft/entries'
import { useTheme } from '@/hooks/useTheme'

export interface HistogramPlotProps {
  readonly title: string
  readonly fileName: string
  readonly summary: string
  readonly unit: Unit
  readonly edges: readonly number[] // one more than counts
  readonly counts: readonly number[]
  /** Drawn as a line across the bars. */
  readonly aim?: number
}

const HEIGHT = 232

/** How often a figure fell into each of a row of equal intervals. */
export function HistogramPlot({ title, fileName, summary, unit, edges, counts, aim }: HistogramPlotProps) {
  const theme = useTheme()
  const { across, down, lettering } = useAxisStyles()
  const low = edges[0] ?? 0
  const high = edges.at(-1) ?? 1
  const axis = unitFor(Math.max(Math.abs(low), Math.abs(high)), unit)
  const most = Math.max(...counts, 1)
  // The aim is in view where it lies near the bars; far away it would press them into a corner.
  const reach = high - low
  const isAimNear = aim !== undefined && aim > low - 1.5 * reach && aim < high + 1.5 * reach
  const from = (isAimNear ? Math.min(low, aim) : low) / axis.size
  const to = (isAimNear ? Math.max(high, aim) : high) / axis.size
  const margin = 0.03 * Math.max(to - from, 1e-9)
  const domain: { x: [number, number]; y: [number, number] } = {
    x: [from - margin, to + margin],
    y: [0, 1.14 * most],
  }
  return (
    <PlotFrame title={title} fileName={fileName} summary={summary} table={() => tableOf(unit, edges, counts)}>
      {(width) => {
        const inner = width - PADDING.left - PADDING.right
        const step = (inner * (high - low)) / axis.size / counts.length / (domain.x[1] - domain.x[0])
        const aimShare = isAimNear ? (aim / axis.size - domain.x[0]) / (domain.x[1] - domain.x[0]) : 0
        const aimAt = PADDING.left + inner * aimShare
        const isAimRight = aimShare > 0.5
        return (
          <VictoryChart width={width} height={HEIGHT} padding={PADDING} domain={domain}>
            <VictoryAxis
              orientation="bottom"
              offsetY={PADDING.bottom}
              crossAxis={false}
              tickCount={ticksAcross(width)}
              tickFormat={tickText}
              label={`${title}, ${unit === '°' ? 'degrees' : axis.name}`}
              style={across}
            />
            <VictoryAxis
              dependentAxis
              crossAxis={false}
              tickCount={4}
              tickFormat={tickText}
              label="Samples"
              style={down}
            />
            <VictoryBar
              barWidth={Math.max(1, step - 1)}
              data={counts.map((count, index) => ({
                x: ((edges[index] ?? 0) + (edges[index + 1] ?? 0)) / 2 / axis.size,
                y: count,
              }))}
              style={{ data: { fill: theme.gain } }}
            />
            {isAimNear ? (
              <VictoryLine
                data={[0, 1.14 * most].map((y) => ({ x: aim / axis.size, y }))}
                style={{ data: { stroke: theme.accent, strokeWidth: 1.8, strokeDasharray: '5 3' } }}
              />
            ) : null}
            {isAimNear ? (
              <VictoryLabel
                x={aimAt + (isAimRight ? -6 : 6)}
                y={PADDING.top + 8}
                textAnchor={isAimRight ? 'end' : 'start'}
                text={`aim ${formatEntry(aim, unit)}`}
                style={{ ...lettering, fill: theme.accent }}
              />
            ) : null}
          </VictoryChart>
        )
      }}
    </PlotFrame>
  )
}

function tableOf(unit: Unit, edges: readonly number[], counts: readonly number[]) {
  const name = unit === '°' ? 'degrees' : unit
  return {
    header: [`From, ${name}`, `To, ${name}`, 'Samples'],
    rows: counts.map((count, index) => [figure(edges[index], unit), figure(edges[index + 1], unit), String(count)]),
    data: counts.map((count, index) => [edges[index] ?? null, edges[index + 1] ?? null, count]),
  }
}
