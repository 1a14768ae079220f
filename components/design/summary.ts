import type { DesignDocument, Topology } from '@/converters/document'
import { formatEntry } from '@/hooks/draft/entries'

export const TOPOLOGY_NAMES: Readonly<Record<Topology, string>> = {
  buck: 'Buck',
  boost: 'Boost',
  'buck-boost': 'Buck-boost',
  flyback: 'Flyback',
  forward: 'Forward',
  sepic: 'SEPIC',
  cuk: 'Ćuk',
}

export const CONTROL_NAMES: Readonly<Record<DesignDocument['modulator']['kind'], string>> = {
  'voltage-mode': 'voltage mode',
  'peak-current-mode': 'peak current mode',
}

/** 12 V → 3.3 V, 8 A */
export function railSummary({ line, output }: Pick<DesignDocument, 'line' | 'output'>): string {
  return `${formatEntry(line.nominal, 'V')} → ${formatEntry(output.voltage, 'V')}, ${formatEntry(output.currentMaximum, 'A')}`
}

/** Buck, voltage mode, 500 kHz */
export function stageSummary({ topology, modulator, switchingFrequency }: DesignDocument): string {
  return `${TOPOLOGY_NAMES[topology]}, ${CONTROL_NAMES[modulator.kind]}, ${formatEntry(switchingFrequency, 'Hz')}`
}

export function designName(design: DesignDocument): string {
  return design.name?.trim() || `${TOPOLOGY_NAMES[design.topology]} rail`
}
