import { PlotText } from '@/components/plots/PlotText'

export interface LinesProps {
  readonly x: number
  readonly y: number
  readonly lines: readonly string[]
  readonly color: string
  readonly isCentred?: boolean
  /** The lettering ends at x. */
  readonly endsHere?: boolean
}

/** Lines of lettering about a height. */
export function Lines({ x, y, lines, color, isCentred, endsHere }: LinesProps) {
  const first = y - ((lines.length - 1) * 16) / 2 + 4.5
  const anchor = isCentred ? 'middle' : endsHere ? 'end' : 'start'
  return lines.map((line, index) => (
    <PlotText key={index} x={x} y={first + index * 16} color={color} anchor={anchor} isStrong>
      {line}
    </PlotText>
  ))
}
