import Svg, { Circle, ClipPath, Defs, G, Line, Path, Rect } from 'react-native-svg'
import {
  bandPath,
  BOTTOM,
  curvePath,
  interpolate,
  LEFT,
  panelsOf,
  placeNames,
  RIGHT,
  xScaleOf,
  yScaleOf,
  type BodePlotProps,
  type Panel,
  type XScale,
} from './bode'
import { textWidth, type Box } from './layout'
import { PlotText } from './PlotText'
import { decadeSubdivisions, decadeTicks, ohmLabel } from './ticks'
import { figure } from '@/components/format'
import type { Palette } from '@/constants/theme'
import { useTheme } from '@/hooks/useTheme'

interface BodeDrawingProps extends BodePlotProps {
  readonly width: number
  readonly height: number
  readonly cursor: number | null // Hz
}

export function BodeDrawing(props: BodeDrawingProps) {
  const { frequencies, curves, band = null, gainScale = 'dB', crossover = null, width, height } = props
  const theme = useTheme()
  const x = xScaleOf(frequencies, width)
  const panels = panelsOf(props, height)
  return (
    <Svg width={width} height={height} aria-hidden>
      {panels.map((panel) => (
        <G key={panel.quantity}>
          <Grid panel={panel} x={x} theme={theme} gainScale={gainScale} />
          <PanelTitle panel={panel} title={panel.quantity === 'gainDb' ? props.gainTitle : 'Phase, degrees'} />
          <Defs>
            <ClipPath id={`${props.fileName}-${panel.quantity}`}>
              <Rect
                x={LEFT}
                y={panel.top}
                width={Math.max(0, width - LEFT - RIGHT)}
                height={panel.bottom - panel.top}
              />
            </ClipPath>
          </Defs>
          <G clipPath={`url(#${props.fileName}-${panel.quantity})`}>
            {band ? <Path d={bandPath(frequencies, band, panel, x)} fill={bandColor(panel, theme)} /> : null}
            {curves.map((curve) => (
              <Path
                key={curve.key}
                d={curvePath(frequencies, curve.response, panel, x)}
                stroke={curve.isQuiet ? theme.quiet : curveColor(panel, theme)}
                strokeWidth={curve.isDashed ? 1.6 : 2.2}
                strokeDasharray={curve.isDashed ? '6 4' : undefined}
                strokeLinejoin="round"
                fill="none"
              />
            ))}
          </G>
          <CurveNames {...props} panel={panel} x={x} theme={theme} />
        </G>
      ))}
      {crossover ? <CrossoverMarks {...props} panels={panels} x={x} theme={theme} /> : null}
      {props.cursor === null ? null : (
        <Line
          x1={x(props.cursor)}
          x2={x(props.cursor)}
          y1={panels[0]!.top}
          y2={panels.at(-1)!.bottom}
          stroke={theme.ink}
          strokeWidth={1}
        />
      )}
      <FrequencyAxis x={x} height={height} width={width} theme={theme} />
    </Svg>
  )
}

const curveColor = (panel: Panel, theme: Palette) => (panel.quantity === 'gainDb' ? theme.gain : theme.phase)
const bandColor = (panel: Panel, theme: Palette) => (panel.quantity === 'gainDb' ? theme.gainBand : theme.phaseBand)

interface PanelProps {
  readonly panel: Panel
  readonly x: XScale
  readonly theme: Palette
}

function Grid({ panel, x, theme, gainScale }: PanelProps & { readonly gainScale: BodePlotProps['gainScale'] }) {
  const y = yScaleOf(panel)
  const [low, high] = x.domain() as [number, number]
  const [left, right] = x.range() as [number, number]
  const name = (value: number) =>
    gainScale === 'Ω' && panel.quantity === 'gainDb' ? ohmLabel(value) : String(value).replace('-', '−')
  return (
    <G>
      <Rect
        x={left}
        y={panel.top}
        width={Math.max(0, right - left)}
        height={panel.bottom - panel.top}
        fill={theme.sheet}
      />
      {decadeSubdivisions(low, high).map((value) => (
        <Line
          key={`s${value}`}
          x1={x(value)}
          x2={x(value)}
          y1={panel.top}
          y2={panel.bottom}
          stroke={theme.rule}
          strokeWidth={0.5}
        />
      ))}
      {decadeTicks(low, high).map(({ value }) => (
        <Line
          key={value}
          x1={x(value)}
          x2={x(value)}
          y1={panel.top}
          y2={panel.bottom}
          stroke={theme.rule}
          strokeWidth={1.2}
        />
      ))}
      {panel.axis.ticks.map((value) => (
        <G key={value}>
          <Line
            x1={left}
            x2={right}
            y1={y(value)}
            y2={y(value)}
            stroke={isReference(panel, value) ? theme.edge : theme.rule}
            strokeWidth={isReference(panel, value) ? 1.2 : 0.8}
          />
          <PlotText x={left - 5} y={y(value) + 4.5} color={theme.quiet} anchor="end">
            {name(value)}
          </PlotText>
        </G>
      ))}
    </G>
  )
}

