import { memo, useMemo } from 'react'
import type { Limits } from './Limits'
import { figure, ratio } from '@/components/format'
import { LaterWaveform } from '@/components/plots/later'
import { traceOf } from '@/components/plots/waveform'
import { Card } from '@/components/ui/Card'
import { Text } from '@/components/ui/Text'
import type { DesignDocument } from '@/converters/document'
import type { Simulation } from '@/converters/results'

export interface WaveformsProps {
  readonly simulation: Simulation
  readonly name: string
  readonly limits: Limits
  readonly design: DesignDocument
}

/** Output, duty and inductor peak over time. */
export const Waveforms = memo(function Waveforms({ simulation, name, limits, design }: WaveformsProps) {
  const { time, meanOutput, lowestOutput, highestOutput, duty, peakCurrent, readings } = simulation
  const prediction = useMemo(() => predicted(simulation), [simulation])
  const wanted = design.output.voltage
  const { value } = limits.deviation
  const file = `steadrail-${name.toLowerCase().replace(' ', '-')}`
  return (
    <Card title={name}>
      <LaterWaveform
        title="Output"
        fileName={`${file}-output`}
        summary={`Output: peak deviation ${figure(readings.peakDeviation, 'V')} after ${figure(readings.peakTime, 's')}.`}
        quantity="Output"
        unit="V"
        trace={{ time, low: lowestOutput, middle: meanOutput, high: highestOutput }}
        prediction={prediction}
        limits={value === null ? [] : [wanted - value, wanted + value]}
      />
      <Text variant="small" tone="quiet">
        {`Line: mean of each period. Pale band: lowest to highest within it.${prediction ? ' Dashed: the averaged model.' : ''}${value === null ? '' : ' Dotted: the allowed deviation.'}`}
      </Text>
      <LaterWaveform
        title="Duty cycle"
        fileName={`${file}-duty`}
        summary={`Duty cycle: from ${ratio(Math.min(...duty))} to ${ratio(Math.max(...duty))}.`}
        quantity="Duty cycle"
        unit=""
        trace={traceOf(time, duty)}
        height={200}
      />
      <LaterWaveform
        title="Inductor peak"
        fileName={`${file}-current`}
        summary={`Peak of the inductor current: up to ${figure(Math.max(...peakCurrent), 'A')}.`}
        quantity="Peak current"
        unit="A"
        trace={traceOf(time, peakCurrent)}
        height={200}
      />
    </Card>
  )
})

/** The averaged answer on the axes of the transient: about the mean at which the output stood before. */
function predicted({ prediction, disturbedAt, time, meanOutput }: Simulation) {
  if (!prediction) return null
  const before = time.findLastIndex((moment) => moment < disturbedAt)
  const rest = meanOutput[Math.max(0, before)] ?? 0
  return {
    time: prediction.time.map((moment) => moment + disturbedAt),
    values: prediction.outputDeviation.map((deviation) => rest + deviation),
  }
}
