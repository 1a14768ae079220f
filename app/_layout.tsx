import { QueryClientProvider } from '@tanstack/react-query'
import { Slot, type ErrorBoundaryProps } from 'expo-router'
import { StatusBar } from 'expo-status-bar'
import { useState } from 'react'
import { StyleSheet, View } from 'react-native'
import { PortalHost } from '@rn-primitives/portal'
import { OfflineBar } from '@/components/ui/OfflineBar'
import { ErrorState } from '@/components/ui/states'
import { space } from '@/constants/theme'
import { createQueryClient } from '@/hooks/queryClient'
import { useAppFonts } from '@/hooks/useAppFonts'
import { useTheme } from '@/hooks/useTheme'

export default function RootLayout() {
  const theme = useTheme()
  const [queryClient] = useState(createQueryClient)
  const isReady = useAppFonts()
  return (
    <QueryClientProvider client={queryClient}>
      <View style={[styles.root, { backgroundColor: theme.paper }]}>
        <StatusBar style="auto" />
        {isReady ? (
          <>
            <OfflineBar />
            <Slot />
            <PortalHost />
          </>
        ) : null}
      </View>
    </QueryClientProvider>
  )
}

/** A fault of ours: the page says so and offers a way on; the draft stays in the browser. */
export function ErrorBoundary({ error, retry }: ErrorBoundaryProps) {
  return (
    <View style={styles.fault}>
      <ErrorState
        title="This page has failed"
        text={`Your entries are kept in this browser. What the program said: ${error.message}`}
        retry={{ onPress: () => void retry() }}
      />
    </View>
  )
}

const styles = StyleSheet.create({ root: { flex: 1 }, fault: { padding: space.xl } })
