import { StyleSheet, View } from 'react-native'
import { RunProgress } from './RunProgress'
import type { StatisticalRun } from './useStatisticalRun'
import { Fields } from '@/components/design/Fields'
import { Button } from '@/components/ui/Button'
import { Card } from '@/components/ui/Card'
import { Choice } from '@/components/ui/Choice'
import { Field } from '@/components/ui/Field'
import { Text } from '@/components/ui/Text'
import { space } from '@/constants/theme'
import { spreadStore, useKeptSpread } from '@/hooks/spread/keptSpread'

/** What is drawn, how often and from what; start, progress and cancel. */
export function RunCard({ statistics }: { readonly statistics: StatisticalRun }) {
  const { form } = useKeptSpread()
  const { run, isBusy, problems, start } = statistics
  const { samples, seed, capacitanceLeft, esrTimes } = problems
  return (
    <Card title="Statistical run">
      <Text variant="small" tone="quiet">
        Line and load anywhere in their ranges, every part anywhere in its tolerance, drawn as a Latin hypercube.
      </Text>
      <Fields>
        <Field
          label="Samples"
          value={form.samples}
          keyboard="numeric"
          {...(samples ? { error: samples } : { hint: '100 to 10,000' })}
          onChangeText={(text) => spreadStore.enter({ samples: text })}
        />
        <Field
          label="Seed"
          value={form.seed}
          keyboard="numeric"
          {...(seed ? { error: seed } : { hint: 'the same seed, the same samples' })}
          onChangeText={(text) => spreadStore.enter({ seed: text })}
        />
        <Field
          label="Output capacitance left"
          value={form.capacitanceLeft}
          {...(capacitanceLeft ? { error: capacitanceLeft } : { hint: 'by temperature and age, before the tolerance' })}
          onChangeText={(text) => spreadStore.enter({ capacitanceLeft: text })}
        />
        <Field
          label="ESR times"
          value={form.esrTimes}
          {...(esrTimes ? { error: esrTimes } : { hint: 'likewise, for example 3 in the cold' })}
          onChangeText={(text) => spreadStore.enter({ esrTimes: text })}
        />
      </Fields>
      <Choice
        label="Distribution of the tolerances"
        value={form.distribution}
        options={[
          { value: 'normal', label: 'Normal, 3σ' },
          { value: 'uniform', label: 'Uniform' },
        ]}
        onChange={(distribution) => spreadStore.enter({ distribution })}
      />
      <Choice
        label="Model"
        value={form.model}
        options={[
          { value: 'averaged', label: 'Averaged' },
          { value: 'switched', label: 'Switched, slower' },
        ]}
        onChange={(model) => spreadStore.enter({ model })}
      />
      {isBusy ? (
        <RunProgress statistics={statistics} />
      ) : (
        <View style={styles.left}>
          <Button
            kind="primary"
            label={run ? 'Run again' : 'Start the run'}
            isDisabled={!statistics.canStart}
            onPress={start}
          />
        </View>
      )}
    </Card>
  )
}

const styles = StyleSheet.create({ left: { alignSelf: 'flex-start', gap: space.sm } })
