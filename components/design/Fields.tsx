import { Children, type ReactNode } from 'react'
import { StyleSheet, View } from 'react-native'
import { space } from '@/constants/theme'

/** Entries side by side, as many as the width takes. */
export function Fields({ children }: { readonly children: ReactNode }) {
  return (
    <View style={styles.row}>
      {Children.toArray(children).map((child, index) => (
        <View key={index} style={styles.cell}>
          {child}
        </View>
      ))}
    </View>
  )
}

const styles = StyleSheet.create({
  row: { flexDirection: 'row', flexWrap: 'wrap', gap: space.md },
  cell: { flexGrow: 1, flexShrink: 1, flexBasis: 140, minWidth: 130 },
})
