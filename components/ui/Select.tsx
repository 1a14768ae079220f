import * as Primitive from '@rn-primitives/select'
import { useId } from 'react'
import { Pressable, StyleSheet, View } from 'react-native'
import { Icon } from './Icon'
import { Text } from './Text'
import { fonts, sizes, space, TARGET } from '@/constants/theme'
import { useTheme } from '@/hooks/useTheme'

export interface SelectProps<T extends string> {
  readonly label: string
  readonly value: T
  readonly options: readonly { readonly value: T; readonly label: string }[]
  readonly onChange: (value: T) => void
}

/** One of a longer list. */
export function Select<T extends string>({ label, value, options, onChange }: SelectProps<T>) {
  const theme = useTheme()
  const id = useId()
  const shown = options.find((option) => option.value === value)?.label ?? value
  const choose = (next: { value: string } | undefined) => {
    const chosen = options.find((option) => option.value === next?.value)
    if (chosen) onChange(chosen.value)
  }
  return (
    <View style={styles.field}>
      <Text variant="label" tone="quiet" id={id}>
        {label}
      </Text>
      <Primitive.Root value={{ value, label: shown }} onValueChange={choose}>
        <Primitive.Trigger asChild>
          <Pressable
            role="combobox"
            aria-labelledby={id}
            style={StyleSheet.flatten([styles.trigger, { borderColor: theme.edge, backgroundColor: theme.sheet }])}
          >
            <Text variant="value">{shown}</Text>
            <Icon name="chevron" color={theme.ink} size={18} />
          </Pressable>
        </Primitive.Trigger>
        <Primitive.Portal>
          <Primitive.Content
            style={StyleSheet.flatten([styles.list, { borderColor: theme.edge, backgroundColor: theme.sheet }])}
          >
            <Primitive.Viewport>
              {options.map((option) => (
                <Primitive.Item
                  key={option.value}
                  value={option.value}
                  label={option.label}
                  style={StyleSheet.flatten([
                    styles.item,
                    option.value === value && { backgroundColor: theme.accentWash },
                  ])}
                >
                  <Primitive.ItemText style={StyleSheet.flatten([styles.itemText, { color: theme.ink }])} />
                </Primitive.Item>
              ))}
            </Primitive.Viewport>
          </Primitive.Content>
        </Primitive.Portal>
      </Primitive.Root>
    </View>
  )
}

const styles = StyleSheet.create({
  field: { gap: space.xs, width: '100%' },
  trigger: {
    height: TARGET,
    flexDirection: 'row',
    justifyContent: 'space-between',
    alignItems: 'center',
    gap: space.sm,
    paddingHorizontal: space.md,
    borderWidth: 1,
    borderRadius: 6,
  },
  list: { borderWidth: 1, borderRadius: 6, paddingVertical: space.xs, minWidth: 120, zIndex: 20 },
  // This style reaches a plain element of the page, which knows neither shorthands nor the flex of a view.
  item: {
    display: 'flex',
    flexDirection: 'column',
    minHeight: TARGET,
    justifyContent: 'center',
    paddingLeft: space.md,
    paddingRight: space.md,
  },
  itemText: { fontFamily: fonts.value, fontSize: sizes.body },
})
