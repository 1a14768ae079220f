import { useRouter } from 'expo-router'
import { StyleSheet, View } from 'react-native'
import { startingDesign, type ControlScheme, type WorkedTopology } from './startingDesigns'
import { railSummary, TOPOLOGY_NAMES } from '@/components/design/summary'
import { Button } from '@/components/ui/Button'
import { Text } from '@/components/ui/Text'
import { space } from '@/constants/theme'
import { DesignDocument } from '@/converters/document'
import { draftStore } from '@/hooks/draft/store'
import { formatEntry } from '@/hooks/draft/entries'

export interface WorkedStartProps {
  readonly topology: WorkedTopology
  readonly controlScheme: ControlScheme
}

/** A whole stage to begin with, where nothing is proposed from the rail's figures. */
export function WorkedStart({ topology, controlScheme }: WorkedStartProps) {
  const router = useRouter()
  const design = DesignDocument.parse(startingDesign(topology, controlScheme))
  const name = TOPOLOGY_NAMES[topology]
  return (
    <View style={styles.form}>
      <Text>
        {`The parts of a ${name === 'SEPIC' ? name : name.replace(/^[A-Z]/, (letter) => letter.toLowerCase())} are not proposed from your figures. It begins with a worked stage of invented values that computes as it stands; set your own line, load and parts one by one, and every figure follows.`}
      </Text>
      <Text variant="value">{`${railSummary(design)}, ${formatEntry(design.switchingFrequency, 'Hz')}`}</Text>
      <View style={styles.left}>
        <Button
          kind="primary"
          label="Begin with this stage"
          onPress={() => {
            draftStore.open(design)
            router.push('/design/stage')
          }}
        />
      </View>
    </View>
  )
}

const styles = StyleSheet.create({ form: { gap: space.md }, left: { alignSelf: 'flex-start' } })
