/**
 * The compensator wizard: the window for the crossover, a suggestion, networks by two methods in preferred values,
 * their margins at every corner of line and load, and a plain no where nothing can work.
 */
import type { DesignDocument } from '../document'
import { closeLoop } from '../loop/closedLoop'
import { stepResponse } from '../loop/stepResponse'
import { eigenvalues } from '../numeric/eigen'
import { describeNetworkRoots } from '../loop/networkRoles'
import { invalid, parseDesign, problemsOf } from '../parse'
import { formatQuantity } from '../quantities'
import { closedLoopMap } from '../simulation/closedOrbit'
import type { CompensatorProposals, Proposal } from '../results'
import { boostFor, goalAt, type Attempt, type AttemptRequest, type Goal } from './attempts'
import { bothMethods, chooseCrossover, type Choice } from './chooseCrossover'
import { readCorners, summariseCorners } from './cornerMargins'
import { openCorners, type CornerPlants } from './cornerPlants'
import { buildNetwork, networkRoots, networkStateSpace, type Network } from './networks'
import { attemptFastest, attemptOptimised } from './optimised'
import { CompensatorOptions, type CompensatorOptionsInput } from './options'
import { pairRoots, placeNetwork } from './placement'
import { marginSlack, quickMargins } from './quickMargins'
import { networkReasons, shortfalls, suggestionReasons } from './sentences'
import { sizeAttempt } from './sizing'
import { snapNetwork, stockOf, type Stock } from './snapping'
import { crossoverWindow } from './window'

/**
 * @param design - a design document, checked here.
 * @param options - see `CompensatorOptions`; left out, the wizard chooses.
 * @throws DesignError at the field that is wrong; for an amplifier or a topology that cannot be computed; for a corner of
 * line and load that the power stage cannot reach.
 */
export function proposeCompensator(design: unknown, options: CompensatorOptionsInput = {}): CompensatorProposals {
  const document = parseDesign(design)
  const checked = parseOptions(options)
  const stock = stockOf(checked)
  checkAmplifier(document)
  const plants = openCorners(document)
  const window = crossoverWindow(plants)
  const refused = (refusal: string): CompensatorProposals => ({ window, suggestion: null, proposals: [], refusal })
  const unstable = unstableOrbit(plants)
  if (unstable !== null) return refused(unstable)

  const fixedUpper = document.compensator?.parts.R1
  const upperResistance = fixedUpper || document.sense.upperResistance
  const { limits } = checked
  const mayMove = !fixedUpper && document.amplifier.kind === 'op-amp'
  const size = (attempt: Attempt) => (mayMove ? sizeAttempt(plants, attempt, limits, stock.resistors) : attempt)
  const wanted = checked.crossover ?? document.targets.crossover
  const type = checked.type ?? null
  const { placement } = checked
  const byHand = (goal: Goal) => size(attemptByHand(plants, upperResistance, goal, placement!))
  // Zeros and poles placed by hand at a crossover of one's own are taken as they are; their margins say the rest.
  const choice: Choice =
    placement && wanted !== null && wanted < document.switchingFrequency / 2
      ? { kind: 'choice', attempts: [byHand(goalAt(plants, 2 * Math.PI * wanted))], how: 'wanted' }
      : chooseCrossover({ plants, window, upperResistance, wanted, type, limits, size })
  if (choice.kind === 'refusal') return refused(choice.message)
  const { goal } = choice.attempts[0]
  const attempts = placement
    ? [byHand(goal)]
    : withOptimised({ plants, upperResistance, goal, type }, choice.attempts, size)
  const fastest =
    checked.aim === 'crossover' && choice.how === 'highest'
      ? attemptFastest(
          { plants, upperResistance, goal, type },
          2 * Math.PI * window.upper,
          (other) => bothMethods({ plants, upperResistance, type, size }, other) ?? [],
        )
      : null
  const first = fastest ? size(fastest) : choice.attempts[0]
  const evaluated = [...(fastest ? [first] : []), ...attempts].map((attempt) =>
    evaluate(plants, attempt, { stock, options: checked, window, byHand: placement !== undefined }),
  )
  return {
    window,
    suggestion: {
      crossover: first.goal.omega / (2 * Math.PI),
      type: first.ideal.type,
      phaseBoost: boostFor(first.goal, document.targets.phaseMargin),
      reasons: suggestionReasons(plants, window, { ...choice, attempts: [first] }, type !== null),
    },
    proposals: explainedGain(evaluated).sort(byMerit(document, first.goal.omega / (2 * Math.PI))),
    refusal: null,
  }
}

/** Degrees. */
const LITTLE_GAIN = 0.5

function parseOptions(options: unknown): CompensatorOptions {
  const result = CompensatorOptions.safeParse(options)
  if (result.success) return result.data
  throw invalid(
    problemsOf(result.error).map(({ field, message }) => ({ field: field ? `options.${field}` : 'options', message })),
  )
}

/** Refuses an amplifier or a divider that cannot be computed before anything else is. */
function checkAmplifier(design: DesignDocument): void {
  buildNetwork(design, { type: 'II', parts: { R2: 1e3, C1: 1e-9 } })
}

