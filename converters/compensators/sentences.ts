/** What the wizard says about a choice and about a network: plain sentences with their figures. */
import { formatQuantity } from '../quantities'
import type { CornerMargins, CrossoverWindow, MarginSummary, PartValues } from '../results'
import { boostFor, type Attempt } from './attempts'
import type { Choice } from './chooseCrossover'
import type { ReadCorner } from './cornerMargins'
import type { CornerPlants } from './cornerPlants'
import { boostOf, kFactor } from './kFactor'
import type { CompensatorOptions } from './options'

const TAU = 2 * Math.PI
const hertz = (frequency: number) => formatQuantity(frequency, 'Hz')
/** One decimal, so that a margin reads the same wherever it is printed. */
const degrees = (angle: number) => `${angle.toFixed(1)}°`.replace('-', '−')
const decibels = (gain: number) => `${gain.toFixed(1)} dB`.replace('-', '−')
const at = ({ lineVoltage, outputCurrent }: { lineVoltage: number; outputCurrent: number }) =>
  `${formatQuantity(lineVoltage, 'V')} and ${formatQuantity(outputCurrent, 'A')}`

export function suggestionReasons(
  plants: CornerPlants,
  window: CrossoverWindow,
  { attempts: [attempt], how }: Extract<Choice, { kind: 'choice' }>,
  typeForced: boolean,
): string[] {
  const { targets } = plants.design
  const crossover = attempt.goal.omega / TAU
  const aim = `${targets.phaseMargin}° and ${targets.gainMargin} dB`
  const chosen = {
    wanted: `A crossover of ${hertz(crossover)} is what was asked for.`,
    highest: `${hertz(crossover)} is the highest crossover at nominal line and full load with which every corner of line and load holds ${aim} and stays below ${hertz(window.upper)}.`,
    nearest: `No crossover in the window holds ${aim} at every corner; ${hertz(crossover)} comes nearest.`,
    'slow-integrator': `Above the resonance no network holds ${aim} at every corner. A plain integrator that crosses at ${hertz(crossover)} does, because its gain is down before the resonance; the loop is slow.`,
  }[how]
  return [chosen, ...outsideWindow(window, crossover), typeReason(plants, attempt, typeForced)]
}

function outsideWindow(window: CrossoverWindow, crossover: number): string[] {
  return window.bounds
    .filter(({ side, frequency }) => (side === 'upper' ? crossover > frequency : crossover < frequency))
    .map(({ side, text }) => `It lies ${side === 'upper' ? 'above' : 'below'} this bound. ${text}`)
}

function typeReason(
  { design: { targets } }: CornerPlants,
  { goal, ideal: { type } }: Attempt,
  forced: boolean,
): string {
  const boost = boostFor(goal, targets.phaseMargin)
  const needs = `There the plant lags by ${degrees(-goal.plantPhase)}, so ${targets.phaseMargin}° of phase margin ${boost > 0 ? `need ${degrees(boost)} of boost` : 'need no boost'}`
  if (forced) return `${needs}. Type ${type} was asked for.`
  const why = {
    I: 'an integrator is enough',
    II: 'type II gives that: it adds less than 90°',
    III: 'that takes type III: type II adds less than 90°, of which some 80° are of use',
  }[type]
  return `${needs}; ${why}.`
}

export interface NetworkFacts {
  readonly attempt: Attempt
  readonly margins: { readonly ideal: CornerMargins; readonly preferred: CornerMargins }
  readonly options: CompensatorOptions
  /** Zeros and poles came by hand. */
  readonly byHand: boolean
}

export function networkReasons(plants: CornerPlants, facts: NetworkFacts): string[] {
  return [
    methodReason(facts),
    ...reserveReason(plants, facts),
    ...movedUpperReason(plants, facts),
    roundingReason(facts),
    worstReason(facts.margins.preferred),
  ]
}

function methodReason({ attempt: { method, ideal, goal }, byHand }: NetworkFacts): string {
  const { type, network } = ideal
  if (byHand) return 'Zeros and poles stand where they were placed by hand.'
  if (type === 'I')
    return `C1 alone makes an integrator that crosses at ${hertz(goal.omega / TAU)}, before the plant’s own phase counts; what the loop corrects, it corrects slowly.`
  if (method === 'k-factor') {
    const boost = boostOf(network, goal.omega)
    return `Zeros and poles stand around the crossover so that their boost of ${degrees(boost)} peaks there, K = ${kFactor(type, boost).toPrecision(3)} (Venable 1983).`
  }
  if (method === 'optimised')
    return 'Zeros and poles were moved together until the worst corner of line and load had the most phase margin at this crossover, the gain margin kept (Nelder and Mead 1965).'
  return 'Zeros stand at the plant’s own poles, or as far below as the corners ask for; poles at its ESR zero, its right-half-plane zero or half the switching frequency (common practice, no source).'
}

