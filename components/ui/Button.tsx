import { Link, type Href } from 'expo-router'
import { Pressable, StyleSheet, View, type ViewStyle } from 'react-native'
import { Icon, type IconName } from './Icon'
import { Text, type TextTone } from './Text'
import { space, TARGET, type Palette } from '@/constants/theme'
import { useTheme } from '@/hooks/useTheme'

type Kind = 'primary' | 'plain' | 'quiet'

const LOOKS: Record<Kind, (theme: Palette) => { box: ViewStyle; tone: TextTone }> = {
  primary: (theme) => ({ box: { backgroundColor: theme.accent, borderColor: theme.accent }, tone: 'onAccent' }),
  plain: (theme) => ({ box: { backgroundColor: theme.sheet, borderColor: theme.edge }, tone: 'ink' }),
  quiet: () => ({ box: { backgroundColor: 'transparent', borderColor: 'transparent' }, tone: 'accent' }),
}

interface ButtonLook {
  /** What is shown, and read aloud unless `spoken` says more. */
  readonly label: string
  readonly spoken?: string
  readonly kind?: Kind
  readonly icon?: IconName
  /** Shows the icon alone; the label is still read aloud. */
  readonly iconOnly?: boolean
  readonly isDisabled?: boolean
  readonly isPressed?: boolean
}

export interface ButtonProps extends ButtonLook {
  readonly onPress: () => void
}

export function Button({ onPress, ...look }: ButtonProps) {
  const theme = useTheme()
  const { box } = LOOKS[look.kind ?? 'plain'](theme)
  const pressed = look.isPressed === undefined ? {} : { 'aria-pressed': look.isPressed }
  return (
    <Pressable
      role="button"
      aria-label={look.spoken ?? (look.iconOnly ? look.label : undefined)}
      disabled={look.isDisabled}
      onPress={onPress}
      style={[
        styles.box,
        look.kind === 'quiet' && styles.quiet,
        look.iconOnly && styles.iconOnly,
        box,
        look.isDisabled && styles.disabled,
      ]}
      {...pressed}
    >
      <Face {...look} />
    </Pressable>
  )
}

export function LinkButton({ href, ...look }: ButtonLook & { readonly href: Href }) {
  const theme = useTheme()
  const { box } = LOOKS[look.kind ?? 'plain'](theme)
  return (
    <Link href={href} asChild>
      <Pressable
        role="link"
        aria-label={look.spoken}
        style={StyleSheet.flatten([
          styles.box,
          look.kind === 'quiet' && styles.quiet,
          look.iconOnly && styles.iconOnly,
          box,
        ])}
      >
        <Face {...look} />
      </Pressable>
    </Link>
  )
}

function Face({ label, kind = 'plain', icon, iconOnly, isPressed }: ButtonLook) {
  const theme = useTheme()
  const { tone } = LOOKS[kind](theme)
  return (
    <View style={styles.face}>
      {icon ? <Icon name={icon} color={isPressed ? theme.accent : theme[tone]} size={20} /> : null}
      {iconOnly ? null : (
        <Text variant="strong" tone={isPressed ? 'accent' : tone} lines={1}>
          {label}
        </Text>
      )}
    </View>
  )
}

const styles = StyleSheet.create({
  box: {
    minHeight: TARGET,
    minWidth: TARGET,
    paddingHorizontal: space.lg,
    borderWidth: 1,
    borderRadius: 6,
    justifyContent: 'center',
    alignItems: 'center',
  },
  quiet: { paddingHorizontal: space.sm },
  iconOnly: { paddingHorizontal: 0 },
  face: { flexDirection: 'row', alignItems: 'center', gap: space.sm },
  disabled: { opacity: 0.5 },
})
