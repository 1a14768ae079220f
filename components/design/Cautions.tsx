import { Notice } from '@/components/ui/Notice'
import { Text } from '@/components/ui/Text'
import type { Warning } from '@/converters/results'

/** On every page of results. */
export function Caution() {
  return (
    <Notice kind="note">
      Computed from the values entered. Confirm on the bench over line, load and temperature before release.
    </Notice>
  )
}

/** Where line or any node can exceed 60 V DC. */
function Hazard({ message }: { readonly message: string }) {
  return (
    <Notice kind="caution" title={TITLES['hazardous-voltage']}>
      <Text variant="small">{message}</Text>
      <Text variant="small">
        Mind isolation, creepage and the charge that stays in capacitors. Use injection equipment that is rated and
        isolated for the node. Work by qualified people only, under the local electrical safety code.
      </Text>
    </Notice>
  )
}

const TITLES: Readonly<Record<Warning['code'], string>> = {
  'subharmonic-oscillation': 'Subharmonic oscillation',
  'unstable-orbit': 'The stage does not repeat from period to period',
  'unstable-switching': 'The switched loop does not hold still',
  'unstable-loop': 'The closed loop is unstable',
  'models-part': 'The two models part',
  'conduction-not-modelled': 'Outside what is computed',
  'duty-near-limit': 'Duty near its limit',
  'crossover-above-right-half-plane-zero': 'Crossover too near the right-half-plane zero',
  'crossover-near-switching': 'Crossover near the switching frequency',
  'conditionally-stable': 'Stable only while the gain stays up',
  'several-crossovers': 'Several crossovers',
  'ripple-large': 'Large ripple',
  'input-filter': 'Input filter too near the converter',
  'optocoupler-bias': 'Too little current for the optocoupler',
  'hazardous-voltage': 'Hazardous voltage',
}

const FAULTS: readonly Warning['code'][] = [
  'subharmonic-oscillation',
  'unstable-orbit',
  'unstable-loop',
  'unstable-switching',
]

/** What the computation itself points at. */
export function Warnings({ warnings }: { readonly warnings: readonly Warning[] }) {
  return warnings.map((warning, index) =>
    warning.code === 'hazardous-voltage' ? (
      <Hazard key={index} message={warning.message} />
    ) : (
      <Notice
        key={index}
        kind={FAULTS.includes(warning.code) ? 'fault' : 'caution'}
        title={TITLES[warning.code]}
        isLive
      >
        {warning.message}
      </Notice>
    ),
  )
}
