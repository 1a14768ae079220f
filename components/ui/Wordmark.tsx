import { Link } from 'expo-router'
import { Pressable, StyleSheet } from 'react-native'
import Svg, { Circle, Line, Path } from 'react-native-svg'
import { Text } from './Text'
import { space, TARGET } from '@/constants/theme'
import { useTheme } from '@/hooks/useTheme'

/** The product's sign: a short piece of the rule with a pole, a zero and the handle between them. */
export function Wordmark({ isShort }: { readonly isShort?: boolean }) {
  const theme = useTheme()
  return (
    <Link href="/" asChild>
      <Pressable role="link" aria-label="Steadrail, first page" style={styles.mark}>
        <Svg width={34} height={24} viewBox="0 0 34 24" aria-hidden>
          <Line x1={0} x2={34} y1={14} y2={14} stroke={theme.ink} strokeWidth={1.8} />
          <Path d="M4 3l6 6M10 3l-6 6" stroke={theme.gain} strokeWidth={2} />
          <Line x1={17} x2={17} y1={2} y2={22} stroke={theme.accent} strokeWidth={3} />
          <Circle cx={27} cy={6} r={3.2} stroke={theme.gain} strokeWidth={2} fill="none" />
        </Svg>
        {isShort ? null : <Text variant="heading">Steadrail</Text>}
      </Pressable>
    </Link>
  )
}

const styles = StyleSheet.create({
  mark: { flexDirection: 'row', alignItems: 'center', gap: space.sm, minHeight: TARGET, minWidth: TARGET },
})
