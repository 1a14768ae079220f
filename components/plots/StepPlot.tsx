import { VictoryAxis, VictoryChart, VictoryLine } from 'victory-native'
import { PlotFrame } from './PlotFrame'
import { PLOT_TYPE } from './PlotText'
import { figure } from '@/components/format'
import { fonts } from '@/constants/theme'
import { formatQuantity } from '@/converters/quantities'
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
export default function StepPlot({ title, fileName, summary, time, deviation }: StepPlotProps) {
  const theme = useTheme()
  const last = time.at(-1) ?? 1
  const greatest = Math.max(...deviation.map(Math.abs), 1e-12)
  const timeUnit = unitFor(last, 's')
  const voltUnit = unitFor(greatest, 'V')
  const lettering = { fontFamily: fonts.label, fontSize: PLOT_TYPE, fill: theme.quiet }
  const axisStyle = {
    axis: { stroke: theme.edge },
    grid: { stroke: theme.rule, strokeWidth: 1 },
    ticks: { stroke: 'none' },
    tickLabels: { ...lettering, padding: 4 },
    axisLabel: lettering,
  }
  return (
    <PlotFrame title={title} fileName={fileName} summary={summary} table={() => tableOf(time, deviation)}>
      {(width) => (
        <VictoryChart
          width={width}
          height={HEIGHT}
          padding={{ left: 52, right: 12, top: 10, bottom: 44 }}
          domainPadding={{ y: 8 }}
        >
          <VictoryAxis
            orientation="bottom"
            offsetY={44}
            crossAxis={false}
            tickCount={Math.max(3, Math.floor(width / 80))}
            label={`Time, ${timeUnit.name}`}
            style={{ ...axisStyle, axisLabel: { ...lettering, padding: 27 } }}
          />
          <VictoryAxis
            dependentAxis
            crossAxis={false}
            tickCount={5}
            label={`Deviation, ${voltUnit.name}`}
            tickFormat={(value: number) => String(value).replace('-', '−')}
            style={{ ...axisStyle, axisLabel: { ...lettering, padding: 38 } }}
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

/** The prefix in which the largest value reads as 1 to 999. */
function unitFor(greatest: number, unit: 's' | 'V'): { readonly size: number; readonly name: string } {
  const exponent = Math.min(0, Math.max(-12, 3 * Math.floor(Math.log10(greatest) / 3)))
  const name = formatQuantity(10 ** exponent, unit).split(' ')[1] ?? unit
  return { size: 10 ** exponent, name }
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
