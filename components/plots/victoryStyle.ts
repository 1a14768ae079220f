/** What the plots over time and the histograms share: lettering, axes, units. */
import { PLOT_TYPE } from './PlotText'
import { fonts } from '@/constants/theme'
import { formatQuantity, type Unit } from '@/converters/quantities'
import { useTheme } from '@/hooks/useTheme'

export const PADDING = { left: 56, right: 12, top: 10, bottom: 44 } as const

/** Styles of both axes of a Victory chart, in the look of the other plots. */
export function useAxisStyles() {
  const theme = useTheme()
  const lettering = { fontFamily: fonts.label, fontSize: PLOT_TYPE, fill: theme.quiet }
  const axis = {
    axis: { stroke: theme.edge },
    grid: { stroke: theme.rule, strokeWidth: 1 },
    ticks: { stroke: 'none' },
    tickLabels: { ...lettering, padding: 4 },
  }
  return {
    across: { ...axis, axisLabel: { ...lettering, padding: 27 } },
    down: { ...axis, axisLabel: { ...lettering, padding: 42 } },
    lettering,
  }
}

/** As many ticks as have room for their labels. */
export const ticksAcross = (width: number) => Math.max(3, Math.floor(width / 80))

/** Enough figures to tell neighbouring ticks apart, none that only rounding has left there. */
export function tickText(value: number): string {
  return String(Number(value.toPrecision(6))).replace('-', '−')
}

export interface AxisUnit {
  readonly size: number
  readonly name: string
}

/** The prefix in which the largest value reads as 1 to 999. */
export function unitFor(greatest: number, unit: Unit): AxisUnit {
  if (unit === '' || unit === '°' || unit === 'dB' || !(greatest > 0)) return { size: 1, name: unit }
  const exponent = Math.min(9, Math.max(-12, 3 * Math.floor(Math.log10(greatest) / 3)))
  const name = formatQuantity(10 ** exponent, unit).split(' ')[1] ?? unit
  return { size: 10 ** exponent, name }
}