/** Current mode that oscillates by itself cannot be cured by the voltage loop. */
function unstableOrbit({ corners }: CornerPlants): string | null {
  const found = corners
    .filter(({ plant }) => !plant.periodMap.isStable && plant.periodMap.slopeNeeded !== null)
    .sort((a, b) => b.plant.periodMap.slopeNeeded! - a.plant.periodMap.slopeNeeded!)[0]
  if (!found) return null
  const slope = formatQuantity(found.plant.periodMap.slopeNeeded!, 'V/s')
  const [line, load] = [formatQuantity(found.lineVoltage, 'V'), formatQuantity(found.outputCurrent, 'A')]
  return `At ${line} and ${load} the current loop oscillates at half the switching frequency by itself (subharmonic oscillation), and no voltage loop can cure that. It takes a slope compensation above ${slope}.`
}

/** @throws DesignError at the placement when its zeros and poles make no network. */
function attemptByHand(
  plants: CornerPlants,
  upperResistance: number,
  goal: Goal,
  { zeros, poles }: NonNullable<CompensatorOptions['placement']>,
): Attempt {
  const placement = pairRoots(zeros, poles)
  const ideal = 'kind' in placement ? placement : placeNetwork(plants.design, upperResistance, placement, goal)
  if (ideal.kind === 'problem') throw invalid([{ field: 'options.placement', message: ideal.message }])
  return { method: 'placed', goal, ideal, ...quickMargins(plants, ideal.network, plants.design.targets) }
}

/** The attempts at the goal's crossover with the optimised one beside them. */
function withOptimised(
  request: AttemptRequest,
  attempts: readonly Attempt[],
  size: (attempt: Attempt) => Attempt,
): readonly Attempt[] {
  const here = attempts.filter(({ goal }) => goal.omega === request.goal.omega)
  const optimised = attemptOptimised(request, here)
  return optimised ? [size(optimised), ...attempts] : attempts
}

interface Evaluation {
  readonly stock: Stock
  readonly options: CompensatorOptions
  readonly window: CompensatorProposals['window']
  readonly byHand: boolean
}

function evaluate(plants: CornerPlants, attempt: Attempt, { stock, options, window, byHand }: Evaluation): Proposal {
  const { ideal, goal, method } = attempt
  const { parts, network } = snapNetwork(plants, ideal, goal.omega, stock)
  const read = readCorners(plants, network)
  const margins = {
    ideal: summariseCorners(readCorners(plants, ideal.network), plants),
    preferred: summariseCorners(read, plants),
  }
  const { poles, zeros } = networkRoots(network)
  const roots = describeNetworkRoots(network, poles, zeros)
  return {
    type: ideal.type,
    method,
    crossover: goal.omega / (2 * Math.PI),
    parts: { ideal: ideal.parts, preferred: parts },
    poles: roots.compensatorPoles,
    zeros: roots.compensatorZeros,
    margins,
    loadStepDip: loadStepDip(plants, network),
    reasons: networkReasons(plants, { attempt, margins, options, byHand }),
    shortfalls: [
      ...shortfalls(plants, window, read, { ideal: ideal.parts, preferred: parts, options }),
      ...switchingShortfall(plants, network),
    ],
  }
}

/** A corner whose switched loop is unstable although its margins may look fine. */
function switchingShortfall({ corners }: CornerPlants, network: Network): string[] {
  const found = corners.find(
    ({ plant }) => plant.periodMap.isStable && !closedLoopMap(plant.circuit, plant.orbit, network).isStable,
  )
  if (!found) return []
  const [line, load] = [formatQuantity(found.lineVoltage, 'V'), formatQuantity(found.outputCurrent, 'A')]
  return [
    `At ${line} and ${load} the switched loop itself is unstable: more ripple reaches the comparator than its ramp can bear. Take a lower crossover, a larger ramp or less output ripple.`,
  ]
}

/** Says so where moving zeros and poles brings next to nothing over the K factor. */
function explainedGain(proposals: readonly Proposal[]): Proposal[] {
  const worst = (proposal: Proposal | undefined) => proposal?.margins.ideal.worst.phaseMargin ?? null
  return proposals.map((proposal) => {
    const { crossover } = proposal
    const byFactor = worst(proposals.find((other) => other.method === 'k-factor' && other.crossover === crossover))
    const own = worst(proposal)
    if (proposal.method !== 'optimised' || own === null || byFactor === null || own >= byFactor + LITTLE_GAIN)
      return proposal
    const reason =
      'The K-factor network stands already where the most phase is: its zeros and poles are as far apart as a slow tail and the ripple allow.'
    return { ...proposal, reasons: [...proposal.reasons, reason] }
  })
}

/** Averaged model, nominal line: half of the load range added at its middle. */
function loadStepDip({ design, corners: [nominal] }: CornerPlants, network: Network): number | null {
  const system = closeLoop(nominal.plant.model, networkStateSpace(network))
  if (eigenvalues(system.A).some(({ re }) => re >= 0)) return null
  const { currentMinimum, currentMaximum } = design.output
  const size = (currentMaximum - currentMinimum) / 2 || currentMaximum / 10
  return stepResponse(system, 1, size, 10 / design.switchingFrequency).peakDeviation
}

/** At the suggested crossover first; there those that hold, then the one with more margin at its worst corner. */
const byMerit =
  ({ targets }: DesignDocument, suggested: number) =>
  (a: Proposal, b: Proposal): number => {
    const elsewhere = (proposal: Proposal) => Number(proposal.crossover !== suggested)
    const slack = (proposal: Proposal) => marginSlack(proposal.margins.preferred.worst, targets)
    return elsewhere(a) - elsewhere(b) || a.shortfalls.length - b.shortfalls.length || slack(b) - slack(a)
  }
