import { useRef, useState } from 'react'
import { StyleSheet, View } from 'react-native'
import Svg, { Defs, G, Line, Path, Pattern, Rect, TSpan } from 'react-native-svg'
import { PoleMark, ZeroMark } from './marks'
import { PlotText } from './PlotText'
import { capturePointer, dragSideways } from './pointer'
import { afterKey, ruleMarks, ruleNames, ruleScale, type RuleMark, type RuleRoot, type RuleScale } from './rule'
import { decadeSubdivisions, decadeTicks } from './ticks'
import { textWidth } from './layout'
import { figure } from '@/components/format'
import { onKey } from '@/components/ui/keys'
import { TARGET } from '@/constants/theme'
import { useTheme } from '@/hooks/useTheme'

export interface FrequencyRuleProps {
  readonly switchingFrequency: number // Hz
  readonly plant: { readonly poles: readonly RuleRoot[]; readonly zeros: readonly RuleRoot[] }
  readonly network: { readonly poles: readonly RuleRoot[]; readonly zeros: readonly RuleRoot[] }
  readonly window: { readonly lower: number; readonly upper: number } | null // Hz
  /** The loop's crossover; null while there is no loop. */
  readonly crossover: number | null // Hz
  /** The crossover that is asked for. */
  readonly wanted: number | null // Hz
  readonly onWant: (frequency: number) => void
}

// Heights of what stands on the rule, from the top, in px.
const PILL = { top: 2, height: 26 }
const PLANT_Y = 46
const AXIS_Y = 64
const NETWORK_Y = 82
/** Of the subscript of f_sw; the letters beside it say what it is. */
const SUBSCRIPT = 13
const TICK_TEXT_Y = 106
const HEIGHT = 114
const BAND = 12
const MARGIN = 14
const HALF_SWITCHING_LABEL = 36

/**
 * The picture at the head of every screen of a design: a logarithmic rule from 10 Hz to the switching frequency, the
 * power stage's roots above it, the network's below, the room for the crossover and the crossover itself as a handle.
 */
export function FrequencyRule(props: FrequencyRuleProps) {
  const [width, setWidth] = useState(0)
  return (
    <View
      role="group"
      aria-label="Frequency rule"
      style={styles.frame}
      onLayout={(event) => setWidth(Math.round(event.nativeEvent.layout.width))}
    >
      {width > 0 ? <Rule {...props} width={width} /> : null}
    </View>
  )
}

function Rule(props: FrequencyRuleProps & { readonly width: number }) {
  const { switchingFrequency, plant, network, window, crossover, wanted, onWant, width } = props
  const theme = useTheme()
  const [dragged, setDragged] = useState<number | null>(null)
  const drag = useRef<{ pointer: number; x: number } | null>(null)
  const scale = ruleScale(switchingFrequency, MARGIN, width - MARGIN)
  const [low, high] = [scale.domain()[0]!, switchingFrequency / 2]
  const shown = dragged ?? crossover ?? wanted
  const x = shown === null ? null : scale(Math.min(high, Math.max(low, shown)))
  const rightHalfPlaneZero = plant.zeros.filter((zero) => zero.halfPlane === 'right').map((zero) => zero.frequency)
  const ceiling = rightHalfPlaneZero.length === 0 ? null : Math.min(...rightHalfPlaneZero) / 3
  const label = shown === null ? '' : figure(shown, 'Hz')

  const want = (frequency: number) => onWant(Number(Math.min(high, Math.max(low, frequency)).toPrecision(3)))
  return (
    <View>
      <Svg width={width} height={HEIGHT} aria-hidden>
        <Defs>
          <Pattern id="above-ceiling" width={6} height={6} patternUnits="userSpaceOnUse">
            <Path d="M0 6L6 0" stroke={theme.short} strokeWidth={0.9} />
          </Pattern>
        </Defs>
        {ceiling !== null && ceiling < switchingFrequency ? (
          <Shade from={scale(Math.max(low, ceiling))} to={width - MARGIN} color={theme.short} />
        ) : null}
        {window && window.lower < window.upper ? (
          <Rect
            x={scale(Math.max(low, window.lower))}
            y={AXIS_Y - BAND}
            width={Math.max(0, scale(Math.min(switchingFrequency, window.upper)) - scale(Math.max(low, window.lower)))}
            height={2 * BAND}
            rx={3}
            fill={theme.accentWash}
          />
        ) : null}
        <Axis scale={scale} width={width} />
        <HalfSwitching x={scale(switchingFrequency / 2)} />
        <Marks
          marks={ruleMarks(plant.poles, plant.zeros, scale)}
          y={PLANT_Y}
          color={theme.gain}
          handle={x}
          width={width}
        />
        <Marks
          marks={ruleMarks(network.poles, network.zeros, scale)}
          y={NETWORK_Y}
          color={theme.accent}
          handle={x}
          width={width}
        />
        {x === null ? null : <Handle x={x} label={label} width={width} isMoving={dragged !== null} />}
      </Svg>
      {x === null || shown === null ? null : (
        <View
          role="slider"
          aria-label="Crossover"
          aria-valuemin={low}
          aria-valuemax={high}
          aria-valuenow={shown}
          aria-valuetext={spoken(shown, window, crossover === null)}
          tabIndex={0}
          style={[styles.handle, dragSideways, { left: x - TARGET / 2 }]}
          {...onKey((key) => {
            const next = afterKey(key, wanted ?? shown, low, high)
            if (next !== null) want(next)
            return next !== null
          })}
          onPointerDown={(event) => {
            capturePointer(event)
            drag.current = { pointer: event.nativeEvent.clientX, x }
          }}
          onPointerMove={(event) => {
            if (!drag.current) return
            const moved = drag.current.x + event.nativeEvent.clientX - drag.current.pointer
            const frequency = Math.min(high, Math.max(low, scale.invert(moved)))
            setDragged(frequency)
            want(frequency)
          }}
          onPointerUp={() => {
            drag.current = null
            setDragged(null)
          }}
          onPointerCancel={() => {
            drag.current = null
            setDragged(null)
          }}
        />
      )}
    </View>
  )
}

