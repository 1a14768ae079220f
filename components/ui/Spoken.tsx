import { StyleSheet, View } from 'react-native'
import { Text } from './Text'

/** For those who listen to the page: text that takes no room on it. */
export function Spoken({ children, live }: { readonly children: string; readonly live?: 'polite' }) {
  return (
    <View style={styles.hidden}>
      <Text live={live}>{children}</Text>
    </View>
  )
}

const styles = StyleSheet.create({
  hidden: { position: 'absolute', width: 1, height: 1, overflow: 'hidden', opacity: 0.01 },
})
