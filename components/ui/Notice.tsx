import type { ReactNode } from 'react'
import { StyleSheet, View } from 'react-native'
import { Text } from './Text'
import { space } from '@/constants/theme'
import { useTheme } from '@/hooks/useTheme'

export type NoticeKind = 'note' | 'caution' | 'fault'

export interface NoticeProps {
  readonly kind: NoticeKind
  readonly title?: string
  readonly isLive?: boolean
  readonly children: ReactNode
}

/** A remark in the margin: plain, to be heeded, or wrong. Told apart by its word and its bar as well as by hue. */
export function Notice({ kind, title, isLive, children }: NoticeProps) {
  const theme = useTheme()
  const looks = {
    note: { bar: theme.edge, ground: 'transparent' },
    caution: { bar: theme.tight, ground: theme.tightWash },
    fault: { bar: theme.short, ground: theme.shortWash },
  }[kind]
  return (
    <View
      role={isLive ? (kind === 'fault' ? 'alert' : 'status') : undefined}
      style={[styles.notice, { borderLeftColor: looks.bar, backgroundColor: looks.ground }]}
    >
      {title ? <Text variant="strong">{title}</Text> : null}
      {typeof children === 'string' ? (
        <Text variant="small" style={styles.text}>
          {children}
        </Text>
      ) : (
        children
      )}
    </View>
  )
}

const styles = StyleSheet.create({
  notice: { borderLeftWidth: 4, paddingHorizontal: space.md, paddingVertical: space.sm, gap: space.xs },
  text: { fontSize: 14.5, lineHeight: 20 },
})
