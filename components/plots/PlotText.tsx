import type { ReactNode } from 'react'
import { Text as SvgText, type TextAnchor } from 'react-native-svg'
import { fonts } from '@/constants/theme'

export const PLOT_TYPE = 13.4 // px; nothing on a plot is smaller
export const CONDENSED_STRONG = fonts.labelStrong

export interface PlotTextProps {
  readonly x: number
  readonly y: number
  readonly color: string
  readonly anchor?: TextAnchor
  readonly isStrong?: boolean
  readonly isValue?: boolean
  /** A halo of the ground's colour, where lines pass behind the text. */
  readonly halo?: string
  readonly rotation?: number
  readonly children: ReactNode
}

/** Lettering of the drawings: the condensed face, or the mono one for values. */
export function PlotText({
  x,
  y,
  color,
  anchor = 'start',
  isStrong,
  isValue,
  halo,
  rotation,
  children,
}: PlotTextProps) {
  const common = {
    x,
    y,
    textAnchor: anchor,
    fontSize: PLOT_TYPE,
    fontFamily: isValue ? fonts.value : isStrong ? fonts.labelStrong : fonts.label,
    transform: rotation === undefined ? undefined : `rotate(${rotation} ${x} ${y})`,
  }
  return (
    <>
      {halo ? (
        <SvgText {...common} fill={halo} stroke={halo} strokeWidth={4} strokeLinejoin="round">
          {children}
        </SvgText>
      ) : null}
      <SvgText {...common} fill={color}>
        {children}
      </SvgText>
    </>
  )
}
