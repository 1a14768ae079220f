import { useRouter } from 'expo-router'
import { useEffect, useRef, useState } from 'react'
import { StyleSheet, View } from 'react-native'
import { designName, railSummary, stageSummary } from '@/components/design/summary'
import { Button } from '@/components/ui/Button'
import { Card } from '@/components/ui/Card'
import { Field } from '@/components/ui/Field'
import { Notice } from '@/components/ui/Notice'
import { Page } from '@/components/ui/Page'
import { ErrorState, Loading } from '@/components/ui/states'
import { Text } from '@/components/ui/Text'
import { space } from '@/constants/theme'
import { readDesignText, type ReadDesign } from '@/hooks/designText'
import { draftStore } from '@/hooks/draft/store'
import { fieldSpec, isEntry } from '@/hooks/draft/fields'
import { useStoredDraft } from '@/hooks/draft/useDraft'
import { useLinkedDesign } from '@/hooks/useLinkedDesign'
import type { DesignDocument } from '@/converters/document'
import { pickText } from '@/components/start/pickText'

/** Opens a design from a link, from pasted text or from a file. */
export default function OpenScreen() {
  const linked = useLinkedDesign()
  return (
    <Page title="Open a design">
      <Text variant="title" heading={1}>
        Open a design
      </Text>
      {linked.kind === 'reading' ? <Loading label="Reading the link" bars={[120]} /> : null}
      {linked.kind === 'damaged' ? <ErrorState title="This link cannot be opened" text={linked.message} /> : null}
      {linked.kind === 'read' ? <Outcome read={linked.read} /> : null}
      {linked.kind === 'none' || linked.kind === 'damaged' ? <PasteForm /> : null}
    </Page>
  )
}

function PasteForm() {
  const [text, setText] = useState('')
  const [read, setRead] = useState<ReadDesign | null>(null)
  const outcome = useRef<View>(null)
  useEffect(() => {
    if (read) outcome.current?.focus()
  }, [read])
  const choose = () => {
    pickText().then(
      (picked) => {
        setText(picked)
        setRead(readDesignText(picked))
      },
      () => setRead({ kind: 'problems', problems: [{ field: '', message: 'The file cannot be read.' }] }),
    )
  }
  return (
    <Card title="From text or a file">
      <Field
        label="Design document, JSON"
        value={text}
        lines={8}
        onChangeText={(next) => {
          setText(next)
          setRead(null)
        }}
      />
      <View style={styles.row}>
        <Button kind="primary" label="Read it" onPress={() => setRead(readDesignText(text))} />
        <Button label="Choose a file" onPress={choose} />
      </View>
      <View ref={outcome} tabIndex={-1}>
        {read ? <Outcome read={read} /> : null}
      </View>
    </Card>
  )
}

function Outcome({ read }: { readonly read: ReadDesign }) {
  if (read.kind === 'design') return <Found design={read.design} />
  return (
    <Notice kind="fault" title="This is no design that can be opened" isLive>
      {read.problems.map(({ field, message }) => (
        <Text key={field + message}>{field === '' ? message : `${nameOf(field)}: ${message}`}</Text>
      ))}
    </Notice>
  )
}

const nameOf = (field: string) => (isEntry(field) ? `${fieldSpec(field).label} (${field})` : field)

/** Shows what was found; the open design is replaced only when the person says so. */
function Found({ design }: { readonly design: DesignDocument }) {
  const router = useRouter()
  const hasDraft = useStoredDraft().kind === 'draft'
  const open = () => {
    draftStore.open(design)
    router.replace('/design/stage')
  }
  return (
    <Card title={designName(design)}>
      <Text variant="value">{railSummary(design)}</Text>
      <Text tone="quiet">{stageSummary(design)}</Text>
      {hasDraft ? (
        <Text variant="small" tone="quiet">
          It takes the place of the design that is open in this browser. Undo brings that one back.
        </Text>
      ) : null}
      <View style={styles.row}>
        <Button kind="primary" label="Open this design" onPress={open} />
      </View>
    </Card>
  )
}

const styles = StyleSheet.create({ row: { flexDirection: 'row', flexWrap: 'wrap', gap: space.sm } })
