import { useId } from 'react'
import { StyleSheet, TextInput, View, type KeyboardTypeOptions } from 'react-native'
import { Text } from './Text'
import { fonts, sizes, space, TARGET } from '@/constants/theme'
import { useTheme } from '@/hooks/useTheme'

export interface FieldProps {
  readonly label: string
  readonly value: string
  readonly onChangeText: (text: string) => void
  readonly onFocus?: () => void
  readonly onBlur?: () => void
  readonly onSubmit?: () => void
  readonly hint?: string
  readonly error?: string
  readonly placeholder?: string
  readonly keyboard?: KeyboardTypeOptions
  readonly lines?: number
  readonly isText?: boolean
}

/** One labelled entry. What was typed stays as it is; what is wrong with it is said below. */
export function Field(props: FieldProps) {
  const { label, hint, error, lines = 1 } = props
  const theme = useTheme()
  const id = useId()
  const note = error ?? hint
  // React Native's types lack these two, which the web target passes on.
  const described = { 'aria-invalid': error !== undefined, 'aria-describedby': note ? `${id}-note` : undefined }
  return (
    <View style={styles.field}>
      <Text variant="label" tone="quiet" id={`${id}-label`}>
        {label}
      </Text>
      <TextInput
        {...described}
        aria-labelledby={`${id}-label`}
        value={props.value}
        onChangeText={props.onChangeText}
        onFocus={props.onFocus}
        onBlur={props.onBlur}
        onSubmitEditing={props.onSubmit}
        placeholder={props.placeholder}
        placeholderTextColor={theme.quiet}
        keyboardType={props.keyboard}
        multiline={lines > 1}
        numberOfLines={lines}
        autoCapitalize="none"
        autoCorrect={false}
        autoComplete="off"
        spellCheck={false}
        style={[
          styles.input,
          props.isText && styles.text,
          lines > 1 && styles.area,
          { color: theme.ink, backgroundColor: theme.sheet, borderColor: error ? theme.short : theme.edge },
          error !== undefined && styles.wrong,
        ]}
      />
      {note ? (
        <Text variant="small" tone={error ? 'short' : 'quiet'} id={`${id}-note`} live={error ? 'polite' : undefined}>
          {error ? `✕ ${error}` : note}
        </Text>
      ) : null}
    </View>
  )
}

const styles = StyleSheet.create({
  field: { gap: space.xs, width: '100%' },
  input: {
    height: TARGET,
    width: '100%',
    borderWidth: 1,
    borderRadius: 6,
    paddingHorizontal: space.md,
    fontFamily: fonts.value,
    fontSize: sizes.body,
  },
  text: { fontFamily: fonts.text },
  area: { height: 160, paddingVertical: space.sm, fontSize: sizes.small },
  wrong: { borderWidth: 2 },
})
