import { useState } from 'react'
import { StyleSheet, View } from 'react-native'
import {
  BEGINNINGS,
  QUICK_FIELDS,
  readQuickStart,
  type QuickChoices,
  type QuickPath,
  type QuickTexts,
} from './quickStart'
import { TopologyCards } from './TopologyCards'
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

/** Four lines of figures in, a whole power stage out. */
export function QuickStartForm({ onProposal }: { readonly onProposal: (proposal: StageProposal | null) => void }) {
  const [choices, setChoices] = useState<QuickChoices>({
    topology: 'buck',
    controlScheme: 'voltage-mode',
    rectifier: 'synchronous',
  })
  const [texts, setTexts] = useState<QuickTexts>(BEGINNINGS.buck)
  const [problems, setProblems] = useState<Readonly<Partial<Record<QuickPath, string>>>>({})
  const proposal = useStageProposalMutation()
  const refused: Readonly<Record<string, string>> = problemsByPath(proposal.error)
  const otherRefusals = Object.entries(refused).filter(([path]) => !QUICK_FIELDS.some((field) => field.path === path))

  const clear = () => {
    setProblems({})
    proposal.reset()
    onProposal(null)
  }
  const choose = (change: Partial<QuickChoices>) => {
    // Figures that nobody touched follow the topology; typed ones stay.
    const untouched = QUICK_FIELDS.every(({ path }) => texts[path] === BEGINNINGS[choices.topology][path])
    if (change.topology && untouched) setTexts(BEGINNINGS[change.topology])
    setChoices({ ...choices, ...change })
    clear()
  }
  const submit = () => {
    const read = readQuickStart(texts, choices)
    if (read.kind === 'problems') return setProblems(read.problems)
    setProblems({})
    proposal.mutate(read.requirements, { onSuccess: onProposal })
  }
  return (
    <View style={styles.form}>
      <TopologyCards value={choices.topology} onChange={(topology) => choose({ topology })} />
      <View style={styles.choices}>
        <Choice
          label="Control"
          value={choices.controlScheme}
          options={[
            { value: 'voltage-mode', label: 'Voltage mode' },
            { value: 'peak-current-mode', label: 'Peak current mode' },
          ]}
          onChange={(controlScheme) => choose({ controlScheme })}
        />
        <Choice
          label="Rectifier"
          value={choices.rectifier}
          options={[
            { value: 'synchronous', label: 'Synchronous' },
            { value: 'diode', label: 'Diode' },
          ]}
          onChange={(rectifier) => choose({ rectifier })}
        />
      </View>
      <Fields>
        {QUICK_FIELDS.map(({ path, label }) => (
          <Field
            key={path}
            label={label}
            value={texts[path]}
            error={problems[path] ?? refused[path]}
            onChangeText={(text) => {
              setTexts({ ...texts, [path]: text })
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
  choices: { flexDirection: 'row', flexWrap: 'wrap', columnGap: space.xl, rowGap: space.md },
  left: { alignSelf: 'flex-start' },
})
