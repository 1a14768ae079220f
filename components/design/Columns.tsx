import type { ReactNode } from 'react'
import { ScrollView, StyleSheet, View } from 'react-native'
import { space } from '@/constants/theme'
import { useLayout } from '@/hooks/useLayout'
import { useTheme } from '@/hooks/useTheme'

export interface ColumnsProps {
  /** What is entered and decided. */
  readonly inputs: ReactNode
  /** What it gives as curves and drawings. */
  readonly curves: ReactNode
  /** What it gives in figures. */
  readonly figures: ReactNode
  /** On a phone: which of the three comes first, second and last. */
  readonly phoneOrder: readonly ('inputs' | 'curves' | 'figures')[]
}

/** One column on a phone; inputs beside results on a wide screen; three columns where there is room for them. */
export function Columns({ inputs, curves, figures, phoneOrder }: ColumnsProps) {
  const theme = useTheme()
  const { isWide, isExtraWide } = useLayout()
  const parts = { inputs, curves, figures }
  if (!isWide) {
    return (
      <ScrollView style={styles.fill} contentContainerStyle={styles.phone}>
        {phoneOrder.map((name) => (
          <View key={name} style={styles.part}>
            {parts[name]}
          </View>
        ))}
      </ScrollView>
    )
  }
  const edge = { borderRightColor: theme.rule }
  return (
    <View style={styles.row}>
      <Column width={380} style={[styles.ruled, edge]}>
        {inputs}
      </Column>
      {isExtraWide ? (
        <>
          <Column style={[styles.ruled, edge]}>{curves}</Column>
          <Column width={392}>{figures}</Column>
        </>
      ) : (
        <Column>
          {curves}
          {figures}
        </Column>
      )}
    </View>
  )
}

interface ColumnProps {
  readonly width?: number
  readonly style?: React.ComponentProps<typeof View>['style']
  readonly children: ReactNode
}

function Column({ width, style, children }: ColumnProps) {
  return (
    <View style={[width ? { width } : styles.fill, style]}>
      <ScrollView style={styles.fill} contentContainerStyle={styles.column}>
        {children}
      </ScrollView>
    </View>
  )
}

const styles = StyleSheet.create({
  fill: { flex: 1, minWidth: 0 },
  phone: { padding: space.md, gap: space.md },
  part: { gap: space.md },
  row: { flex: 1, flexDirection: 'row', minHeight: 0 },
  column: { padding: space.lg, gap: space.lg },
  ruled: { borderRightWidth: 1 },
})
