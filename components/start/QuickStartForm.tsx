import { useState } from 'react'
import { StyleSheet, View } from 'react-native'
import {
  BEGINNINGS,
  QUICK_FIELDS,
  readQuickStart,
  type QuickChoices,
  type QuickPath,
  type QuickTexts,
  type QuickTopology,
} from './quickStart'
import { Fields } from '@/components/design/Fields'
import { Button } from '@/components/ui/Button'
import { Choice } from '@/components/ui/Choice'
import { Field } from '@/components/ui/Field'
import { Notice } from '@/components/ui/Notice'
import { Text } from '@/components/ui/Text'
import { space } from '@/constants/theme'
import { problemsByPath } from '@/hooks/api'
import { useStageProposalMutation } from '@/hooks/queries/stageProposals'
import type { StageProposal } from '@/server/contract/stageProposals'

export interface QuickStartFormProps {
  readonly topology: QuickTopology
  readonly controlScheme: QuickChoices['controlScheme']
  readonly onProposal: (proposal: StageProposal | null) => void
}

/** A few lines of figures in, a whole power stage out. */
export function QuickStartForm({ topology, controlScheme, onProposal }: QuickStartFormProps) {
  const [rectifier, setRectifier] = useState<QuickChoices['rectifier']>('synchronous')
  const [typed, setTyped] = useState<QuickTexts | null>(null)
  // Figures that nobody touched follow the topology; typed ones stay.
  const texts = typed ?? BEGINNINGS[topology]
  const [problems, setProblems] = useState<Readonly<Partial<Record<QuickPath, string>>>>({})
  const proposal = useStageProposalMutation()
  const refused: Readonly<Record<string, string>> = problemsByPath(proposal.error)
  const otherRefusals = Object.entries(refused).filter(([path]) => !QUICK_FIELDS.some((field) => field.path === path))

  const clear = () => {
    setProblems({})
    proposal.reset()
    onProposal(null)
  }
  const submit = () => {
    const read = readQuickStart(texts, { topology, controlScheme, rectifier })
    if (read.kind === 'problems') return setProblems(read.problems)
    setProblems({})
    proposal.mutate(read.requirements, { onSuccess: onProposal })
  }
  return (
    <View style={styles.form}>
      <Choice
        label="Rectifier"
        value={rectifier}
        options={[
          { value: 'synchronous', label: 'Synchronous' },
          { value: 'diode', label: 'Diode' },
        ]}
        onChange={(kind) => {
          setRectifier(kind)
          clear()
        }}
      />
      <Fields>
        {QUICK_FIELDS.map(({ path, label }) => (
          <Field
            key={path}
            label={label}
            value={texts[path]}
            error={problems[path] ?? refused[path]}
            onChangeText={(text) => {
              setTyped({ ...texts, [path]: text })
              clear()
            }}
            onSubmit={submit}
          />
        ))}
      </Fields>
      {proposal.isError && (Object.keys(refused).length === 0 || otherRefusals.length > 0) ? (
        <Notice kind="fault" title="No stage was proposed" isLive>
          <Text>{otherRefusals[0]?.[1] ?? proposal.error.message}</Text>
        </Notice>
      ) : null}
      <View style={styles.left}>
        <Button
          kind="primary"
          label={proposal.isPending ? 'Working it out' : 'Propose a power stage'}
          isDisabled={proposal.isPending}
          onPress={submit}
        />
      </View>
    </View>
  )
}

const styles = StyleSheet.create({
  form: { gap: space.lg },
  left: { alignSelf: 'flex-start' },
})
