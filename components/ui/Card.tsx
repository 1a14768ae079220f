import type { ReactNode } from 'react'
import { StyleSheet, View } from 'react-native'
import { Text } from './Text'
import { space } from '@/constants/theme'
import { useLayout } from '@/hooks/useLayout'
import { useTheme } from '@/hooks/useTheme'

export interface CardProps {
  readonly title?: string
  /** Beside the title: a button or two. */
  readonly action?: ReactNode
  readonly children: ReactNode
}

/** A sheet of paper with a heading: one part of a screen. */
export function Card({ title, action, children }: CardProps) {
  const theme = useTheme()
  const { isWide } = useLayout()
  return (
    <View
      role={title ? 'region' : undefined}
      aria-label={title}
      style={[
        styles.card,
        { padding: isWide ? space.lg : space.md, backgroundColor: theme.sheet, borderColor: theme.rule },
      ]}
    >
      {title ? (
        <View style={styles.head}>
          <View style={styles.title}>
            <Text variant="heading" heading={2}>
              {title}
            </Text>
          </View>
          {action}
        </View>
      ) : null}
      {children}
    </View>
  )
}

const styles = StyleSheet.create({
  card: { borderWidth: 1, borderRadius: 8, gap: space.md },
  head: { flexDirection: 'row', alignItems: 'center', gap: space.sm, flexWrap: 'wrap' },
  title: { flexGrow: 1, flexShrink: 1 },
})
