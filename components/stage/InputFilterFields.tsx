import { StyleSheet, View } from 'react-native'
import { DraftField } from '@/components/design/DraftField'
import { Fields } from '@/components/design/Fields'
import { figure } from '@/components/format'
import { Button } from '@/components/ui/Button'
import { VerdictWord } from '@/components/ui/Figure'
import { Text } from '@/components/ui/Text'
import { space } from '@/constants/theme'
import type { InputFilterCheck } from '@/converters/results'
import { dampInputFilter, fitInputFilter } from '@/hooks/draft/edits'
import { useDraft } from '@/hooks/draft/useDraft'
import { useDesignAnalysis } from '@/hooks/useDesignAnalysis'

/** The filter ahead of the stage, with its check; or the way to fit one. */
export function InputFilterFields() {
  const { inputFilter } = useDraft().design
  const { analysis } = useDesignAnalysis()
  if (!inputFilter) {
    return (
      <>
        <Text variant="small" tone="quiet">
          None is fitted. With one, loop and margins are computed with the filter in the circuit.
        </Text>
        <View style={styles.left}>
          <Button icon="plus" label="Add an input filter" onPress={() => fitInputFilter(true)} />
        </View>
      </>
    )
  }
  return (
    <>
      <Fields>
        <DraftField path="inputFilter.inductance" />
        <DraftField path="inputFilter.resistance" />
        <DraftField path="inputFilter.capacitance" />
        <DraftField path="inputFilter.esr" />
        <DraftField path="inputFilter.dampingCapacitance" />
        <DraftField path="inputFilter.dampingResistance" />
      </Fields>
      {analysis?.inputFilter ? <FilterCheck check={analysis.inputFilter} /> : null}
      <View style={styles.flush}>
        <Button kind="quiet" label="Remove the input filter" onPress={() => fitInputFilter(false)} />
      </View>
    </>
  )
}

/** A factor of two between the impedances: what the suggestion keeps, dB. */
const WANTED = 20 * Math.log10(2)

/** Output impedance of the filter against the input impedance of the converter (Middlebrook 1976). */
function FilterCheck({ check }: { readonly check: InputFilterCheck }) {
  const { margin, marginFrequency, suggestion } = check
  const verdict = margin >= WANTED ? 'holds' : margin > 0 ? 'tight' : 'short'
  return (
    <View role="group" aria-label="Check of the input filter" style={styles.check}>
      <View style={styles.line}>
        <Text variant="small">
          {margin >= 0
            ? `The filter stays ${figure(margin, 'dB')} below the converter’s input impedance, closest at ${figure(marginFrequency, 'Hz')}.`
            : `The filter rises ${figure(-margin, 'dB')} above the converter’s input impedance at ${figure(marginFrequency, 'Hz')}.`}
        </Text>
        <VerdictWord verdict={verdict} />
      </View>
      {suggestion ? (
        <>
          <Text variant="small">
            {`Damping that keeps them a factor of two apart: ${figure(suggestion.dampingCapacitance, 'F')} in series with ${figure(suggestion.dampingResistance, 'Ω')}; the filter then peaks at ${figure(suggestion.peakImpedance, 'Ω')} (${suggestion.source}).`}
          </Text>
          <View style={styles.left}>
            <Button
              label="Apply"
              spoken="Apply the suggested damping"
              onPress={() =>
                dampInputFilter(
                  Number(suggestion.dampingCapacitance.toPrecision(2)),
                  Number(suggestion.dampingResistance.toPrecision(2)),
                )
              }
            />
          </View>
        </>
      ) : null}
    </View>
  )
}

const styles = StyleSheet.create({
  check: { gap: space.sm },
  line: { flexDirection: 'row', flexWrap: 'wrap', columnGap: space.sm, alignItems: 'baseline' },
  left: { alignSelf: 'flex-start' },
  flush: { alignSelf: 'flex-start', marginLeft: -space.sm },
})
