/** Changes of the design by choice rather than by typing. Each can be undone. */
import type { DesignDocument, Topology } from '@/converters/document'
import { draftStore } from './store'

export const MOST_BANKS = 6

export type ModulatorKind = DesignDocument['modulator']['kind']
export type AmplifierKind = DesignDocument['amplifier']['kind']

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
  'shunt-optocoupler': {
    kind: 'shunt-optocoupler',
    currentTransferRatio: 1,
    pullUpResistance: 4.7e3,
    ledResistance: 2.2e3,
    optocouplerPole: 10e3,
  },
}

export function setAmplifier(kind: AmplifierKind): void {
  draftStore.edit(
    (design) =>
      design.amplifier.kind === kind ? design : { ...design, amplifier: USUAL_AMPLIFIERS[kind], compensator: null },
    (path) => path.startsWith('amplifier.') || path.startsWith('compensator.'),
  )
}

/** Beginning with what a controller on a low supply can swing. */
export function limitAmplifier(isLimited: boolean): void {
  draftStore.edit(
    (design) => ({
      ...design,
      amplifier: { ...design.amplifier, outputLimits: isLimited ? { minimum: 0, maximum: 5 } : null },
    }),
    (path) => path.startsWith('amplifier.outputLimits.'),
  )
}

const USES: Readonly<Record<'secondInductor' | 'couplingCapacitor' | 'transformer', readonly Topology[]>> = {
  secondInductor: ['sepic', 'cuk'],
  couplingCapacitor: ['sepic', 'cuk'],
  transformer: ['flyback', 'forward'],
}

/** Whether a stage of this topology has the part. */
export const hasPart = (topology: Topology, part: keyof typeof USES): boolean => USES[part].includes(topology)

/** Duty cycles at nominal line that a first turns ratio aims at. Common practice, no source. */
const WANTED_DUTY = { flyback: 0.45, forward: 0.35 }

function firstTurnsRatio(topology: 'flyback' | 'forward', { line, output }: DesignDocument): number {
  const duty = WANTED_DUTY[topology]
  const gain = topology === 'flyback' ? duty / (1 - duty) : duty
  return Number((output.voltage / (gain * line.nominal)).toPrecision(2))
}

/**
 * Another topology around the same line, load and parts. What it needs besides is filled in, parts that it has no use for
 * stay in the document for the way back; its plant needs another network.
 */
export function setTopology(topology: Topology): void {
  draftStore.edit(
    (design) => {
      if (design.topology === topology) return design
      const { secondInductor, couplingCapacitor, transformer } = design
      const next: DesignDocument = { ...design, topology, compensator: null }
      if (hasPart(topology, 'secondInductor') && !secondInductor?.inductance) next.secondInductor = design.inductor
      if (hasPart(topology, 'couplingCapacitor') && !couplingCapacitor?.capacitance) {
        next.couplingCapacitor = { capacitance: 22e-6, esr: 5e-3 }
      }
      if ((topology === 'flyback' || topology === 'forward') && !transformer) {
        next.transformer = { turnsRatio: firstTurnsRatio(topology, design) }
      }
      return next
    },
    (path) => path.startsWith('compensator.'),
  )
}

/** Without damping: the check says what it needs. */
const FIRST_FILTER: NonNullable<DesignDocument['inputFilter']> = {
  inductance: 1e-6,
  resistance: 10e-3,
  capacitance: 22e-6,
  esr: 3e-3,
}

export function fitInputFilter(isFitted: boolean): void {
  draftStore.edit(
    (design) => ({ ...design, inputFilter: isFitted ? FIRST_FILTER : null }),
    (path) => path.startsWith('inputFilter.'),
  )
}

/** F and Ω of the branch across the filter's capacitor. */
export function dampInputFilter(dampingCapacitance: number, dampingResistance: number): void {
  draftStore.edit(
    (design) =>
      design.inputFilter
        ? { ...design, inputFilter: { ...design.inputFilter, dampingCapacitance, dampingResistance } }
        : design,
    (path) => path.startsWith('inputFilter.damping'),
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