/** Unity gain and −180°: what margins are read from. */
function isReference(panel: Panel, value: number): boolean {
  return panel.quantity === 'gainDb' ? value === 0 : value === -180
}

function PanelTitle({ panel, title }: { readonly panel: Panel; readonly title: string }) {
  const theme = useTheme()
  const middle = (panel.top + panel.bottom) / 2
  return (
    <PlotText x={13} y={middle} color={theme.quiet} anchor="middle" rotation={-90}>
      {title}
    </PlotText>
  )
}

function CurveNames({ curves, frequencies, panel, x, theme, crossover }: BodeDrawingProps & PanelProps) {
  const taken: Box[] = crossover
    ? [{ x: x(crossover.frequency) - 6, y: panel.top, width: 100, height: panel.bottom - panel.top }]
    : []
  return placeNames(curves, frequencies, panel, x, taken).map(({ curve, box }) => (
    <PlotText
      key={curve.key}
      x={box.x + 2}
      y={box.y + 13}
      color={curve.isQuiet ? theme.quiet : curveColor(panel, theme)}
      isStrong
      halo={theme.sheet}
    >
      {curve.label}
    </PlotText>
  ))
}

interface CrossoverMarksProps extends BodeDrawingProps {
  readonly panels: readonly Panel[]
  readonly x: XScale
  readonly theme: Palette
}

function CrossoverMarks({ crossover, curves, frequencies, panels, x, theme, width }: CrossoverMarksProps) {
  const [gain, phase] = panels as [Panel, Panel]
  const main = curves[0]
  if (!crossover || !main) return null
  const at = x(crossover.frequency)
  const reading = interpolate(main, frequencies, crossover.frequency)
  const yPhase = yScaleOf(phase)
  const label = `${figure(crossover.phaseMargin, '°')} margin`
  const isLeft = at + textWidth(label, 13.4, 'condensed') + 16 > width - RIGHT
  const middle = reading ? (yPhase(reading.phaseDeg) + yPhase(-180)) / 2 : 0
  return (
    <G>
      <Line
        x1={at}
        x2={at}
        y1={gain.top}
        y2={phase.bottom}
        stroke={theme.accent}
        strokeWidth={1.4}
        strokeDasharray="4 3"
      />
      <Circle cx={at} cy={yScaleOf(gain)(0)} r={4.5} stroke={theme.accent} strokeWidth={2} fill={theme.sheet} />
      <PlotText
        x={isLeft ? at - 8 : at + 8}
        y={yScaleOf(gain)(0) - 8}
        color={theme.accent}
        anchor={isLeft ? 'end' : 'start'}
        isStrong
        halo={theme.sheet}
      >
        {figure(crossover.frequency, 'Hz')}
      </PlotText>
      {reading ? (
        <>
          <Line x1={at} x2={at} y1={yPhase(reading.phaseDeg)} y2={yPhase(-180)} stroke={theme.accent} strokeWidth={3} />
          <Circle
            cx={at}
            cy={yPhase(reading.phaseDeg)}
            r={4.5}
            stroke={theme.accent}
            strokeWidth={2}
            fill={theme.sheet}
          />
          <PlotText
            x={isLeft ? at - 8 : at + 8}
            y={middle + 5}
            color={theme.accent}
            anchor={isLeft ? 'end' : 'start'}
            isStrong
            halo={theme.sheet}
          >
            {label}
          </PlotText>
        </>
      ) : null}
    </G>
  )
}

interface FrequencyAxisProps {
  readonly x: XScale
  readonly height: number
  readonly width: number
  readonly theme: Palette
}

function FrequencyAxis({ x, height, width, theme }: FrequencyAxisProps) {
  const [low, high] = x.domain() as [number, number]
  return (
    <G>
      {decadeTicks(low, high).map(({ value, label }) => (
        <PlotText
          key={value}
          x={Math.min(x(value), width - 14)}
          y={height - BOTTOM + 16}
          color={theme.quiet}
          anchor="middle"
        >
          {label}
        </PlotText>
      ))}
      <PlotText x={(LEFT + width - RIGHT) / 2} y={height - 5} color={theme.quiet} anchor="middle">
        Frequency, Hz
      </PlotText>
    </G>
  )
}
