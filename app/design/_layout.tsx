import { Slot } from 'expo-router'
import { StyleSheet, View } from 'react-native'
import { DesignHeader } from '@/components/design/DesignHeader'
import { DesignRule } from '@/components/design/DesignRule'
import { NoDesign } from '@/components/design/NoDesign'
import { TabLinks } from '@/components/design/TabLinks'
import { useStoredDraft } from '@/hooks/draft/useDraft'
import { ServerProblems } from '@/hooks/draft/serverProblems'
import { problemsByPath } from '@/hooks/api'
import { useDesignAnalysis } from '@/hooks/useDesignAnalysis'
import { useFollowProposal } from '@/hooks/useFollowProposal'
import { useLayout } from '@/hooks/useLayout'

/** What all screens of a design share: its name, the frequency rule, the way between the screens. */
export default function DesignLayout() {
  const stored = useStoredDraft()
  return stored.kind === 'draft' ? <OpenDesign /> : <NoDesign stored={stored} />
}

function OpenDesign() {
  const { isWide } = useLayout()
  const { error } = useDesignAnalysis()
  useFollowProposal()
  return (
    <ServerProblems value={problemsByPath(error)}>
      <View style={[styles.frame, isWide ? styles.row : styles.column]}>
        {isWide ? <TabLinks isRail /> : null}
        <View style={styles.body}>
          <DesignHeader />
          <DesignRule />
          <View role="main" style={styles.screen}>
            <Slot />
          </View>
        </View>
        {isWide ? null : <TabLinks isRail={false} />}
      </View>
    </ServerProblems>
  )
}

const styles = StyleSheet.create({
  frame: { flex: 1 },
  row: { flexDirection: 'row' },
  column: { flexDirection: 'column' },
  body: { flex: 1, minHeight: 0, minWidth: 0 },
  screen: { flex: 1, minHeight: 0 },
})
