/** Changes of the design by choice rather than by typing. Each can be undone. */
import type { DesignDocument } from '@/converters/document'
import { draftStore } from './store'

export const MOST_BANKS = 6

export type ModulatorKind = DesignDocument['modulator']['kind']
/** The amplifiers that can be computed. */
export type AmplifierKind = Exclude<DesignDocument['amplifier']['kind'], 'shunt-optocoupler'>

export function setLoad(load: DesignDocument['load']): void {
  draftStore.edit((design) => ({ ...design, load }))
}

export function setRectifier(kind: DesignDocument['rectifier']['kind']): void {
  draftStore.edit((design) => ({ ...design, rectifier: { ...design.rectifier, kind } }))
}

/** A plant with another control scheme needs another network. */
export function setModulator(modulator: DesignDocument['modulator']): void {
  draftStore.edit(
    (design) => ({ ...design, modulator, compensator: null }),
    (path) => path.startsWith('modulator.') || path.startsWith('compensator.'),
  )
}

const USUAL_AMPLIFIERS: Readonly<Record<AmplifierKind, DesignDocument['amplifier']>> = {
  'op-amp': { kind: 'op-amp', gainBandwidth: 10e6, openLoopGain: 1e4 },
  transconductance: { kind: 'transconductance', transconductance: 1e-3, outputResistance: 1e6 },
}

export function setAmplifier(kind: AmplifierKind): void {
  draftStore.edit(
    (design) =>
      design.amplifier.kind === kind ? design : { ...design, amplifier: USUAL_AMPLIFIERS[kind], compensator: null },
    (path) => path.startsWith('amplifier.') || path.startsWith('compensator.'),
  )
}

/** One more bank, like the last one. */
export function addBank(): void {
  draftStore.edit((design) => {
    const last = design.outputCapacitors.at(-1)
    return last && design.outputCapacitors.length < MOST_BANKS
      ? { ...design, outputCapacitors: [...design.outputCapacitors, last] }
      : design
  })
}

/** Takes a bank away, with what was typed into it and was not used yet. */
export function removeBank(index: number): void {
  draftStore.edit(
    (design) =>
      design.outputCapacitors.length > 1
        ? { ...design, outputCapacitors: design.outputCapacitors.filter((_, at) => at !== index) }
        : design,
    // Those of the banks behind it would stand at another bank's entries.
    (path) => Number(/^outputCapacitors\.(\d+)\./.exec(path)?.[1] ?? -1) >= index,
  )
}
