/** Which quantities of a design vary, and the design that a set of their values makes. */
import { lowerRatio } from '../compensators/networks'
import type { DesignDocument } from '../document'
import type { PlantPoint } from '../plant'
import { truncatedNormalQuantile } from './normal'
import type { SpreadConditions, SpreadGroup, SpreadOptions } from './options'
import type { VariedQuantity } from './results'

/** A design whose parts have taken values of their own, at one line voltage and load. */
export interface Sample {
  readonly design: DesignDocument
  readonly point: PlantPoint
}

/** A copy of a design that values can be written into. */
interface Draft {
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

/** The output capacitors, and the coupling capacitor, as temperature and age have left them. */
export function conditioned(design: DesignDocument, { temperature, ageing }: SpreadConditions): DesignDocument {
  const shifts = [temperature, ageing].filter((shift) => shift !== undefined)
  if (shifts.length === 0) return design
  const capacitanceFactor = shifts.reduce((product, shift) => product * shift.capacitanceFactor, 1)
  const esrFactor = shifts.reduce((product, shift) => product * shift.esrFactor, 1)
  const shifted = <T extends { capacitance: number; esr: number }>(part: T): T => ({
    ...part,
    capacitance: part.capacitance * capacitanceFactor,
    esr: part.esr * esrFactor,
  })
  return {
    ...design,
    outputCapacitors: design.outputCapacitors.map(shifted),
    couplingCapacitor: design.couplingCapacitor && shifted(design.couplingCapacitor),
  }
}

/** The design and point at which the variables have these values, in their order. */
export function sampleAt(base: DesignDocument, variables: readonly Variable[], values: ArrayLike<number>): Sample {
  return samplerOf(base, variables)(values)
}

/**
 * The same for thousands of value sets in turn: they are written into one copy, so that a sample holds until the next one
 * is asked for.
 */
export function samplerOf(base: DesignDocument, variables: readonly Variable[]): (values: ArrayLike<number>) => Sample {
  const draft = draftOf(base)
  const { design } = draft
  const { voltage } = design.output
  const ratio = draft.lowerResistance / upperOf(design)
  const point = { lineVoltage: draft.lineVoltage, outputCurrent: draft.outputCurrent }
  return (values) => {
    for (let i = 0; i < variables.length; i++) variables[i]!.set(draft, values[i]!)
    point.lineVoltage = draft.lineVoltage
    point.outputCurrent = draft.outputCurrent
    // The loop holds the reference at the divider's tap, so the output goes where the divider puts it.
    const varied = draft.lowerResistance / upperOf(design)
    const isDivided = Number.isFinite(varied) && varied !== ratio
    design.output.voltage = isDivided ? design.sense.referenceVoltage * (1 + 1 / varied) : voltage
    return { design, point }
  }
}

/** How a coordinate in (0, 1) becomes a value. Line and load are uniform over their ranges: any of it may be met. */
export function quantileOf(
  { group, nominal, low, high }: VariedQuantity,
  { distribution, measured }: Pick<SpreadOptions, 'distribution' | 'measured'>,
): (u: number) => number {
  if (group === 'line' || group === 'load') return (u) => low + u * (high - low)
  const deviations = measured[group]
  if (deviations) return (u) => nominal * (1 + deviations[Math.floor(u * deviations.length)]!)
  const middle = (high + low) / 2
  const reach = (high - low) / 2
  if (distribution === 'uniform') return (u) => low + u * (high - low)
  return (u) => middle + reach * truncatedNormalQuantile(u)
}

function draftOf(design: DesignDocument): Draft {
  const { inductor, secondInductor, couplingCapacitor, outputCapacitors, modulator, amplifier, compensator } = design
  return {
    design: {
      ...design,
      output: { ...design.output },
      inductor: { ...inductor },
      secondInductor: secondInductor && { ...secondInductor },
      couplingCapacitor: couplingCapacitor && { ...couplingCapacitor },
      outputCapacitors: outputCapacitors.map((bank) => ({ ...bank })),
      modulator: { ...modulator },
      amplifier: { ...amplifier },
      compensator: compensator && { type: compensator.type, parts: { ...compensator.parts } },
    },
    lineVoltage: design.line.nominal,
    outputCurrent: design.output.currentMaximum,
    lowerResistance: lowerOf(design),
  }
}

const upperOf = ({ compensator, sense }: DesignDocument): number => compensator?.parts.R1 || sense.upperResistance
/** Infinite where the output itself is compared. */
const lowerOf = (design: DesignDocument): number => upperOf(design) * lowerRatio(design)

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
