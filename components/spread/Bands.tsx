import { useMemo } from 'react'
import { BodePlot } from '@/components/plots/BodePlot'
import { Card } from '@/components/ui/Card'
import { Text } from '@/components/ui/Text'
import type { ResponseCurve } from '@/converters/results'
import type { LoopBands } from '@/converters/spread/results'

/** The loop gain of the samples: its median, and the band that holds nine of ten at each frequency. */
export function Bands({ bands }: { readonly bands: LoopBands }) {
  const { frequencies, gainDb, phaseDeg } = bands
  const { low, middle, high } = useMemo(() => {
    const curve = (which: 'low' | 'middle' | 'high'): ResponseCurve =>
      frequencies.map((_, index) => ({
        gainDb: gainDb[which][index] ?? Number.NaN,
        phaseDeg: phaseDeg[which][index] ?? Number.NaN,
      }))
    return { low: curve('low'), middle: curve('middle'), high: curve('high') }
  }, [frequencies, gainDb, phaseDeg])
  return (
    <Card>
      <BodePlot
        title="Loop gain over the samples"
        fileName="steadrail-spread-loop"
        summary={`Median loop gain of ${bands.samples} samples with the band from 5 to 95 %.`}
        frequencies={frequencies}
        curves={[{ key: 'median', label: 'median', response: middle }]}
        band={{ low, high }}
        gainTitle="Gain, dB"
      />
      <Text variant="small" tone="quiet">
        {`At each frequency nine of ten of ${bands.samples} samples lie in the pale band, 5 to 95 %.`}
      </Text>
    </Card>
  )
}
