import { useEffect, useState, type ReactNode } from 'react'
import { Animated, Easing, StyleSheet, View } from 'react-native'
import { Button, LinkButton, type ButtonProps } from './Button'
import { Text } from './Text'
import { space } from '@/constants/theme'
import { useReducedMotion } from '@/hooks/useReducedMotion'
import { useTheme } from '@/hooks/useTheme'
import type { Href } from 'expo-router'

/** Nothing here yet, and what would put something here. */
export function EmptyState(props: {
  readonly title: string
  readonly text: string
  readonly action: string
  readonly href: Href
}) {
  return (
    <View style={styles.middle}>
      <Text variant="heading" heading={2}>
        {props.title}
      </Text>
      <Text tone="quiet">{props.text}</Text>
      <LinkButton kind="primary" label={props.action} href={props.href} />
    </View>
  )
}

/** What happened and what to do; nothing is lost meanwhile. */
export function ErrorState({
  title,
  text,
  retry,
  children,
}: {
  readonly title: string
  readonly text: string
  readonly retry?: Pick<ButtonProps, 'onPress'>
  readonly children?: ReactNode
}) {
  const theme = useTheme()
  return (
    <View role="alert" style={[styles.fault, { borderColor: theme.short, backgroundColor: theme.shortWash }]}>
      <Text variant="strong">{title}</Text>
      <Text>{text}</Text>
      {children}
      {retry ? (
        <View style={styles.left}>
          <Button label="Try again" onPress={retry.onPress} />
        </View>
      ) : null}
    </View>
  )
}

/** The shape of what is coming: bars of the given heights, in px. */
export function Loading({ label, bars }: { readonly label: string; readonly bars: readonly number[] }) {
  const theme = useTheme()
  const isStill = useReducedMotion()
  const [breath] = useState(() => new Animated.Value(1))
  useEffect(() => {
    if (isStill) return
    const half = (toValue: number) =>
      Animated.timing(breath, { toValue, duration: 700, easing: Easing.inOut(Easing.quad), useNativeDriver: false })
    const animation = Animated.loop(Animated.sequence([half(0.5), half(1)]))
    animation.start()
    return () => animation.stop()
  }, [breath, isStill])
  return (
    <View role="status" aria-label={label} aria-busy style={styles.bars}>
      {bars.map((height, index) => (
        <Animated.View key={index} style={[styles.bar, { height, opacity: breath, backgroundColor: theme.rule }]} />
      ))}
    </View>
  )
}

const styles = StyleSheet.create({
  middle: { alignItems: 'flex-start', gap: space.md, maxWidth: 560 },
  fault: { borderWidth: 1, borderRadius: 8, padding: space.lg, gap: space.sm },
  left: { alignSelf: 'flex-start' },
  bars: { gap: space.md },
  bar: { borderRadius: 8, width: '100%' },
})
