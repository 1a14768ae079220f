/**
 * From zeros and poles to parts. Besides its pole at the origin a network has up to two pairs: the feedback pair
 * (R2, C1, C2; types II and III) and the lead pair across the upper divider resistor (R3, C3; type III).
 *
 *   ideal op-amp       G = main·lead/(s·R1·(C1 + C2))
 *   transconductance   G = gm·(Vref/V)·main·lead/(s·(C1 + C2))
 *   main, lead         (1 + s/ωz)/(1 + s/ωp)
 *
 * Real amplifiers depart from this at crossover; the size of the capacitors is corrected until the exact network has
 * the wanted gain there. Source of the ideal expressions: Venable, "The K factor", Powercon 10, 1983.
 */
import type { CompensatorType } from '../document'
import { modulus } from '../numeric/complex'
import type { PartValues } from '../results'
import { buildNetwork, lowerRatio, networkGain, type AmplifierSetting, type Network } from './networks'

/** Hz. Without a pole, C2 is not fitted. */
export interface MainPair {
  readonly zero: number
  readonly pole: number | null
}
/** Hz; the pole lies above the zero. */
export interface LeadPair {
  readonly zero: number
  readonly pole: number
}
/** No pair makes type I, the main pair type II, both type III. */
export interface Placement {
  readonly main: MainPair | null
  readonly lead: LeadPair | null
}

/** What the network has to do at crossover. */
export interface CrossoverGain {
  readonly omega: number // rad/s
  readonly gain: number // |G| wanted there
}

export interface SynthesisedNetwork {
  readonly kind: 'network'
  readonly type: CompensatorType
  readonly parts: PartValues
  readonly network: Network
}
export interface SynthesisProblem {
  readonly kind: 'problem'
  readonly message: string
}
export type Synthesis = SynthesisedNetwork | SynthesisProblem

export const synthesisProblem = (message: string): SynthesisProblem => ({ kind: 'problem', message })

const TAU = 2 * Math.PI
/** Of the exact gain at crossover; also a thousandth of what a part's last digit is worth. */
const GAIN_TOLERANCE = 1e-10
const MOST_CORRECTIONS = 60

/** The type that a placement makes. */
function typeOf({ main, lead }: Placement): CompensatorType {
  if (lead !== null) return 'III'
  return main === null ? 'I' : 'II'
}

/**
 * The upper limit to the ratio of lead pole to lead zero: with an op-amp there is none, with a transconductance
 * amplifier the divider sets it, because R3 cannot pull the feedback node beyond the output: V/Vref.
 */
export function largestLeadRatio(setting: AmplifierSetting): number {
  return setting.amplifier.kind === 'transconductance' ? 1 + 1 / lowerRatio(setting) : Infinity
}

/**
 * Sorts zeros and poles placed by hand (Hz) into pairs. Of two ways to pair them the one with the closer lead pair
 * is taken: its R3 is larger and a transconductance amplifier's divider can follow it.
 */
export function pairRoots(zeros: readonly number[], poles: readonly number[]): Placement | SynthesisProblem {
  if (zeros.length === 0 && poles.length === 0) return { main: null, lead: null }
  if (zeros.length === 0) return synthesisProblem('A pole needs a zero below it; give at least one zero.')
  if (zeros.length === 1) {
    if (poles.length > 1) return synthesisProblem('One zero goes with one pole; give a second zero, or one pole only.')
    const [zero, pole] = [zeros[0]!, poles[0] ?? null]
    if (pole !== null && pole <= zero) return synthesisProblem('The pole must lie above the zero.')
    return { main: { zero, pole }, lead: null }
  }
  if (poles.length === 0) return synthesisProblem('Two zeros need at least one pole above them.')
  const options = [0, 1].flatMap((leadZero) =>
    poles.map((pole, leadPole): Placement => {
      const other = poles.length > 1 ? poles[1 - leadPole]! : null
      return { main: { zero: zeros[1 - leadZero]!, pole: other }, lead: { zero: zeros[leadZero]!, pole } }
    }),
  )
  const possible = options.filter(
    ({ main, lead }) => lead!.pole > lead!.zero && (main!.pole === null || main!.pole > main!.zero),
  )
  if (possible.length === 0) return synthesisProblem('Each zero needs a pole above it.')
  const ratio = ({ lead }: Placement) => lead!.pole / lead!.zero
  return possible.reduce((best, option) => (ratio(option) < ratio(best) ? option : best))
}

/** The network with these zeros and poles that has the wanted gain at crossover, the amplifier's limits included. */
export function placeNetwork(
  setting: AmplifierSetting,
  upperResistance: number,
  placement: Placement,
  wanted: CrossoverGain,
): Synthesis {
  let asked = wanted.gain
  for (let i = 0; i < MOST_CORRECTIONS; i++) {
    const synthesis = idealNetwork(setting, upperResistance, placement, { ...wanted, gain: asked })
    if (synthesis.kind === 'problem') return synthesis
    const ratio = wanted.gain / modulus(networkGain(synthesis.network, wanted.omega))
    if (Math.abs(ratio - 1) < GAIN_TOLERANCE) return synthesis
    asked *= ratio
  }
  return synthesisProblem(amplifierTooSlow(wanted))
}

