/** The entries of a power stage in groups: the same ones in the columns of the Stage screen and in a part's sheet. */
import { View, StyleSheet } from 'react-native'
import { DraftField } from '@/components/design/DraftField'
import { Fields } from '@/components/design/Fields'
import { Button } from '@/components/ui/Button'
import { Choice } from '@/components/ui/Choice'
import { Text } from '@/components/ui/Text'
import { space } from '@/constants/theme'
import { addBank, MOST_BANKS, removeBank, setLoad, setRectifier } from '@/hooks/draft/edits'
import { useDraft } from '@/hooks/draft/useDraft'

export function LineFields() {
  return (
    <Fields>
      <DraftField path="line.minimum" />
      <DraftField path="line.nominal" />
      <DraftField path="line.maximum" />
    </Fields>
  )
}

export function LoadFields() {
  const { design } = useDraft()
  return (
    <>
      <Fields>
        <DraftField path="output.voltage" />
        <DraftField path="output.currentMaximum" />
        <DraftField path="output.currentMinimum" />
      </Fields>
      <Choice
        label="Kind of load"
        value={design.load}
        options={[
          { value: 'resistive', label: 'Resistive' },
          { value: 'constant-current', label: 'Constant current' },
          { value: 'constant-power', label: 'Constant power' },
        ]}
        onChange={setLoad}
      />
    </>
  )
}

/** The first or only inductor; of a flyback, what its transformer stores energy in. */
export function InductorFields() {
  const { topology } = useDraft().design
  return (
    <Fields>
      {topology === 'flyback' ? (
        <DraftField path="inductor.inductance" label="Magnetising inductance" hint="Seen from the primary" />
      ) : (
        <DraftField path="inductor.inductance" />
      )}
      <DraftField path="inductor.resistance" />
    </Fields>
  )
}

export function SecondInductorFields() {
  return (
    <Fields>
      <DraftField path="secondInductor.inductance" />
      <DraftField path="secondInductor.resistance" />
    </Fields>
  )
}

export function CouplingCapacitorFields() {
  return (
    <Fields>
      <DraftField path="couplingCapacitor.capacitance" />
      <DraftField path="couplingCapacitor.esr" />
    </Fields>
  )
}

export function TransformerFields() {
  return (
    <Fields>
      <DraftField path="transformer.turnsRatio" />
    </Fields>
  )
}

export function SwitchFields() {
  return (
    <Fields>
      <DraftField path="switchingFrequency" />
      <DraftField path="switch.onResistance" />
      <DraftField path="dutyLimit" />
    </Fields>
  )
}

export function RectifierFields() {
  const { design } = useDraft()
  return (
    <>
      <Choice
        label="Rectifier"
        value={design.rectifier.kind}
        options={[
          { value: 'synchronous', label: 'Synchronous' },
          { value: 'diode', label: 'Diode' },
        ]}
        onChange={setRectifier}
      />
      <Fields>
        <DraftField path="rectifier.onResistance" />
        <DraftField path="rectifier.forwardVoltage" />
      </Fields>
    </>
  )
}

export function BankFields({ index }: { readonly index: number }) {
  return (
    <Fields>
      <DraftField path={`outputCapacitors.${index}.count`} />
      <DraftField path={`outputCapacitors.${index}.capacitance`} />
      <DraftField path={`outputCapacitors.${index}.biasDerating`} />
      <DraftField path={`outputCapacitors.${index}.esr`} />
    </Fields>
  )
}

/** All banks, with the way to add one and to take one away. */
export function BanksFields() {
  const { design } = useDraft()
  const banks = design.outputCapacitors
  return (
    <View style={styles.banks}>
      {banks.map((_, index) => (
        <View key={index} role="group" aria-label={`Bank ${index + 1}`} style={styles.bank}>
          {banks.length > 1 ? (
            <View style={styles.head}>
              <Text variant="strong">{`Bank ${index + 1}`}</Text>
              <Button
                kind="quiet"
                label="Remove"
                spoken={`Remove bank ${index + 1}`}
                onPress={() => removeBank(index)}
              />
            </View>
          ) : null}
          <BankFields index={index} />
        </View>
      ))}
      {banks.length < MOST_BANKS ? (
        <View style={styles.left}>
          <Button icon="plus" label="Add a bank" onPress={addBank} />
        </View>
      ) : null}
    </View>
  )
}

const styles = StyleSheet.create({
  banks: { gap: space.lg },
  bank: { gap: space.xs },
  head: { flexDirection: 'row', justifyContent: 'space-between', alignItems: 'center' },
  left: { alignSelf: 'flex-start' },
})
