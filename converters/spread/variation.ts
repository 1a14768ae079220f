/** The design that a set of values makes of another, and how those values are drawn. */
import type { DesignDocument } from '../document'
import type { PlantPoint } from '../plant'
import { truncatedNormalQuantile } from './normal'
import type { SpreadConditions, SpreadOptions } from './options'
import type { VariedQuantity } from './results'
import { lowerOf, upperOf, type Draft, type Variable } from './variables'

/** A design whose parts have taken values of their own, at one line voltage and load. */
export interface Sample {
  readonly design: DesignDocument
  readonly point: PlantPoint
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
