import { useMemo } from 'react'
import { PoleZeroMap } from '@/components/plots/PoleZeroMap'
import { pointOf, upperHalf, type PlanePoint, type PlaneRoot } from '@/components/plots/sPlane'
import { Card } from '@/components/ui/Card'
import { Text } from '@/components/ui/Text'
import type { Root } from '@/converters/results'
import type { SpreadResult } from '@/converters/spread/results'

export interface PoleCloudProps {
  readonly poles: SpreadResult['closedLoopPoles']
  /** Of the nominal design, where the samples are of the design in view. */
  readonly nominal: readonly Root[]
  readonly switchingFrequency: number // Hz
}

/** Times the switching frequency; poles beyond it say nothing of how the output settles and would press the others together. */
const HIGHEST = 2

/** Where the closed-loop poles of the samples lie, one dot each, around the nominal ones. */
export function PoleCloud({ poles, nominal, switchingFrequency }: PoleCloudProps) {
  const { cloud, roots } = useMemo(() => {
    const isShown = ({ frequency }: PlanePoint) => frequency <= HIGHEST * switchingFrequency
    return {
      cloud: poles.flatMap((sample) => sample.filter(({ imaginary }) => imaginary >= 0).map(pointOf)).filter(isShown),
      roots: upperHalf(nominal)
        .filter(isShown)
        .map((root): PlaneRoot => ({ root, kind: 'pole', owner: 'loop' })),
    }
  }, [poles, nominal, switchingFrequency])
  const growing = poles.filter((sample) => sample.some(({ real }) => real > 0)).length
  const words =
    growing === 0
      ? `In none of the ${poles.length} samples drawn does a pole lie in the right half plane.`
      : `In ${growing} of the ${poles.length} samples drawn a pole lies in the right half plane: they oscillate.`
  return (
    <Card>
      <PoleZeroMap
        title="Closed-loop poles of the samples"
        fileName="steadrail-spread-poles"
        roots={roots}
        cloud={cloud}
        summary={words}
      />
      <Text variant="small" tone="quiet">
        {`${words} Averaged model; each dot is a pole of one sample${roots.length > 0 ? ', each × one of the nominal design' : ''}. Poles above twice the switching frequency are left out.`}
      </Text>
    </Card>
  )
}