/** Why the nominal margin is wider than the target. */
function reserveReason({ design: { targets } }: CornerPlants, { attempt, margins, byHand }: NetworkFacts): string[] {
  const { phaseMargin } = margins.ideal.nominal
  if (byHand || attempt.ideal.type === 'I' || phaseMargin === null || phaseMargin < targets.phaseMargin + 1) return []
  return [
    `At nominal line and full load it is made for ${degrees(phaseMargin)}, ${degrees(phaseMargin - targets.phaseMargin)} beyond the target: a reserve for the other corners and for rounding.`,
  ]
}

function movedUpperReason({ design: { compensator, sense } }: CornerPlants, { attempt }: NetworkFacts): string[] {
  const before = compensator?.parts.R1 || sense.upperResistance
  const after = attempt.ideal.parts.R1!
  if (after === before) return []
  return [
    `R1 goes from ${formatQuantity(before, 'Ω')} to ${formatQuantity(after, 'Ω')}, and the lower divider resistor with it, so that all parts stay within the size limits.`,
  ]
}

function roundingReason({ margins, options }: NetworkFacts): string {
  const resistors = options.ownResistors ? 'resistors in stock' : `${options.resistorSeries} resistors`
  const capacitors = options.ownCapacitors ? 'capacitors in stock' : `${options.capacitorSeries} capacitors`
  const before = margins.ideal.nominal.phaseMargin
  const after = margins.preferred.nominal.phaseMargin
  const moved =
    before === null || after === null
      ? ''
      : ` takes the nominal phase margin from ${degrees(before)} to ${degrees(after)}`
  return `Rounding all parts together to ${resistors} and ${capacitors}${moved || ' keeps the loop without a crossover'}.`
}

function worstReason({ worst }: CornerMargins): string {
  return `The worst corner is ${at(worst)}: ${marginText(worst)}.`
}

function marginText({ crossover, phaseMargin, gainMargin, isStable }: MarginSummary): string {
  if (!isStable) return 'the loop is unstable'
  const phase = phaseMargin === null ? 'no crossover' : `${degrees(phaseMargin)} at ${hertz(crossover!)}`
  return gainMargin === null
    ? `${phase}, no limit to the gain below half the switching frequency`
    : `${phase}, ${decibels(gainMargin)}`
}

/** What falls short of the targets, one sentence a kind, at the corner where it is worst. */
export function shortfalls(
  plants: CornerPlants,
  window: CrossoverWindow,
  read: readonly ReadCorner[],
  { ideal, preferred, options }: { ideal: PartValues; preferred: PartValues; options: CompensatorOptions },
): string[] {
  const unstable = read.filter((corner) => !corner.isStable)
  if (unstable.length > 0) return [`The loop is unstable at ${unstable.map(at).join(', ')}.`]
  const { targets } = plants.design
  const found = [
    short(read, (corner) => corner.phaseMargin, targets.phaseMargin, 'phase margin', degrees),
    short(read, (corner) => corner.gainMargin, targets.gainMargin, 'gain margin', decibels),
    aboveWindow(read, window),
  ].filter((sentence) => sentence !== null)
  // A part at its limit is worth a word only where something is missing for it.
  return found.length > 0 ? [...found, ...limitedParts(ideal, preferred, options)] : []
}

function short(
  read: readonly ReadCorner[],
  marginOf: (corner: ReadCorner) => number | null,
  target: number,
  name: string,
  write: (value: number) => string,
): string | null {
  const worst = read.reduce((least, corner) =>
    (marginOf(corner) ?? Infinity) < (marginOf(least) ?? Infinity) ? corner : least,
  )
  const margin = marginOf(worst)
  if (margin === null || margin >= target) return null
  return `At ${at(worst)} the ${name} is ${write(margin)}, ${write(target - margin)} short of ${write(target)}.`
}

function aboveWindow(read: readonly ReadCorner[], window: CrossoverWindow): string | null {
  const fastest = read.reduce((most, corner) => ((corner.crossover ?? 0) > (most.crossover ?? 0) ? corner : most))
  // A percent is what rounding to preferred values moves; it is no reason to alarm anybody.
  if (!fastest.crossover || fastest.crossover <= 1.01 * window.upper) return null
  return `At ${at(fastest)} the crossover reaches ${hertz(fastest.crossover)}, above the ${hertz(window.upper)} that the window allows.`
}

/** Parts that the limits or the stock kept far from their computed values. */
function limitedParts(ideal: PartValues, preferred: PartValues, options: CompensatorOptions): string[] {
  const sentences: string[] = []
  for (const part of ['R2', 'R3', 'C1', 'C2', 'C3'] as const) {
    const [wanted, got] = [ideal[part], preferred[part]]
    if (wanted === undefined || got === undefined || Math.abs(Math.log(got / wanted)) < Math.log(1.6)) continue
    const unit = part.startsWith('R') ? 'Ω' : 'F'
    const own = part.startsWith('R') ? options.ownResistors : options.ownCapacitors
    const cause = own ? 'the values in stock allow' : 'the size limits allow'
    sentences.push(
      `${part} would be ${formatQuantity(wanted, unit)}; ${cause} ${formatQuantity(got, unit)}. Another upper divider resistor R1 moves all sizes.`,
    )
  }
  return sentences
}
