/** The look in one place: colours for a lit desk and for a dim lab, type scale, spacing. Screens use names, not values. */
export interface Palette {
  readonly paper: string
  readonly sheet: string
  readonly rule: string // hairlines and grids
  readonly edge: string // borders of controls, 3:1 on paper and sheet
  readonly ink: string
  readonly quiet: string
  readonly accent: string // copper: actions, the crossover, the network
  readonly onAccent: string
  readonly accentWash: string
  readonly gain: string // teal: the power stage, gain curves
  readonly gainBand: string
  readonly phase: string
  readonly phaseBand: string
  readonly holds: string
  readonly tight: string
  readonly short: string
  readonly shortWash: string
  readonly tightWash: string
  readonly scrim: string
}

export const light: Palette = {
  paper: '#FAF7F0',
  sheet: '#FFFFFF',
  rule: '#D9D2C3',
  edge: '#8A8373',
  ink: '#1D2A33',
  quiet: '#55616A',
  accent: '#A8430C',
  onAccent: '#FFFFFF',
  accentWash: '#F3E0D3',
  gain: '#0B6E6E',
  gainBand: '#CFE3E1',
  phase: '#7A2E6B',
  phaseBand: '#E8D8E4',
  holds: '#2B6E46',
  tight: '#8A5A00',
  short: '#A3211B',
  shortWash: '#F6E4E0',
  tightWash: '#F7ECD6',
  scrim: 'rgba(29, 42, 51, 0.45)',
}

export const dark: Palette = {
  paper: '#11181D',
  sheet: '#1A242B',
  rule: '#35434C',
  edge: '#7C8A92',
  ink: '#EDE8DC',
  quiet: '#A9B3B8',
  accent: '#F0A06A',
  onAccent: '#1B1209',
  accentWash: '#3A2A20',
  gain: '#5CC6C0',
  gainBand: '#214447',
  phase: '#DBA2CF',
  phaseBand: '#42303F',
  holds: '#80CB9A',
  tight: '#E5B75F',
  short: '#F4938A',
  shortWash: '#3A2322',
  tightWash: '#37301F',
  scrim: 'rgba(0, 0, 0, 0.6)',
}

/** A named family falls back to the mono face for the few signs that it lacks (arrows, subscripts), then to the system. */
const stack = (name: string) => `${name}, OverpassMono-Regular, system-ui, sans-serif`
export const fonts = {
  text: stack('Barlow-Regular'),
  textMedium: stack('Barlow-Medium'),
  textStrong: stack('Barlow-SemiBold'),
  label: stack('BarlowCondensed-Medium'),
  labelStrong: stack('BarlowCondensed-SemiBold'),
  value: 'OverpassMono-Regular, ui-monospace, monospace',
  valueMedium: 'OverpassMono-Medium, ui-monospace, monospace',
} as const

/** A scale of 1.2 from 16 px; nothing smaller than the first. */
export const sizes = { small: 13.4, body: 16, lead: 19.2, heading: 23, title: 27.6, display: 39.8 } as const

export const space = { xs: 4, sm: 8, md: 12, lg: 16, xl: 24, xxl: 40 } as const

/** Widths from which the layout changes, in px. */
export const WIDE = 900
export const EXTRA_WIDE = 1400

/** The least side of anything to be pressed, in px. */
export const TARGET = 44
