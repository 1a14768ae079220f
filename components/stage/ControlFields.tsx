import { useState } from 'react'
import { StyleSheet, View } from 'react-native'
import { CONTROL_SCHEMES } from './controlSchemes'
import { usualModulator } from './usualModulator'
import { DraftField } from '@/components/design/DraftField'
import { Fields } from '@/components/design/Fields'
import { Button } from '@/components/ui/Button'
import { Choice } from '@/components/ui/Choice'
import { Notice } from '@/components/ui/Notice'
import { Text } from '@/components/ui/Text'
import { space } from '@/constants/theme'
import { limitAmplifier, setAmplifier, setModulator, type AmplifierKind, type ModulatorKind } from '@/hooks/draft/edits'
import { useDraft } from '@/hooks/draft/useDraft'
import { useDesignAnalysis } from '@/hooks/useDesignAnalysis'

/** Control scheme and its figures. Another scheme brings figures that suit the stage as it is. */
export function ModulatorFields() {
  const { design } = useDraft()
  const { modulator } = design
  const { analysis } = useDesignAnalysis()
  const [isWaiting, setWaiting] = useState(false)
  const change = (kind: ModulatorKind) => {
    if (kind === modulator.kind) return
    setWaiting(!analysis)
    if (analysis) setModulator(usualModulator(design, analysis.operatingPoint, kind))
  }
  return (
    <>
      <Choice label="Control" value={modulator.kind} options={CONTROL_SCHEMES} onChange={change} />
      {isWaiting && !analysis ? (
        <Notice kind="fault" isLive>
          The scheme stays as it was: its figures follow from the stage’s currents, and the stage does not compute yet.
        </Notice>
      ) : null}
      {modulator.kind === 'voltage-mode' ? (
        <Fields>
          <DraftField path="modulator.rampAmplitude" />
        </Fields>
      ) : (
        <Fields>
          <DraftField path="modulator.currentSenseResistance" />
          <DraftField path="modulator.slopeCompensation" />
        </Fields>
      )}
    </>
  )
}

const AMPLIFIERS: readonly { value: AmplifierKind; label: string }[] = [
  { value: 'op-amp', label: 'Op-amp' },
  { value: 'transconductance', label: 'Transconductance' },
  { value: 'shunt-optocoupler', label: 'Shunt reference and optocoupler' },
]

/** Error amplifier and divider. The network was made for its amplifier and goes with it. */
export function AmplifierFields() {
  const { design } = useDraft()
  const { amplifier, compensator } = design
  return (
    <>
      <Choice label="Amplifier" value={amplifier.kind} options={AMPLIFIERS} onChange={setAmplifier} />
      {amplifier.kind === 'op-amp' ? (
        <Fields>
          <DraftField path="amplifier.gainBandwidth" />
          <DraftField path="amplifier.openLoopGain" />
        </Fields>
      ) : null}
      {amplifier.kind === 'transconductance' ? (
        <Fields>
          <DraftField path="amplifier.transconductance" />
          <DraftField path="amplifier.outputResistance" />
        </Fields>
      ) : null}
      {amplifier.kind === 'shunt-optocoupler' ? (
        <Fields>
          <DraftField path="amplifier.currentTransferRatio" />
          <DraftField path="amplifier.pullUpResistance" />
          <DraftField path="amplifier.ledResistance" />
          <DraftField path="amplifier.optocouplerPole" />
        </Fields>
      ) : null}
      <Fields>
        <DraftField path="sense.referenceVoltage" />
        <DraftField
          path={compensator?.parts.R1 ? 'compensator.parts.R1' : 'sense.upperResistance'}
          label="Upper divider resistor"
        />
      </Fields>
      <OutputLimits />
      {compensator ? (
        <Text variant="small" tone="quiet">
          Another amplifier needs another network: the present one is then taken out. Undo brings it back.
        </Text>
      ) : null}
    </>
  )
}

/** Between which voltages the amplifier's output can move, for transients in which it saturates. */
function OutputLimits() {
  const { amplifier } = useDraft().design
  const isLimited = Boolean(amplifier.outputLimits)
  return (
    <>
      {isLimited ? (
        <Fields>
          <DraftField path="amplifier.outputLimits.minimum" />
          <DraftField path="amplifier.outputLimits.maximum" />
        </Fields>
      ) : (
        <Text variant="small" tone="quiet">
          Its output is taken to move as far as the modulator can use, and half as far again.
        </Text>
      )}
      <View style={styles.flush}>
        <Button
          kind="quiet"
          label={isLimited ? 'Leave the output without limits of its own' : 'Give the output’s limits'}
          onPress={() => limitAmplifier(!isLimited)}
        />
      </View>
    </>
  )
}

const styles = StyleSheet.create({ flush: { alignSelf: 'flex-start', marginLeft: -space.sm } })
