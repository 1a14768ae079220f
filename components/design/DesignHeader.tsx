import { useState } from 'react'
import { StyleSheet, View } from 'react-native'
import { designName, railSummary, stageSummary } from './summary'
import { DesignMenu } from './DesignMenu'
import { Button, LinkButton } from '@/components/ui/Button'
import { Text } from '@/components/ui/Text'
import { Wordmark } from '@/components/ui/Wordmark'
import { space } from '@/constants/theme'
import { draftStore } from '@/hooks/draft/store'
import { useCanUndo, useDraft } from '@/hooks/draft/useDraft'
import { useCopyLink } from '@/hooks/useCopyLink'
import { useIsUpdating } from '@/hooks/useIsUpdating'
import { useLayout } from '@/hooks/useLayout'

/** Name and gist of the open design, and what can be done with it as a whole. */
export function DesignHeader() {
  const { design } = useDraft()
  const { isWide } = useLayout()
  const isSlow = useIsUpdating()
  const canUndo = useCanUndo()
  const [isMenuOpen, setMenuOpen] = useState(false)
  const { copy, outcome } = useCopyLink()
  return (
    <View role="banner" style={styles.head}>
      <Wordmark isShort />
      <View style={styles.names}>
        <Text variant="strong" heading={1} lines={1}>
          {designName(design)}
        </Text>
        <Text variant="small" tone="quiet" lines={1}>
          {[railSummary(design), ...(isWide ? [stageSummary(design)] : []), ...(isSlow ? ['updating'] : [])].join(
            ' · ',
          )}
        </Text>
      </View>
      {canUndo ? <Button kind="quiet" icon="undo" iconOnly={!isWide} label="Undo" onPress={draftStore.undo} /> : null}
      {isWide ? (
        <>
          <Button icon="link" label={outcome === 'copied' ? 'Link copied' : 'Copy link'} onPress={copy} />
          <LinkButton label="New design" href="/start" />
        </>
      ) : null}
      <Button kind="quiet" icon="more" iconOnly label="Design as a whole" onPress={() => setMenuOpen(true)} />
      <DesignMenu isOpen={isMenuOpen} onClose={() => setMenuOpen(false)} />
    </View>
  )
}

const styles = StyleSheet.create({
  head: {
    flexDirection: 'row',
    alignItems: 'center',
    gap: space.sm,
    paddingHorizontal: space.md,
    minHeight: 56,
    zIndex: 1,
  },
  names: { flex: 1, minWidth: 0 },
})
