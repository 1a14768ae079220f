import { useRouter } from 'expo-router'
import { StyleSheet, View } from 'react-native'
import { designName } from './summary'
import { saveText } from '@/components/plots/save'
import { Button } from '@/components/ui/Button'
import { Field } from '@/components/ui/Field'
import { Sheet } from '@/components/ui/Sheet'
import { Text } from '@/components/ui/Text'
import { space } from '@/constants/theme'
import { writeDesignText } from '@/hooks/designText'
import { draftStore } from '@/hooks/draft/store'
import { useDraft } from '@/hooks/draft/useDraft'
import { useCopyJson, useCopyLink } from '@/hooks/useCopyLink'

export interface DesignMenuProps {
  readonly isOpen: boolean
  readonly onClose: () => void
}

/** What can be done with the design as a whole: name it, take it elsewhere, begin another. */
export function DesignMenu({ isOpen, onClose }: DesignMenuProps) {
  return (
    <Sheet title="This design" isOpen={isOpen} onClose={onClose}>
      {isOpen ? <Inner onClose={onClose} /> : null}
    </Sheet>
  )
}

const LONGEST_NAME = 80

function Inner({ onClose }: Pick<DesignMenuProps, 'onClose'>) {
  const router = useRouter()
  const { design } = useDraft()
  const link = useCopyLink()
  const json = useCopyJson()
  const go = (href: '/start' | '/open') => {
    onClose()
    router.push(href)
  }
  const failed = link.outcome === 'failed' || json.outcome === 'failed'
  return (
    <View style={styles.list}>
      <Field
        label="Name"
        isText
        value={design.name ?? ''}
        placeholder={designName(design)}
        hint={`At most ${LONGEST_NAME} characters`}
        onChangeText={(name) => draftStore.rename(name.slice(0, LONGEST_NAME))}
      />
      <Text variant="small" tone="quiet">
        The link holds the whole design, after the # sign. It opens in any browser, and no server keeps it.
      </Text>
      <View style={styles.row}>
        <Button icon="link" label={link.outcome === 'copied' ? 'Link copied' : 'Copy link'} onPress={link.copy} />
        <Button label={json.outcome === 'copied' ? 'JSON copied' : 'Copy JSON'} onPress={json.copy} />
        <Button
          icon="download"
          label="Download JSON"
          onPress={() => saveText('steadrail-design.json', 'application/json', writeDesignText(design))}
        />
      </View>
      {failed ? (
        <Text tone="short" live="polite">
          The browser did not allow copying. Download the JSON instead.
        </Text>
      ) : null}
      <View style={styles.row}>
        <Button label="Open JSON" onPress={() => go('/open')} />
        <Button icon="plus" label="New design" onPress={() => go('/start')} />
      </View>
      <Text variant="small" tone="quiet">
        The design is kept in this browser only. Copy the link to keep it elsewhere.
      </Text>
    </View>
  )
}

const styles = StyleSheet.create({
  list: { gap: space.lg },
  row: { flexDirection: 'row', flexWrap: 'wrap', gap: space.sm },
})
