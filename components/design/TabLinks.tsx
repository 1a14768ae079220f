import { Link, usePathname } from 'expo-router'
import { Pressable, StyleSheet, View } from 'react-native'
import { Icon, type IconName } from '@/components/ui/Icon'
import { Text } from '@/components/ui/Text'
import { TARGET } from '@/constants/theme'
import { useTheme } from '@/hooks/useTheme'

const TABS = [
  { name: 'Stage', href: '/design/stage', icon: 'stage' },
  { name: 'Plant', href: '/design/plant', icon: 'plant' },
  { name: 'Loop', href: '/design/loop', icon: 'loop' },
  { name: 'Spread', href: '/design/spread', icon: 'spread' },
] as const satisfies readonly { name: string; href: string; icon: IconName }[]

/** The screens of a design: at the foot of a phone, within reach of the thumb; a rail on the left of a wide screen. */
export function TabLinks({ isRail }: { readonly isRail: boolean }) {
  const theme = useTheme()
  const pathname = usePathname()
  return (
    <View
      role="navigation"
      aria-label="Screens of the design"
      style={[isRail ? styles.rail : styles.foot, { backgroundColor: theme.sheet, borderColor: theme.rule }]}
    >
      {TABS.map(({ name, href, icon }) => {
        const isHere = pathname === href
        const color = isHere ? theme.accent : theme.quiet
        const mark = isHere ? theme.accent : 'transparent'
        const current = { 'aria-current': isHere ? 'page' : undefined }
        return (
          <Link key={name} href={href} asChild>
            <Pressable
              role="link"
              {...current}
              style={StyleSheet.flatten([
                styles.tab,
                isRail ? styles.railTab : styles.footTab,
                isRail ? { borderLeftColor: mark } : { borderTopColor: mark },
              ])}
            >
              <Icon name={icon} color={color} />
              <Text variant="labelStrong" style={{ color }}>
                {name}
              </Text>
            </Pressable>
          </Link>
        )
      })}
    </View>
  )
}

const styles = StyleSheet.create({
  foot: { flexDirection: 'row', borderTopWidth: 1 },
  rail: { width: 76, borderRightWidth: 1, paddingTop: 72 },
  tab: { alignItems: 'center', justifyContent: 'center', gap: 2, minHeight: TARGET },
  footTab: { flex: 1, paddingVertical: 7, borderTopWidth: 3 },
  railTab: { paddingVertical: 12, borderLeftWidth: 3 },
})
