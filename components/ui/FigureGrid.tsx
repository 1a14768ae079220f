import { Children, type ReactNode } from 'react'
import { StyleSheet, View } from 'react-native'
import { space } from '@/constants/theme'
import { useTheme } from '@/hooks/useTheme'

/** Figures side by side, ruled as in a notebook; `least` is the narrowest that one may become, in px. */
export function FigureGrid({ least = 160, children }: { readonly least?: number; readonly children: ReactNode }) {
  const theme = useTheme()
  return (
    <View style={[styles.grid, { backgroundColor: theme.rule, borderColor: theme.rule }]}>
      {Children.toArray(children).map((child, index) => (
        <View key={index} style={[styles.cell, { flexBasis: least, backgroundColor: theme.sheet }]}>
          {child}
        </View>
      ))}
    </View>
  )
}

const styles = StyleSheet.create({
  grid: { flexDirection: 'row', flexWrap: 'wrap', gap: 1, borderWidth: 1, borderRadius: 8, overflow: 'hidden' },
  cell: { flexGrow: 1, paddingHorizontal: space.md, paddingVertical: space.xs },
})
