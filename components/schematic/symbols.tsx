/** Graphical symbols after IEC 60617, drawn in one stroke weight. Each stands between two points of a wire, in px. */
import { Circle, G, Path, Rect } from 'react-native-svg'

export const STROKE = 1.6

export interface SymbolProps {
  /** Middle of the symbol. */
  readonly x: number
  readonly y: number
  readonly isVertical?: boolean
  readonly color: string
  readonly ground: string
}

/** Half the length of a symbol along its wire. */
export const HALF = { resistor: 15, inductor: 20, capacitor: 4, diode: 8, transistor: 13, source: 13 } as const

function Turned({
  x,
  y,
  isVertical,
  children,
}: Pick<SymbolProps, 'x' | 'y' | 'isVertical'> & { children: React.ReactNode }) {
  return <G transform={`translate(${x} ${y})${isVertical ? ' rotate(90)' : ''}`}>{children}</G>
}

export function Wire({
  d,
  color,
  isDashed,
}: {
  readonly d: string
  readonly color: string
  readonly isDashed?: boolean
}) {
  return <Path d={d} stroke={color} strokeWidth={STROKE} strokeDasharray={isDashed ? '4 3' : undefined} fill="none" />
}

export function Junction({ x, y, color }: { readonly x: number; readonly y: number; readonly color: string }) {
  return <Circle cx={x} cy={y} r={2.6} fill={color} />
}

export function Resistor({ color, ground, ...at }: SymbolProps) {
  return (
    <Turned {...at}>
      <Rect x={-15} y={-5.5} width={30} height={11} stroke={color} strokeWidth={STROKE} fill={ground} />
    </Turned>
  )
}

export function Inductor({ color, ground, ...at }: SymbolProps) {
  return (
    <Turned {...at}>
      <Rect x={-20} y={-8} width={40} height={10} fill={ground} />
      <Path
        d="M-20 0a5 5 0 0 1 10 0a5 5 0 0 1 10 0a5 5 0 0 1 10 0a5 5 0 0 1 10 0"
        stroke={color}
        strokeWidth={STROKE}
        fill="none"
      />
    </Turned>
  )
}

export function Capacitor({ color, ground, ...at }: SymbolProps) {
  return (
    <Turned {...at}>
      <Rect x={-3.5} y={-9} width={7} height={18} fill={ground} />
      <Path d="M-3.5 -11v22M3.5 -11v22" stroke={color} strokeWidth={STROKE} fill="none" />
    </Turned>
  )
}

/** Conducts from left to right, or downwards when vertical. */
export function Diode({ color, ground, ...at }: SymbolProps) {
  return (
    <Turned {...at}>
      <Path d="M-8 -8L8 0L-8 8z" stroke={color} strokeWidth={STROKE} fill={ground} strokeLinejoin="round" />
      <Path d="M8 -8v16" stroke={color} strokeWidth={STROKE} fill="none" />
    </Turned>
  )
}

/** Field-effect transistor, enhancement type. Its gate points down, or to the left when vertical. */
export function Transistor({ color, ground, ...at }: SymbolProps) {
  return (
    <Turned {...at}>
      <Rect x={-13} y={-3} width={26} height={14} fill={ground} />
      <Path
        d="M-13 0v6M13 0v6M-16 6h7M-3.5 6h7M9 6h7M-13 0h-2M13 0h2M-11 11h22M0 11v9"
        stroke={color}
        strokeWidth={STROKE}
        fill="none"
      />
    </Turned>
  )
}

/** Source of voltage: the line runs through the circle. */
export function VoltageSource({ color, ground, ...at }: SymbolProps) {
  return (
    <Turned {...at}>
      <Circle cx={0} cy={0} r={13} stroke={color} strokeWidth={STROKE} fill={ground} />
      <Path d="M-13 0h26" stroke={color} strokeWidth={STROKE} />
    </Turned>
  )
}

/** Source of current: the bar stands across. */
export function CurrentSource({ color, ground, ...at }: SymbolProps) {
  return (
    <Turned {...at}>
      <Circle cx={0} cy={0} r={13} stroke={color} strokeWidth={STROKE} fill={ground} />
      <Path d="M0 -13v26" stroke={color} strokeWidth={STROKE} />
    </Turned>
  )
}

export function Earth({ x, y, color }: { readonly x: number; readonly y: number; readonly color: string }) {
  return (
    <Path
      d={`M${x} ${y}v7M${x - 9} ${y + 7}h18M${x - 5.5} ${y + 11}h11M${x - 2} ${y + 15}h4`}
      stroke={color}
      strokeWidth={STROKE}
      fill="none"
    />
  )
}

export function Arrow({
  x,
  y,
  to,
  color,
}: {
  readonly x: number
  readonly y: number
  readonly to: 'left' | 'up' | 'down'
  readonly color: string
}) {
  const d = { left: 'l7 -4v8z', up: 'l-4 7h8z', down: 'l-4 -7h8z' }[to]
  return <Path d={`M${x} ${y}${d}`} fill={color} />
}

/**
 * Windings of a transformer, one each side of the core, with the dots of their sense. `storesEnergy`: of opposite
 * sense, the secondary's dot at its far end.
 */
export function Windings({
  x,
  primary,
  secondary,
  gap,
  storesEnergy,
  color,
  ground,
}: {
  readonly x: number
  /** Heights of the middles. */
  readonly primary: number
  readonly secondary: number
  readonly gap: number
  readonly storesEnergy: boolean
  readonly color: string
  readonly ground: string
}) {
  const winding = (at: number, middle: number, side: 1 | -1) => (
    <G>
      <Rect x={at - 3} y={middle - 20} width={6} height={40} fill={ground} />
      <Path
        d={`M${at} ${middle - 20}${`a5 5 0 0 ${side === 1 ? 1 : 0} 0 10`.repeat(4)}`}
        stroke={color}
        strokeWidth={STROKE}
        fill="none"
      />
    </G>
  )
  const dot = secondary + (storesEnergy ? 24 : -24)
  const core = Math.min(primary, secondary) - 22
  return (
    <G>
      {winding(x - gap, primary, 1)}
      {winding(x + gap, secondary, -1)}
      <Path d={`M${x - 2} ${core}v44M${x + 2} ${core}v44`} stroke={color} strokeWidth={STROKE} fill="none" />
      <Circle cx={x - gap + 6} cy={primary - 24} r={2.4} fill={color} />
      <Circle cx={x + gap - 6} cy={dot} r={2.4} fill={color} />
    </G>
  )
}
