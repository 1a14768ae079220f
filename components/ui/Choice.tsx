import { useId, useState } from 'react'
import { Pressable, StyleSheet, View } from 'react-native'
import { onKey } from './keys'
import { Text } from './Text'
import { space, TARGET } from '@/constants/theme'
import { useTheme } from '@/hooks/useTheme'

export interface ChoiceProps<T extends string> {
  readonly label: string
  readonly value: T
  readonly options: readonly { readonly value: T; readonly label: string }[]
  readonly onChange: (value: T) => void
  /** The label is read aloud only. */
  readonly isLabelHidden?: boolean
}

/** One of a few, all in view: a group of radio buttons with the arrow keys that such a group has. */
export function Choice<T extends string>({ label, value, options, onChange, isLabelHidden }: ChoiceProps<T>) {
  const theme = useTheme()
  const id = useId()
  const [items] = useState(() => new Map<number, View>())
  const move = (by: number) => {
    const at = options.findIndex((option) => option.value === value)
    const next = (at + by + options.length) % options.length
    const chosen = options[next]
    if (!chosen) return
    onChange(chosen.value)
    items.get(next)?.focus()
  }
  return (
    <View style={styles.group}>
      {isLabelHidden ? null : (
        <Text variant="label" tone="quiet" id={id}>
          {label}
        </Text>
      )}
      <View
        role="radiogroup"
        aria-label={isLabelHidden ? label : undefined}
        aria-labelledby={isLabelHidden ? undefined : id}
        style={styles.row}
        {...onKey((key) => {
          const by = STEPS[key]
          if (by !== undefined) move(by)
          return by !== undefined
        })}
      >
        {options.map((option, index) => {
          const isChosen = option.value === value
          return (
            <Pressable
              key={option.value}
              ref={(item) => {
                if (item) items.set(index, item)
              }}
              role="radio"
              aria-checked={isChosen}
              tabIndex={isChosen ? 0 : -1}
              onPress={() => onChange(option.value)}
              style={[
                styles.item,
                { borderColor: isChosen ? theme.ink : theme.edge, backgroundColor: isChosen ? theme.ink : theme.sheet },
              ]}
            >
              <Text variant="labelStrong" style={{ color: isChosen ? theme.sheet : theme.ink }}>
                {option.label}
              </Text>
            </Pressable>
          )
        })}
      </View>
    </View>
  )
}

const STEPS: Readonly<Record<string, number>> = { ArrowRight: 1, ArrowDown: 1, ArrowLeft: -1, ArrowUp: -1 }

const styles = StyleSheet.create({
  group: { gap: space.xs },
  row: { flexDirection: 'row', flexWrap: 'wrap', gap: space.sm },
  item: {
    minHeight: TARGET,
    minWidth: TARGET,
    justifyContent: 'center',
    alignItems: 'center',
    paddingHorizontal: space.md,
    borderWidth: 1,
    borderRadius: 22,
  },
})
