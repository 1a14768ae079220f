import { StyleSheet, View } from 'react-native'
import { figure } from '@/components/format'
import { Text } from '@/components/ui/Text'
import { space } from '@/constants/theme'
import { formatQuantity } from '@/converters/quantities'
import type { ClosedForm } from '@/converters/results'
import { useTheme } from '@/hooks/useTheme'

/** The textbook's approximations beside the exact roots: what moves with which part. */
export function ClosedForms({ forms }: { readonly forms: readonly ClosedForm[] }) {
  const theme = useTheme()
  return (
    <View role="list" aria-label="Closed forms">
      {forms.map((form, index) => (
        <View
          key={form.key}
          role="listitem"
          style={[styles.row, index > 0 && { borderTopWidth: 1, borderTopColor: theme.rule }]}
        >
          <View style={styles.words}>
            <Text>{form.label}</Text>
            <Text variant="smallValue" tone="quiet">
              {form.equation}
            </Text>
            <Text variant="small" tone="quiet">
              {form.source}
            </Text>
          </View>
          <Text variant="value">{valueOf(form)}</Text>
        </View>
      ))}
    </View>
  )
}

function valueOf({ value, unit }: ClosedForm): string {
  if (unit === 'V/V') return `${formatQuantity(value, '')} V/V`
  return figure(value, unit)
}

const styles = StyleSheet.create({
  row: { flexDirection: 'row', gap: space.md, paddingVertical: space.sm, alignItems: 'baseline' },
  words: { flex: 1, minWidth: 0 },
})
