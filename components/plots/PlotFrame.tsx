import { useRef, useState, type ReactNode } from 'react'
import { StyleSheet, View } from 'react-native'
import { csvText, saveText, svgText } from './save'
import { Button } from '@/components/ui/Button'
import { Spoken } from '@/components/ui/Spoken'
import { Table } from '@/components/ui/Table'
import { Text } from '@/components/ui/Text'
import { space } from '@/constants/theme'
import { useTheme } from '@/hooks/useTheme'

/** A plot's figures as a table: for reading aloud, for copying, for a file. */
export interface PlotTable {
  readonly header: readonly string[]
  /** As written in the table. */
  readonly rows: readonly (readonly string[])[]
  /** Every point, for the file. */
  readonly data: readonly (readonly (number | null)[])[]
}

export interface PlotFrameProps {
  readonly title: string
  /** What the plot shows, in a sentence with its figures. */
  readonly summary: string
  /** Name of the files, without ending. */
  readonly fileName: string
  readonly table: () => PlotTable
  /** What the cursor reads; keeps its height. */
  readonly reading?: ReactNode
  readonly children: (width: number) => ReactNode
}

/** What every plot has around it: title, reading, "as table", and the files. */
export function PlotFrame({ title, summary, fileName, table, reading, children }: PlotFrameProps) {
  const theme = useTheme()
  const [width, setWidth] = useState(0)
  const [asTable, setAsTable] = useState(false)
  const drawing = useRef<View>(null)
  const saveSvg = () => {
    const text = svgText(drawing.current, theme.sheet)
    if (text) saveText(`${fileName}.svg`, 'image/svg+xml', text)
  }
  const saveCsv = () => {
    const { header, data } = table()
    saveText(`${fileName}.csv`, 'text/csv', csvText(header, data))
  }
  return (
    <View role="group" aria-label={title} style={styles.frame}>
      <View style={styles.head}>
        <View style={styles.title}>
          <Text variant="strong" heading={3}>
            {title}
          </Text>
        </View>
        <View style={styles.tools}>
          <Button
            kind="quiet"
            icon="table"
            label="As table"
            iconOnly
            spoken={`${title} as table`}
            isPressed={asTable}
            onPress={() => setAsTable((shown) => !shown)}
          />
          {asTable ? null : <FileButton name="SVG" title={title} onPress={saveSvg} />}
          <FileButton name="CSV" title={title} onPress={saveCsv} />
        </View>
      </View>
      <Spoken>{summary}</Spoken>
      {asTable ? (
        <PlotAsTable title={title} table={table()} />
      ) : (
        <>
          {reading}
          <View
            ref={drawing}
            style={styles.drawing}
            onLayout={(event) => setWidth(Math.round(event.nativeEvent.layout.width))}
          >
            {width > 0 ? children(width) : null}
          </View>
        </>
      )}
    </View>
  )
}

function FileButton({ name, title, onPress }: { name: string; title: string; onPress: () => void }) {
  return <Button kind="quiet" label={name} spoken={`Download ${title} as ${name}`} onPress={onPress} />
}

function PlotAsTable({ title, table }: { title: string; table: PlotTable }) {
  return (
    <Table
      label={title}
      columns={table.header.map((name) => ({ title: name, isNumber: true, width: 116 }))}
      rows={table.rows.map((cells, index) => ({ key: String(index), cells }))}
    />
  )
}

const styles = StyleSheet.create({
  frame: { gap: space.xs },
  head: { flexDirection: 'row', alignItems: 'center' },
  title: { flexGrow: 1, flexShrink: 1 },
  tools: { flexDirection: 'row' },
  drawing: { width: '100%' },
})
