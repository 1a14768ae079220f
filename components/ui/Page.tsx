import Head from 'expo-router/head'
import type { ReactNode } from 'react'
import { ScrollView, StyleSheet, View } from 'react-native'
import { Wordmark } from './Wordmark'
import { space } from '@/constants/theme'
import { useLayout } from '@/hooks/useLayout'
import { useTheme } from '@/hooks/useTheme'

export interface PageProps {
  readonly title: string
  readonly children: ReactNode
  /** At the right end of the head. */
  readonly actions?: ReactNode
}

/** A page outside a design: head with the name of the product, content in a column that stays readable. */
export function Page({ title, actions, children }: PageProps) {
  const theme = useTheme()
  const { isWide } = useLayout()
  return (
    <ScrollView style={styles.page} contentContainerStyle={styles.content}>
      <Head>
        <title>{`${title} · Steadrail`}</title>
      </Head>
      <View role="banner" style={[styles.head, { borderBottomColor: theme.rule }]}>
        <View style={[styles.headRow, { paddingHorizontal: isWide ? 48 : space.lg }]}>
          <Wordmark />
          <View style={styles.actions}>{actions}</View>
        </View>
      </View>
      <View role="main" style={[styles.main, { padding: isWide ? 48 : space.lg }]}>
        {children}
      </View>
    </ScrollView>
  )
}

const styles = StyleSheet.create({
  page: { flex: 1 },
  content: { flexGrow: 1 },
  head: { borderBottomWidth: 1, alignItems: 'center' },
  headRow: {
    width: '100%',
    maxWidth: 1280,
    minHeight: 60,
    flexDirection: 'row',
    alignItems: 'center',
    justifyContent: 'space-between',
  },
  actions: { flexDirection: 'row', gap: space.sm },
  main: { width: '100%', maxWidth: 1280, alignSelf: 'center', gap: space.xl },
})