function spoken(frequency: number, window: FrequencyRuleProps['window'], isWish: boolean): string {
  const what = `${figure(frequency, 'Hz')}${isWish ? ', wanted' : ''}`
  if (!window) return what
  if (window.lower >= window.upper) return `${what}; there is no room for a crossover`
  return `${what}; there is room from ${figure(window.lower, 'Hz')} to ${figure(window.upper, 'Hz')}`
}

function Axis({ scale, width }: { readonly scale: RuleScale; readonly width: number }) {
  const theme = useTheme()
  const [low, high] = scale.domain() as [number, number]
  const ticks = decadeTicks(low, high)
  // Half the switching frequency is named in the same row, under its line; a label that it meets gives way.
  const named = Math.min(scale(high / 2), width - HALF_SWITCHING_LABEL / 2)
  return (
    <G>
      <Line x1={MARGIN} x2={width - MARGIN} y1={AXIS_Y} y2={AXIS_Y} stroke={theme.ink} strokeWidth={1.4} />
      {decadeSubdivisions(low, high).map((value) => (
        <Line key={value} x1={scale(value)} x2={scale(value)} y1={AXIS_Y - 3} y2={AXIS_Y + 3} stroke={theme.edge} />
      ))}
      {ticks.map((tick) => {
        const x = scale(tick.value)
        const half = textWidth(tick.label, 13.4, 'condensed') / 2
        return (
          <G key={tick.value}>
            <Line x1={x} x2={x} y1={AXIS_Y - 6} y2={AXIS_Y + 6} stroke={theme.ink} strokeWidth={1.2} />
            {Math.abs(x - named) < half + HALF_SWITCHING_LABEL / 2 ? null : (
              <PlotText x={Math.max(x, half + 1)} y={TICK_TEXT_Y} color={theme.quiet} anchor="middle">
                {tick.label}
              </PlotText>
            )}
          </G>
        )
      })}
      <PlotText x={named} y={TICK_TEXT_Y} color={theme.quiet} anchor="middle">
        ½ f
        <TSpan dy={2} fontSize={SUBSCRIPT}>
          sw
        </TSpan>
      </PlotText>
    </G>
  )
}

function HalfSwitching({ x }: { readonly x: number }) {
  const theme = useTheme()
  return <Line x1={x} x2={x} y1={34} y2={96} stroke={theme.quiet} strokeWidth={1.2} strokeDasharray="2 3" />
}

/** Everything from a third of the right-half-plane zero upward. */
function Shade({ from, to, color }: { readonly from: number; readonly to: number; readonly color: string }) {
  if (to <= from) return null
  return (
    <G>
      <Rect x={from} y={AXIS_Y - 26} width={to - from} height={26} fill="url(#above-ceiling)" opacity={0.55} />
      <Line x1={from} x2={from} y1={AXIS_Y - 26} y2={AXIS_Y + 6} stroke={color} strokeWidth={2} />
    </G>
  )
}

/** Names are written from this width on; on a phone the Plant screen tells them. */
const NAMED_FROM = 680 // px

interface MarksProps {
  readonly marks: readonly RuleMark[]
  readonly y: number
  readonly color: string
  readonly handle: number | null
  readonly width: number
}

function Marks({ marks, y, color, handle, width }: MarksProps) {
  const theme = useTheme()
  const taken = handle === null ? [] : [{ x: handle - 6, y: 0, width: 12, height: HEIGHT }]
  const names = width < NAMED_FROM ? [] : ruleNames(marks, y, taken)
  return (
    <G>
      {names.map(({ text, x }) => (
        <PlotText key={`${text} ${x}`} x={x} y={y + 4.5} color={color} anchor="end" halo={theme.paper}>
          {text}
        </PlotText>
      ))}
      {marks.map(({ kind, x }, index) =>
        kind === 'pole' ? (
          <PoleMark key={index} x={x} y={y} color={color} />
        ) : (
          <ZeroMark key={index} x={x} y={y} color={color} ground={theme.paper} />
        ),
      )}
    </G>
  )
}

interface HandleProps {
  readonly x: number
  readonly label: string
  readonly width: number
  readonly isMoving: boolean
}

function Handle({ x, label, width, isMoving }: HandleProps) {
  const theme = useTheme()
  const size = textWidth(label, 13.4, 'mono') + 18
  const left = Math.min(width - size, Math.max(0, x - size / 2))
  const bottom = PILL.top + PILL.height
  return (
    <G>
      <Line x1={x} x2={x} y1={bottom} y2={AXIS_Y + BAND + 3} stroke={theme.accent} strokeWidth={isMoving ? 3.2 : 2.4} />
      <Rect x={left} y={PILL.top} width={size} height={PILL.height} rx={4} fill={theme.accent} />
      <Path d={`M${x - 6} ${bottom - 1}h12l-6 7z`} fill={theme.accent} />
      <PlotText x={left + size / 2} y={PILL.top + 18} color={theme.onAccent} anchor="middle" isValue>
        {label}
      </PlotText>
    </G>
  )
}

const styles = StyleSheet.create({
  frame: { width: '100%', height: HEIGHT },
  handle: { position: 'absolute', top: 0, width: TARGET, height: HEIGHT - 18, borderRadius: 6 },
})
