import { useState } from 'react'
import { figure } from '@/components/format'
import { BodePlot } from '@/components/plots/BodePlot'
import { interpolate, type BodeCurve } from '@/components/plots/bode'
import { Choice } from '@/components/ui/Choice'
import { Text } from '@/components/ui/Text'
import type { ModelPair, ResponseCurve } from '@/converters/results'
import type { Analysis } from '@/server/contract/analyses'

type ResponseName = keyof Analysis['responses']

const RESPONSES: Readonly<Record<ResponseName, { title: string; gain: string; isImpedance?: boolean; note: string }>> =
  {
    controlToOutput: {
      title: 'Control to output',
      gain: 'Gain, dB',
      note: 'What the loop has to work with: from the comparator’s control voltage to the output.',
    },
    lineToOutput: {
      title: 'Line to output',
      gain: 'Gain, dB',
      note: 'How much of a wobble of the line reaches the output.',
    },
    outputImpedance: {
      title: 'Output impedance',
      gain: 'Impedance',
      isImpedance: true,
      note: 'What the output gives way by when the load current moves.',
    },
  }

/** One response of the plant at a time: switched solid, averaged dashed, and with the loop closed where there is one. */
export function Responses({ analysis }: { readonly analysis: Analysis }) {
  const [name, setName] = useState<ResponseName>('controlToOutput')
  const { title, gain, isImpedance, note } = RESPONSES[name]
  const closed = name === 'controlToOutput' ? undefined : analysis.loop?.closedLoop[name].switched
  const curves = curvesOf(analysis.responses[name], closed)
  const at = Math.sqrt((analysis.frequencies[0] ?? 10) * (analysis.frequencies.at(-1) ?? 1e6))
  const reading = curves[0] && interpolate(curves[0], analysis.frequencies, at)
  return (
    <>
      <Choice
        label="Response"
        isLabelHidden
        value={name}
        options={Object.entries(RESPONSES).map(([value, { title: label }]) => ({
          value: value as ResponseName,
          label,
        }))}
        onChange={setName}
      />
      <Text variant="small" tone="quiet">
        {note}
      </Text>
      <BodePlot
        title={title}
        fileName={`steadrail-${title.toLowerCase().replaceAll(' ', '-')}`}
        summary={
          reading
            ? `${title} from ${figure(analysis.frequencies[0], 'Hz')} to ${figure(analysis.frequencies.at(-1), 'Hz')}. At ${figure(at, 'Hz')} ${
                isImpedance ? figure(10 ** (reading.gainDb / 20), 'Ω') : figure(reading.gainDb, 'dB')
              }, ${figure(reading.phaseDeg, '°')}.`
            : title
        }
        frequencies={analysis.frequencies}
        curves={curves}
        gainTitle={gain}
        gainScale={isImpedance ? 'Ω' : 'dB'}
      />
    </>
  )
}

function curvesOf(pair: ModelPair<ResponseCurve>, closed: ResponseCurve | undefined): BodeCurve[] {
  const curves: BodeCurve[] = [{ key: 'switched', label: closed ? 'open loop' : 'switched', response: pair.switched }]
  if (pair.averaged.length > 0) {
    curves.push({
      key: 'averaged',
      label: closed ? 'open, averaged' : 'averaged',
      response: pair.averaged,
      isDashed: true,
    })
  }
  if (closed && closed.length > 0) curves.push({ key: 'closed', label: 'closed loop', response: closed, isQuiet: true })
  return curves
}
