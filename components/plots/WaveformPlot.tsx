import { VictoryArea, VictoryAxis, VictoryChart, VictoryLine } from 'victory-native'
import { PlotFrame } from './PlotFrame'
import { PADDING, ticksAcross, tickText, unitFor, useAxisStyles } from './victoryStyle'
import { condensed, type Trace } from './waveform'
import { figure, ratio } from '@/components/format'
import type { Unit } from '@/converters/quantities'
import { useTheme } from '@/hooks/useTheme'

export interface WaveformPlotProps {
  readonly title: string
  readonly fileName: string
  readonly summary: string
  /** Beside the axis, without its unit. */
  readonly quantity: string
  readonly unit: Unit
  readonly trace: Trace
  /** Another answer to the same question, dashed. */
  readonly prediction?: { readonly time: readonly number[]; readonly values: readonly number[] } | null
  /** Levels that are not to be crossed. */
  readonly limits?: readonly number[]
  readonly height?: number
}

const MOST_POINTS = 320
const TALL = 270

/** A quantity period by period: its mean, and the band from lowest to highest. */
export function WaveformPlot(props: WaveformPlotProps) {
  const { title, fileName, summary, quantity, unit, trace, prediction = null, limits = [], height = TALL } = props
  const theme = useTheme()
  const { across, down } = useAxisStyles()
  const last = trace.time.at(-1) ?? 1
  const drawn = condensed(trace, MOST_POINTS)
  const seconds = unitFor(last, 's')
  const size = unitFor(Math.max(...drawn.high.map(Math.abs), ...drawn.low.map(Math.abs)), unit)
  const points = (time: readonly number[], values: readonly number[]) =>
    time.map((moment, index) => ({ x: moment / seconds.size, y: (values[index] ?? 0) / size.size }))
  return (
    <PlotFrame title={title} fileName={fileName} summary={summary} table={() => tableOf(quantity, unit, trace)}>
      {(width) => (
        <VictoryChart width={width} height={height} padding={PADDING} domainPadding={{ y: 10 }}>
          <VictoryAxis
            orientation="bottom"
            offsetY={PADDING.bottom}
            crossAxis={false}
            tickCount={ticksAcross(width)}
            tickFormat={tickText}
            label={`Time, ${seconds.name}`}
            style={across}
          />
          <VictoryAxis
            dependentAxis
            crossAxis={false}
            tickCount={5}
            label={size.name === '' ? quantity : `${quantity}, ${size.name}`}
            tickFormat={tickText}
            style={down}
          />
          <VictoryArea
            data={points(drawn.time, drawn.high).map((point, index) => ({
              ...point,
              y0: (drawn.low[index] ?? 0) / size.size,
            }))}
            style={{ data: { fill: theme.gainBand, stroke: 'none' } }}
          />
          {limits.map((limit) => (
            <VictoryLine
              key={limit}
              data={points([0, last], [limit, limit])}
              style={{ data: { stroke: theme.short, strokeWidth: 1.2, strokeDasharray: '2 3' } }}
            />
          ))}
          <VictoryLine
            data={points(drawn.time, drawn.middle)}
            style={{ data: { stroke: theme.gain, strokeWidth: 2 } }}
          />
          {prediction ? (
            <VictoryLine
              data={points(prediction.time, prediction.values).filter(({ x }) => x * seconds.size <= last)}
              style={{ data: { stroke: theme.accent, strokeWidth: 1.8, strokeDasharray: '6 4' } }}
            />
          ) : null}
        </VictoryChart>
      )}
    </PlotFrame>
  )
}

const ROWS = 40

function tableOf(quantity: string, unit: Unit, trace: Trace) {
  const name = unit === '' ? quantity : `${quantity}, ${unit}`
  const text = (value: number | undefined) => (unit === '' ? ratio(value ?? 0) : figure(value, unit))
  const { time, low, middle, high } = condensed(trace, ROWS)
  return {
    header: ['Time, s', `${name}: mean`, 'Lowest', 'Highest'],
    rows: time.map((moment, index) => [figure(moment, 's'), text(middle[index]), text(low[index]), text(high[index])]),
    data: trace.time.map((moment, index) => [
      moment,
      trace.middle[index] ?? null,
      trace.low[index] ?? null,
      trace.high[index] ?? null,
    ]),
  }
}
