/** The parts of a power stage: their values in short, and where they can be pressed. */
import type { StageLayout } from './stageLayout'
import type { Box } from '@/components/plots/layout'
import type { DesignDocument } from '@/converters/document'
import { formatEntry } from '@/hooks/draft/entries'

export type StagePart =
  | { readonly kind: 'line' | 'switch' | 'rectifier' | 'inductor' | 'load' | 'modulator' | 'amplifier' }
  | { readonly kind: 'bank'; readonly index: number }

/** What stands beside each part, a line each. */
export function partValues(design: DesignDocument) {
  const { line, output, inductor, rectifier, modulator, amplifier, sense } = design
  const drop = rectifier.forwardVoltage > 0 ? [formatEntry(rectifier.forwardVoltage, 'V')] : []
  return {
    line: [formatEntry(line.nominal, 'V'), `${short(line.minimum)}–${short(line.maximum)}`],
    switch: [formatEntry(design.switch.onResistance, 'Ω')],
    rectifier: [...drop, formatEntry(rectifier.onResistance, 'Ω')],
    inductor: [formatEntry(inductor.inductance, 'H'), formatEntry(inductor.resistance, 'Ω')],
    banks: design.outputCapacitors.map((bank) => ({
      pieces: [...(bank.count > 1 ? [`${bank.count} ×`] : []), formatEntry(bank.capacitance, 'F')],
      esr: formatEntry(bank.esr, 'Ω'),
    })),
    load: [formatEntry(output.voltage, 'V'), formatEntry(output.currentMaximum, 'A')],
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

function bankLines(bank: { readonly pieces: readonly string[]; readonly esr: string } | undefined): readonly string[] {
  return bank ? [bank.pieces.join(' '), `ESR ${bank.esr}`] : []
}

const short = (volts: number) => formatEntry(volts, 'V').replace(' V', '')

function amplifierName(amplifier: DesignDocument['amplifier']): string {
  switch (amplifier.kind) {
    case 'op-amp':
      return `Op-amp, ${formatEntry(amplifier.gainBandwidth, 'Hz')}`
    case 'transconductance':
      return `Transconductance, ${formatEntry(amplifier.transconductance, 'S')}`
    case 'shunt-optocoupler':
      return 'Shunt reference'
  }
}

export interface HitBox extends Box {
  readonly part: StagePart
  readonly label: string
}

/** Areas to press, with the words that are read aloud for them. */
export function hitBoxes(design: DesignDocument, layout: StageLayout): HitBox[] {
  const { top, bottom, node, beforeNode, afterNode, source, banks, load, control, width } = layout
  const values = partValues(design)
  const upright = (x: number, right: number) => ({
    x: x - 16,
    y: top + 26,
    width: right - x + 14,
    height: bottom - top - 44,
  })
  const along = (x: number) => ({ x: x - 32, y: 2, width: 64, height: top + 10 })
  const isBuck = design.topology !== 'boost'
  const spot = {
    switch: isBuck ? along(beforeNode) : upright(node, banks[0]! - 18),
    inductor: isBuck ? along(afterNode) : along(beforeNode),
    rectifier: isBuck ? upright(node, banks[0]! - 18) : along(afterNode),
  }
  const say = (name: string, lines: readonly string[]) => `${name}, ${lines.join(', ')}`
  return [
    { part: { kind: 'line' }, label: say('Line', values.line), ...upright(source, node - 20) },
    { part: { kind: 'switch' }, label: say('Switch', values.switch), ...spot.switch },
    { part: { kind: 'inductor' }, label: say('Inductor', values.inductor), ...spot.inductor },
    { part: { kind: 'rectifier' }, label: say('Rectifier', values.rectifier), ...spot.rectifier },
    ...banks.map((x, index) => ({
      part: { kind: 'bank' as const, index },
      label: say(`Output capacitors${banks.length > 1 ? `, bank ${index + 1}` : ''}`, bankLines(values.banks[index])),
      ...upright(x, (banks[index + 1] ?? load) - 18),
    })),
    { part: { kind: 'load' }, label: say('Load', values.load), ...upright(load, width - 12) },
    {
      part: { kind: 'modulator' },
      label: say('Modulator', values.modulator),
      ...{
        x: control.left,
        y: control.top,
        width: control.middle - control.left - 14,
        height: control.bottom - control.top,
      },
    },
    {
      part: { kind: 'amplifier' },
      label: say('Error amplifier', values.amplifier),
      ...{
        x: control.middle + 14,
        y: control.top,
        width: control.right - control.middle - 14,
        height: control.bottom - control.top,
      },
    },
  ]
}
