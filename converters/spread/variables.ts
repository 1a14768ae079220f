/** Which quantities of a design vary, by how much, and where each is written. */
import { lowerRatio } from '../compensators/networks'
import type { DesignDocument } from '../document'
import type { SpreadGroup } from './options'
import type { VariedQuantity } from './results'

/** A copy of a design that values can be written into. */
export interface Draft {
  readonly design: DesignDocument
  lineVoltage: number
  outputCurrent: number
  /** Ω, of the divider; it is no part of the document, which gives the output voltage instead. */
  lowerResistance: number
}

export interface Variable extends VariedQuantity {
  readonly set: (draft: Draft, value: number) => void
}

/** Everything that varies, line and load first. Quantities without a tolerance, or of parts not fitted, are left out. */
export function variablesOf(design: DesignDocument, groups: readonly SpreadGroup[]): Variable[] {
  const all = [...operatingRange(design), ...stageParts(design), ...controlParts(design), ...networkParts(design)]
  return all.filter(({ group, low, high }) => groups.includes(group) && low < high)
}

export const upperOf = ({ compensator, sense }: DesignDocument): number =>
  compensator?.parts.R1 || sense.upperResistance
/** Infinite where the output itself is compared. */
export const lowerOf = (design: DesignDocument): number => upperOf(design) * lowerRatio(design)

function operatingRange({ line, output }: DesignDocument): Variable[] {
  return [
    {
      key: 'line',
      label: 'Line voltage',
      unit: 'V',
      group: 'line',
      nominal: line.nominal,
      low: line.minimum,
      high: line.maximum,
      set: (draft, value) => (draft.lineVoltage = value),
    },
    {
      key: 'load',
      label: 'Load current',
      unit: 'A',
      group: 'load',
      nominal: output.currentMaximum,
      low: output.currentMinimum,
      high: output.currentMaximum,
      set: (draft, value) => (draft.outputCurrent = value),
    },
  ]
}

/** A quantity with a tolerance; null and zero stand for a part that is not there. */
function tolerated(
  { tolerances }: DesignDocument,
  group: Exclude<SpreadGroup, 'line' | 'load'>,
  key: string,
  label: string,
  unit: VariedQuantity['unit'],
  nominal: number | null | undefined,
  set: Variable['set'],
): Variable[] {
  if (!nominal || !Number.isFinite(nominal)) return []
  const reach = nominal * tolerances[group]
  return [{ key, label, unit, group, nominal, low: nominal - reach, high: nominal + reach, set }]
}

function stageParts(design: DesignDocument): Variable[] {
  const { topology, inductor, secondInductor, couplingCapacitor, outputCapacitors } = design
  const several = outputCapacitors.length > 1
  const isCoupled = topology === 'sepic' || topology === 'cuk'
  return [
    ...tolerated(
      design,
      'inductance',
      'inductor.inductance',
      'Inductance',
      'H',
      inductor.inductance,
      (draft, value) => {
        draft.design.inductor.inductance = value
      },
    ),
    ...tolerated(
      design,
      'inductance',
      'secondInductor.inductance',
      'Second inductance',
      'H',
      isCoupled ? secondInductor?.inductance : null,
      (draft, value) => (draft.design.secondInductor!.inductance = value),
    ),
    ...tolerated(
      design,
      'capacitance',
      'couplingCapacitor.capacitance',
      'Coupling capacitance',
      'F',
      isCoupled ? couplingCapacitor?.capacitance : null,
      (draft, value) => (draft.design.couplingCapacitor!.capacitance = value),
    ),
    ...tolerated(
      design,
      'esr',
      'couplingCapacitor.esr',
      'ESR of the coupling capacitor',
      'Ω',
      isCoupled ? couplingCapacitor?.esr : null,
      (draft, value) => (draft.design.couplingCapacitor!.esr = value),
    ),
    ...outputCapacitors.flatMap((bank, i) => {
      const which = several ? ` of output bank ${i + 1}` : ' of the output capacitors'
      const path = `outputCapacitors[${i}]`
      return [
        ...tolerated(
          design,
          'capacitance',
          `${path}.capacitance`,
          `Capacitance${which}`,
          'F',
          bank.capacitance,
          (draft, value) => (draft.design.outputCapacitors[i]!.capacitance = value),
        ),
        ...tolerated(design, 'esr', `${path}.esr`, `ESR${which}`, 'Ω', bank.esr, (draft, value) => {
          draft.design.outputCapacitors[i]!.esr = value
        }),
      ]
    }),
  ]
}

