import { StyleSheet, View } from 'react-native'
import { Text } from '@/components/ui/Text'
import { useDebounced } from '@/hooks/useDebounced'
import { useDesignAnalysis } from '@/hooks/useDesignAnalysis'

/** Work that is over sooner than this is not worth a word. */
const PATIENCE = 250 // ms

/** A quiet word while figures follow an entry; the last ones stay in view. */
export function UpdatingMark() {
  const { isUpdating } = useDesignAnalysis()
  const isLong = useDebounced(isUpdating, PATIENCE) && isUpdating
  return (
    <View style={styles.mark} role="status">
      <Text variant="label" tone="quiet" lines={1}>
        {isLong ? 'updating' : ''}
      </Text>
    </View>
  )
}

const styles = StyleSheet.create({ mark: { width: 56, alignItems: 'flex-end' } })
