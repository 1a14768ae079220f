import type { ReactNode } from 'react'
import { ScrollView, StyleSheet, View } from 'react-native'
import { Text } from './Text'
import { space } from '@/constants/theme'
import { useTheme } from '@/hooks/useTheme'

export interface Column {
  readonly title: string
  readonly isNumber?: boolean
  readonly width: number
}

export interface TableProps {
  readonly label: string
  readonly columns: readonly Column[]
  /** Cells in the order of the columns; text is drawn in the table's face, anything else as it is. */
  readonly rows: readonly { readonly key: string; readonly cells: readonly ReactNode[] }[]
}

/** A table that scrolls in its own frame where the screen is narrower than it is. */
export function Table({ label, columns, rows }: TableProps) {
  const theme = useTheme()
  const least = columns.reduce((sum, column) => sum + column.width, 0)
  const line = { borderBottomColor: theme.rule }
  return (
    <ScrollView
      horizontal
      tabIndex={0}
      role="region"
      aria-label={`${label}, scrolls sideways`}
      contentContainerStyle={styles.frame}
    >
      <View role="table" aria-label={label} style={[styles.table, { minWidth: least }]}>
        <View role="row" style={[styles.row, line]}>
          {columns.map((column) => (
            <View key={column.title} role="columnheader" style={cellStyle(column)}>
              <Text variant="label" tone="quiet" style={column.isNumber && styles.right}>
                {column.title}
              </Text>
            </View>
          ))}
        </View>
        {rows.map((row) => (
          <View key={row.key} role="row" style={[styles.row, line]}>
            {columns.map((column, index) => (
              <View key={column.title} role="cell" style={cellStyle(column)}>
                <Cell content={row.cells[index]} isNumber={column.isNumber ?? false} />
              </View>
            ))}
          </View>
        ))}
      </View>
    </ScrollView>
  )
}

function Cell({ content, isNumber }: { content: ReactNode; isNumber: boolean }) {
  if (typeof content !== 'string') return content
  return (
    <Text variant={isNumber ? 'smallValue' : 'small'} style={isNumber && styles.right}>
      {content}
    </Text>
  )
}

const cellStyle = (column: Column) => [styles.cell, { width: column.width, flexGrow: column.width }]

const styles = StyleSheet.create({
  frame: { flexGrow: 1 },
  table: { flexGrow: 1 },
  row: { flexDirection: 'row', borderBottomWidth: 1, minHeight: 36, alignItems: 'center' },
  cell: { paddingRight: 6, paddingVertical: space.xs },
  right: { textAlign: 'right' },
})
