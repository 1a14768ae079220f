import { StyleSheet, View } from 'react-native'
import { Text } from './Text'
import { space } from '@/constants/theme'
import { useOnline } from '@/hooks/useOnline'
import { useTheme } from '@/hooks/useTheme'

/** Says that the connection is gone, and what still works. */
export function OfflineBar() {
  const theme = useTheme()
  const isOnline = useOnline()
  if (isOnline) return null
  return (
    <View role="status" style={[styles.bar, { backgroundColor: theme.tightWash, borderBottomColor: theme.tight }]}>
      <Text variant="small">
        Offline. What you enter is kept in this browser; figures follow when the connection is back.
      </Text>
    </View>
  )
}

const styles = StyleSheet.create({
  bar: { paddingHorizontal: space.lg, paddingVertical: space.sm, borderBottomWidth: 2 },
})
