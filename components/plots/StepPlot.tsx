import { VictoryAxis, VictoryChart, VictoryLine } from 'victory-native'
import { PlotFrame } from './PlotFrame'
import { PADDING, ticksAcross, tickText, unitFor, useAxisStyles } from './victoryStyle'
import { figure } from '@/components/format'
import { useTheme } from '@/hooks/useTheme'

export interface StepPlotProps {
  readonly title: string
  readonly fileName: string
  readonly summary: string
  readonly time: readonly number[] // s
  readonly deviation: readonly number[] // V
}

const HEIGHT = 230

/** The output's deviation over time after a step. */
export function StepPlot({ title, fileName, summary, time, deviation }: StepPlotProps) {
  const theme = useTheme()
  const { across, down } = useAxisStyles()
  const timeUnit = unitFor(time.at(-1) ?? 1, 's')
  const voltUnit = unitFor(Math.max(...deviation.map(Math.abs), 1e-12), 'V')
  return (
    <PlotFrame title={title} fileName={fileName} summary={summary} table={() => tableOf(time, deviation)}>
      {(width) => (
        <VictoryChart width={width} height={HEIGHT} padding={PADDING} domainPadding={{ y: 8 }}>
          <VictoryAxis
            orientation="bottom"
            offsetY={PADDING.bottom}
            crossAxis={false}
            tickCount={ticksAcross(width)}
            label={`Time, ${timeUnit.name}`}
            style={across}
          />
          <VictoryAxis
            dependentAxis
            crossAxis={false}
            tickCount={5}
            label={`Deviation, ${voltUnit.name}`}
            tickFormat={tickText}
            style={down}
          />
          <VictoryLine
            data={time.map((seconds, index) => ({
              x: seconds / timeUnit.size,
              y: (deviation[index] ?? 0) / voltUnit.size,
            }))}
            style={{ data: { stroke: theme.gain, strokeWidth: 2.2 } }}
          />
        </VictoryChart>
      )}
    </PlotFrame>
  )
}

const ROWS = 40

function tableOf(time: readonly number[], deviation: readonly number[]) {
  const stride = Math.max(1, Math.ceil(time.length / ROWS))
  return {
    header: ['Time, s', 'Deviation, V'],
    rows: time.flatMap((seconds, index) =>
      index % stride === 0 ? [[figure(seconds, 's'), figure(deviation[index], 'V')]] : [],
    ),
    data: time.map((seconds, index) => [seconds, deviation[index] ?? null]),
  }
}
