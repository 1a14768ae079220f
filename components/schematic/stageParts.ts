/** The parts of a power stage: what they are called, and their values in short. */
import { isInverting, type StationName } from './ladders'
import type { DesignDocument } from '@/converters/document'
import { formatEntry } from '@/hooks/draft/entries'

export type StagePart =
  | {
      readonly kind:
        | 'line'
        | 'inputFilter'
        | 'switch'
        | 'rectifier'
        | 'inductor'
        | 'secondInductor'
        | 'couplingCapacitor'
        | 'transformer'
        | 'load'
        | 'modulator'
        | 'amplifier'
    }
  | { readonly kind: 'bank'; readonly index: number }

type Values = readonly string[]

/** The line, the load, the banks and the way back: parts that every stage has. */
export function partValues(design: DesignDocument) {
  const { line, output, modulator, amplifier, sense, topology } = design
  return {
    line: [formatEntry(line.nominal, 'V'), `${short(line.minimum)}–${short(line.maximum)}`],
    banks: design.outputCapacitors.map((bank) => ({
      pieces: [...(bank.count > 1 ? [`${bank.count} ×`] : []), formatEntry(bank.capacitance, 'F')],
      esr: formatEntry(bank.esr, 'Ω'),
    })),
    load: [
      `${isInverting(topology) ? '−' : ''}${formatEntry(output.voltage, 'V')}`,
      formatEntry(output.currentMaximum, 'A'),
    ],
    modulator:
      modulator.kind === 'voltage-mode'
        ? ['Voltage mode', `ramp ${formatEntry(modulator.rampAmplitude, 'V')}`]
        : [
            `Peak current, ${formatEntry(modulator.currentSenseResistance, 'Ω')}`,
            `slope ${formatEntry(modulator.slopeCompensation, 'V/s')}`,
          ],
    amplifier: [amplifierName(amplifier), `reference ${formatEntry(sense.referenceVoltage, 'V')}`],
  }
}

const short = (volts: number) => formatEntry(volts, 'V').replace(' V', '')

function amplifierName(amplifier: DesignDocument['amplifier']): string {
  switch (amplifier.kind) {
    case 'op-amp':
      return `Op-amp, ${formatEntry(amplifier.gainBandwidth, 'Hz')}`
    case 'transconductance':
      return `Transconductance, ${formatEntry(amplifier.transconductance, 'S')}`
    case 'shunt-optocoupler':
      return `Optocoupler, ${formatEntry(amplifier.currentTransferRatio, '%')}`
  }
}

export interface StationPart {
  readonly part: StagePart
  readonly name: string
  /** Beside the part; of a branch, those of its capacitor. */
  readonly lines: Values
  /** Of a branch: those of its resistor. */
  readonly lower?: Values
}

const branch = (name: string, capacitance: number, resistance: number): StationPart => ({
  part: { kind: 'inputFilter' },
  name,
  lines: [formatEntry(capacitance, 'F')],
  lower: resistance > 0 ? [formatEntry(resistance, 'Ω')] : [],
})

/** What one rung of the ladder says and which entries it opens. */
export function stationPart(design: DesignDocument, name: StationName): StationPart {
  const { rectifier, secondInductor, couplingCapacitor, transformer, inputFilter, topology } = design
  const coil = (part: { inductance: number; resistance: number }) => [
    formatEntry(part.inductance, 'H'),
    formatEntry(part.resistance, 'Ω'),
  ]
  const drop = rectifier.forwardVoltage > 0 ? [formatEntry(rectifier.forwardVoltage, 'V')] : []
  switch (name) {
    case 'switch':
      return { part: { kind: 'switch' }, name: 'Switch', lines: [formatEntry(design.switch.onResistance, 'Ω')] }
    case 'rectifier':
      return {
        part: { kind: 'rectifier' },
        name: topology === 'forward' ? 'Freewheeling rectifier' : 'Rectifier',
        lines: [...drop, formatEntry(rectifier.onResistance, 'Ω')],
      }
    case 'forwardRectifier':
      return { part: { kind: 'rectifier' }, name: 'Forward rectifier', lines: [] }
    case 'inductor':
      return {
        part: { kind: 'inductor' },
        name: secondInductor && hasTwoInductors(topology) ? 'First inductor' : 'Inductor',
        lines: coil(design.inductor),
      }
    case 'secondInductor':
      return {
        part: { kind: 'secondInductor' },
        name: 'Second inductor',
        lines: secondInductor ? coil(secondInductor) : ['missing'],
      }
    case 'couplingCapacitor':
      return {
        part: { kind: 'couplingCapacitor' },
        name: 'Coupling capacitor',
        lines: couplingCapacitor
          ? [formatEntry(couplingCapacitor.capacitance, 'F'), formatEntry(couplingCapacitor.esr, 'Ω')]
          : ['missing'],
      }
    case 'transformer':
      return {
        part: { kind: 'transformer' },
        name: 'Transformer',
        lines: [transformer ? `1 : ${formatEntry(transformer.turnsRatio, '')}` : 'missing'],
      }
    case 'filterInductor':
      return {
        part: { kind: 'inputFilter' },
        name: 'Input filter inductor',
        lines: inputFilter ? coil(inputFilter) : [],
      }
    case 'filterCapacitor':
      return branch('Input filter capacitor', inputFilter?.capacitance ?? 0, inputFilter?.esr ?? 0)
    case 'dampingBranch':
      return branch('Damping branch', inputFilter?.dampingCapacitance ?? 0, inputFilter?.dampingResistance ?? 0)
  }
}

const hasTwoInductors = (topology: DesignDocument['topology']) => topology === 'sepic' || topology === 'cuk'
