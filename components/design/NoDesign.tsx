import { StyleSheet, View } from 'react-native'
import { saveText } from '@/components/plots/save'
import { Button } from '@/components/ui/Button'
import { Notice } from '@/components/ui/Notice'
import { Page } from '@/components/ui/Page'
import { EmptyState } from '@/components/ui/states'
import { Text } from '@/components/ui/Text'
import type { StoredDraft } from '@/hooks/draft/schema'

/** No design is open in this browser, or what is kept here cannot be read. */
export function NoDesign({ stored }: { readonly stored: Exclude<StoredDraft, { kind: 'draft' }> }) {
  return (
    <Page title="No design open">
      {stored.kind === 'unreadable' ? (
        <Notice kind="caution" title="The design kept in this browser cannot be read">
          <Text>It may come from another version of the program. It stays as it is until you begin another one.</Text>
          <View style={styles.left}>
            <Button
              label="Download it as it is"
              onPress={() => saveText('steadrail-draft.json', 'application/json', stored.text)}
            />
          </View>
        </Notice>
      ) : null}
      <EmptyState
        title="No design is open in this browser"
        text="Begin with a power stage of your own, or open a worked sample."
        action="Start a design"
        href="/start"
      />
    </Page>
  )
}

const styles = StyleSheet.create({ left: { alignSelf: 'flex-start' } })