function controlParts(design: DesignDocument): Variable[] {
  return [...modulatorParts(design), ...amplifierParts(design)]
}

function modulatorParts(design: DesignDocument): Variable[] {
  const { modulator } = design
  const of = tolerated.bind(null, design, 'modulator')
  if (modulator.kind === 'voltage-mode') {
    return of('modulator.rampAmplitude', 'Ramp amplitude', 'V', modulator.rampAmplitude, (draft, value) => {
      if (draft.design.modulator.kind === 'voltage-mode') draft.design.modulator.rampAmplitude = value
    })
  }
  const { currentSenseResistance, slopeCompensation } = modulator
  return [
    ...of('modulator.currentSenseResistance', 'Current-sense gain', 'Ω', currentSenseResistance, (draft, value) => {
      const varied = draft.design.modulator
      if (varied.kind === 'peak-current-mode') varied.currentSenseResistance = value
    }),
    ...of('modulator.slopeCompensation', 'Slope compensation', 'V/s', slopeCompensation, (draft, value) => {
      const varied = draft.design.modulator
      if (varied.kind === 'peak-current-mode') varied.slopeCompensation = value
    }),
  ]
}

function amplifierParts(design: DesignDocument): Variable[] {
  const { amplifier } = design
  const of = tolerated.bind(null, design, 'amplifier')
  switch (amplifier.kind) {
    case 'op-amp':
      return of('amplifier.gainBandwidth', 'Gain-bandwidth', 'Hz', amplifier.gainBandwidth, (draft, value) => {
        if (draft.design.amplifier.kind === 'op-amp') draft.design.amplifier.gainBandwidth = value
      })
    case 'transconductance':
      return of('amplifier.transconductance', 'Transconductance', 'S', amplifier.transconductance, (draft, value) => {
        if (draft.design.amplifier.kind === 'transconductance') draft.design.amplifier.transconductance = value
      })
    case 'shunt-optocoupler': {
      const { currentTransferRatio, pullUpResistance, ledResistance } = amplifier
      const into =
        (key: 'currentTransferRatio' | 'pullUpResistance' | 'ledResistance'): Variable['set'] =>
        (draft, value) => {
          if (draft.design.amplifier.kind === 'shunt-optocoupler') draft.design.amplifier[key] = value
        }
      const ofResistor = tolerated.bind(null, design, 'resistor')
      const ratio = into('currentTransferRatio')
      return [
        ...of('amplifier.currentTransferRatio', 'Current transfer ratio', '', currentTransferRatio, ratio),
        ...ofResistor(
          'amplifier.pullUpResistance',
          'Pull-up resistor',
          'Ω',
          pullUpResistance,
          into('pullUpResistance'),
        ),
        ...ofResistor('amplifier.ledResistance', 'LED resistor', 'Ω', ledResistance, into('ledResistance')),
      ]
    }
  }
}

function networkParts(design: DesignDocument): Variable[] {
  const { compensator } = design
  if (!compensator) return []
  const { parts } = compensator
  const ofNetwork = (part: 'R1' | 'R2' | 'R3' | 'C1' | 'C2' | 'C3', nominal: number | null | undefined) => {
    const isResistor = part.startsWith('R')
    return tolerated(
      design,
      isResistor ? 'resistor' : 'smallCapacitor',
      `compensator.parts.${part}`,
      part,
      isResistor ? 'Ω' : 'F',
      nominal,
      (draft, value) => (draft.design.compensator!.parts[part] = value),
    )
  }
  const lower = tolerated(
    design,
    'resistor',
    'sense.lowerResistance',
    'Lower divider resistor',
    'Ω',
    lowerOf(design),
    (draft, value) => (draft.lowerResistance = value),
  )
  const { type } = compensator
  return [
    ...ofNetwork('R1', upperOf(design)),
    ...lower,
    ...ofNetwork('R2', type === 'I' ? null : parts.R2),
    ...ofNetwork('R3', type === 'III' ? parts.R3 : null),
    ...ofNetwork('C1', parts.C1),
    ...ofNetwork('C2', type === 'I' ? null : parts.C2),
    ...ofNetwork('C3', type === 'III' ? parts.C3 : null),
  ]
}
