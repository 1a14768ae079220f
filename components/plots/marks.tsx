import { Circle, Path } from 'react-native-svg'

interface MarkProps {
  readonly x: number
  readonly y: number
  readonly color: string
  readonly size?: number
}

/** × */
export function PoleMark({ x, y, color, size = 4.5 }: MarkProps) {
  const d = `M${x - size} ${y - size}L${x + size} ${y + size}M${x - size} ${y + size}L${x + size} ${y - size}`
  return <Path d={d} stroke={color} strokeWidth={2} fill="none" />
}

/** ○, filled with the ground so that what lies behind does not cross it. */
export function ZeroMark({ x, y, color, size = 4.5, ground }: MarkProps & { readonly ground: string }) {
  return <Circle cx={x} cy={y} r={size} stroke={color} strokeWidth={2} fill={ground} />
}