/** The zeros and poles that a network's parts make, the amplifier taken as ideal. */
export function placementOf(setting: AmplifierSetting, { R1, R2, R3, C1, C2, C3 }: PartValues): Placement {
  if (setting.amplifier.kind === 'shunt-optocoupler' && R1 !== undefined && C1 !== undefined) {
    const { pullUpResistance, ledResistance } = setting.amplifier
    return {
      main: { zero: 1 / (TAU * (R1 + (R2 ?? 0)) * C1), pole: C2 ? 1 / (TAU * pullUpResistance * C2) : null },
      lead: R3 && C3 ? { zero: 1 / (TAU * (ledResistance + R3) * C3), pole: 1 / (TAU * R3 * C3) } : null,
    }
  }
  const main =
    R2 === undefined || C1 === undefined
      ? null
      : { zero: 1 / (TAU * R2 * C1), pole: C2 ? (C1 + C2) / (TAU * R2 * C1 * C2) : null }
  if (R1 === undefined || R3 === undefined || C3 === undefined) return { main, lead: null }
  const lead = { zero: 1 / (TAU * (R1 + R3) * C3), pole: 1 / (TAU * (R3 + behindLead(setting, R1)) * C3) }
  return { main, lead }
}

export function amplifierTooSlow({ omega, gain }: CrossoverGain): string {
  const kilohertz = (omega / TAU / 1e3).toPrecision(3)
  return `The amplifier cannot give a gain of ${gain.toPrecision(3)} at ${kilohertz} kHz with the phase that is needed.`
}

/** The textbook network: exact for an amplifier without limits. */
export function idealNetwork(
  setting: AmplifierSetting,
  upperResistance: number,
  placement: Placement,
  { omega, gain }: CrossoverGain,
): Synthesis {
  const { main, lead } = placement
  if (setting.amplifier.kind === 'shunt-optocoupler')
    return optocouplerNetwork(setting, setting.amplifier, upperResistance, placement, { omega, gain })
  const shape = pairGain(main, omega) * pairGain(lead, omega)
  const total = (integratorConductance(setting, upperResistance) * shape) / (omega * gain)
  const feedback = main === null ? { C1: total } : feedbackParts(main, total)
  const across = lead === null ? {} : leadParts(setting, upperResistance, lead)
  if (across === null) {
    const most = largestLeadRatio(setting).toPrecision(3)
    return synthesisProblem(
      `With this divider a transconductance amplifier allows a lead pole of at most ${most} times its zero (output over reference voltage).`,
    )
  }
  const type = typeOf(placement)
  const parts = { R1: upperResistance, ...feedback, ...across }
  return { kind: 'network', type, parts, network: buildNetwork(setting, { type, parts }) }
}

/**
 * Type II and III of a shunt reference with an optocoupler. Its fast lane alone has a gain of CTR·R_pull/R_LED, which the
 * network can raise but not lower.
 */
function optocouplerNetwork(
  setting: AmplifierSetting,
  amplifier: Extract<AmplifierSetting['amplifier'], { kind: 'shunt-optocoupler' }>,
  R1: number,
  placement: Placement,
  { omega, gain }: CrossoverGain,
): Synthesis {
  const { main, lead } = placement
  if (main === null)
    return synthesisProblem('A shunt reference with an optocoupler has no type I; its LED adds a zero.')
  const { currentTransferRatio, pullUpResistance, ledResistance } = amplifier
  const fastLane = (currentTransferRatio * pullUpResistance) / ledResistance
  const C1 = (fastLane * pairGain(main, omega) * pairGain(lead, omega)) / (omega * gain * R1)
  const R2 = 1 / (TAU * main.zero * C1) - R1
  if (R2 < 0) {
    const least = (ledResistance * R1) / (R1 + R2)
    return synthesisProblem(
      `The optocoupler’s fast lane alone has more gain than the crossover allows; the LED resistor would have to be about ${least.toPrecision(2)} Ω, as far as its bias permits, or the crossover higher.`,
    )
  }
  const C2 = main.pole === null ? undefined : 1 / (TAU * main.pole * pullUpResistance)
  const R3 = lead && ledResistance / (lead.pole / lead.zero - 1)
  const parts: PartValues = {
    R1,
    R2,
    C1,
    ...(C2 !== undefined && { C2 }),
    ...(R3 !== null && lead !== null && { R3, C3: 1 / (TAU * lead.pole * R3) }),
  }
  const type = typeOf(placement)
  return { kind: 'network', type, parts, network: buildNetwork(setting, { type, parts }) }
}

function pairGain(pair: MainPair | null, omega: number): number {
  if (pair === null) return 1
  const rise = Math.hypot(1, omega / (TAU * pair.zero))
  return pair.pole === null ? rise : rise / Math.hypot(1, omega / (TAU * pair.pole))
}

/** Current into the capacitors per volt at the output, at low frequency. */
function integratorConductance(setting: AmplifierSetting, upperResistance: number): number {
  const { amplifier, sense, output } = setting
  if (amplifier.kind !== 'transconductance') return 1 / upperResistance
  return (amplifier.transconductance * sense.referenceVoltage) / output.voltage
}

function feedbackParts({ zero, pole }: MainPair, total: number): PartValues {
  const C2 = pole === null ? 0 : (total * zero) / pole
  const C1 = total - C2
  return { R2: 1 / (TAU * zero * C1), C1, ...(C2 > 0 && { C2 }) }
}

function leadParts(setting: AmplifierSetting, upperResistance: number, { zero, pole }: LeadPair): PartValues | null {
  const ratio = pole / zero
  const behind = behindLead(setting, upperResistance)
  const R3 = (upperResistance - ratio * behind) / (ratio - 1)
  return R3 > 0 ? { R3, C3: 1 / (TAU * pole * (R3 + behind)) } : null
}

/** Ω that R3's far end sees: the summing point of an op-amp is ground, that of a transconductance amplifier its divider. */
function behindLead(setting: AmplifierSetting, upperResistance: number): number {
  if (setting.amplifier.kind !== 'transconductance') return 0
  return 1 / (1 / upperResistance + 1 / (upperResistance * lowerRatio(setting)))
}
