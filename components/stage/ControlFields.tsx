import { DraftField } from '@/components/design/DraftField'
import { Fields } from '@/components/design/Fields'
import { Choice } from '@/components/ui/Choice'
import { Notice } from '@/components/ui/Notice'
import { Text } from '@/components/ui/Text'
import { setAmplifier, setModulator, type AmplifierKind, type ModulatorKind } from '@/hooks/draft/edits'
import { useDraft } from '@/hooks/draft/useDraft'
import { useStageProposalMutation } from '@/hooks/queries/stageProposals'

const MODULATORS: readonly { value: ModulatorKind; label: string }[] = [
  { value: 'voltage-mode', label: 'Voltage mode' },
  { value: 'peak-current-mode', label: 'Peak current mode' },
]

/** Control scheme and its figures. Another scheme brings figures that suit the stage, from the quick start's rules. */
export function ModulatorFields() {
  const { design } = useDraft()
  const { modulator } = design
  const proposal = useStageProposalMutation()
  const change = (kind: ModulatorKind) => {
    if (kind === modulator.kind) return
    const { topology, line, output, switchingFrequency, rectifier } = design
    proposal.mutate(
      { topology, line, output, switchingFrequency, rectifier: rectifier.kind, controlScheme: kind },
      { onSuccess: (answer) => setModulator(answer.design.modulator) },
    )
  }
  return (
    <>
      <Choice label="Control" value={modulator.kind} options={MODULATORS} onChange={change} />
      {proposal.isError ? (
        <Notice kind="fault" isLive>
          {`The scheme stays as it was. ${proposal.error.message}`}
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
]

/** Error amplifier and divider. The network was made for its amplifier and goes with it. */
export function AmplifierFields() {
  const { design } = useDraft()
  const { amplifier, compensator } = design
  return (
    <>
      {amplifier.kind === 'shunt-optocoupler' ? (
        <Text>A shunt reference with an optocoupler cannot be computed yet.</Text>
      ) : (
        <Choice label="Amplifier" value={amplifier.kind} options={AMPLIFIERS} onChange={setAmplifier} />
      )}
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
      <Fields>
        <DraftField path="sense.referenceVoltage" />
        <DraftField
          path={compensator?.parts.R1 ? 'compensator.parts.R1' : 'sense.upperResistance'}
          label="Upper divider resistor"
        />
      </Fields>
      {compensator ? (
        <Text variant="small" tone="quiet">
          Another amplifier needs another network: the present one is then taken out. Undo brings it back.
        </Text>
      ) : null}
    </>
  )
}
