import type { ReactNode } from 'react'
import { Text as NativeText, StyleSheet, type StyleProp, type TextStyle } from 'react-native'
import { fonts, sizes, type Palette } from '@/constants/theme'
import { useTheme } from '@/hooks/useTheme'

export type TextTone = keyof Pick<
  Palette,
  'ink' | 'quiet' | 'accent' | 'onAccent' | 'gain' | 'phase' | 'holds' | 'tight' | 'short'
>

const variants = StyleSheet.create({
  display: { fontFamily: fonts.textStrong, fontSize: sizes.display, lineHeight: 44, letterSpacing: -0.6 },
  title: { fontFamily: fonts.textStrong, fontSize: sizes.title, lineHeight: 34, letterSpacing: -0.2 },
  heading: { fontFamily: fonts.textStrong, fontSize: sizes.lead, lineHeight: 25 },
  lead: { fontFamily: fonts.text, fontSize: sizes.lead, lineHeight: 28 },
  body: { fontFamily: fonts.text, fontSize: sizes.body, lineHeight: 23 },
  strong: { fontFamily: fonts.textStrong, fontSize: sizes.body, lineHeight: 23 },
  small: { fontFamily: fonts.text, fontSize: sizes.small, lineHeight: 19 },
  label: { fontFamily: fonts.label, fontSize: 14.5, lineHeight: 19 },
  labelStrong: { fontFamily: fonts.labelStrong, fontSize: 14.5, lineHeight: 19 },
  value: { fontFamily: fonts.value, fontSize: sizes.body, lineHeight: 23 },
  smallValue: { fontFamily: fonts.value, fontSize: sizes.small, lineHeight: 19 },
  figure: { fontFamily: fonts.value, fontSize: 20, lineHeight: 28 },
})

export interface TextProps {
  readonly variant?: keyof typeof variants
  readonly tone?: TextTone
  /** Makes the text a heading of that level. */
  readonly heading?: 1 | 2 | 3
  readonly id?: string
  /** Read aloud at once (`assertive`) or when there is a pause (`polite`) whenever it changes. */
  readonly live?: 'polite' | 'assertive'
  readonly lines?: number
  readonly style?: StyleProp<TextStyle>
  readonly children: ReactNode
}

export function Text({ variant = 'body', tone = 'ink', heading, id, live, lines, style, children }: TextProps) {
  const theme = useTheme()
  const asHeading = heading ? ({ role: 'heading', 'aria-level': heading } as const) : {}
  return (
    <NativeText
      {...asHeading}
      id={id}
      aria-live={live}
      numberOfLines={lines}
      style={StyleSheet.flatten([variants[variant], { color: theme[tone] }, style])}
    >
      {children}
    </NativeText>
  )
}
