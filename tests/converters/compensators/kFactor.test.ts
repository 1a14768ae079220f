import * as fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { boostOf, kFactor, kFactorNetwork } from '@/converters/compensators/kFactor'
import { networkGain, networkRoots, type AmplifierSetting } from '@/converters/compensators/networks'
import { pairRoots, placeNetwork, type SynthesisedNetwork } from '@/converters/compensators/placement'
import { modulus } from '@/converters/numeric/complex'

const TAU = 2 * Math.PI
const opAmp = { kind: 'op-amp', gainBandwidth: 10e6, openLoopGain: 1e4 } as const
const transconductance = { kind: 'transconductance', transconductance: 1e-3, outputResistance: 1e6 } as const
const settingOf = (amplifier: AmplifierSetting['amplifier'], voltage = 3.3): AmplifierSetting => ({
  amplifier,
  sense: { referenceVoltage: 0.8, upperResistance: 10e3 },
  output: { voltage, currentMinimum: 0.5, currentMaximum: 8 },
})
const ideal = settingOf({ ...opAmp, gainBandwidth: 1e12, openLoopGain: 1e12 })

describe('the K factor', () => {
  // Venable 1983: K = tan(boost/2 + 45°) and tan²(boost/4 + 45°). Printed to two decimals, recomputed from the half-angle
  // identities K(II) = (1 + sin b)/cos b and √K(III) = (1 + sin b/2)/cos(b/2), a second road to the same numbers.
  it.each([0, 10, 20, 30, 40, 45, 50, 60, 70, 80, 85, 89])(
    'of type II for %d° follows the half-angle identity',
    (boost) => {
      const b = (boost * Math.PI) / 180
      expect(kFactor('II', boost) / ((1 + Math.sin(b)) / Math.cos(b))).toBeCloseTo(1, 12)
    },
  )

  it.each([0, 20, 45, 60, 90, 120, 150, 170, 179])('of type III for %d° follows the half-angle identity', (boost) => {
    const half = (boost * Math.PI) / 360
    expect(kFactor('III', boost) / ((1 + Math.sin(half)) / Math.cos(half)) ** 2).toBeCloseTo(1, 12)
  })

  it.each([
    ['II', 0, 1],
    ['II', 30, 1.73],
    ['II', 45, 2.41],
    ['II', 60, 3.73],
    ['II', 80, 11.43],
    ['III', 0, 1],
    ['III', 60, 3],
    ['III', 90, 5.83],
    ['III', 120, 13.93],
    ['III', 160, 130.65],
  ] as const)('of type %s for %d° is %d', (type, boost, K) => {
    // Figures of the K-factor chart in Venable 1983, from memory; to the decimals printed here.
    expect(kFactor(type, boost)).toBeCloseTo(K, 2)
  })
})

describe('a K-factor network', () => {
  it('with an ideal amplifier has its zero and pole at f/K and f·K', () => {
    const target = { omega: TAU * 20e3, gain: 5, boostDeg: 60 }
    const { network } = kFactorNetwork(ideal, 10e3, 'II', target) as SynthesisedNetwork
    const K = 2 + Math.sqrt(3) // tan 75°
    const { poles, zeros } = networkRoots(network)
    // The amplifier's own part is ω·gain/(2π·GBW), 1e-7 here, and its correction a few times that.
    expect((modulus(zeros[0]!) * K) / target.omega).toBeCloseTo(1, 5)
    const pole = poles.map(modulus).sort((a, b) => a - b)[1]!
    expect(pole / K / target.omega).toBeCloseTo(1, 4)
  })

  it('with an ideal amplifier has the parts of the published procedure', () => {
    // Venable 1983, type 2: C2 = 1/(2πf·G·K·R1), C1 = C2(K² − 1), R2 = K/(2πf·C1).
    const [f, gain, R1] = [20e3, 5, 10e3]
    const K = Math.tan((75 * Math.PI) / 180)
    const C2 = 1 / (TAU * f * gain * K * R1)
    const C1 = C2 * (K ** 2 - 1)
    const { parts } = kFactorNetwork(ideal, R1, 'II', { omega: TAU * f, gain, boostDeg: 60 }) as SynthesisedNetwork
    for (const [part, value] of [
      ['C2', C2],
      ['C1', C1],
      ['R2', K / (TAU * f * C1)],
    ] as const) {
      expect(parts[part]! / value).toBeCloseTo(1, 5)
    }
    // Type 3: C2 = 1/(2πf·G·R1), C1 = C2(K − 1), R2 = √K/(2πf·C1), R3 = R1/(K − 1), C3 = 1/(2πf·√K·R3).
    const three = kFactorNetwork(ideal, R1, 'III', { omega: TAU * f, gain, boostDeg: 120 }) as SynthesisedNetwork
    const K3 = Math.tan((75 * Math.PI) / 180) ** 2
    const C = 1 / (TAU * f * gain * R1)
    expect(three.parts.C2! / C).toBeCloseTo(1, 5)
    expect(three.parts.C1! / (C * (K3 - 1))).toBeCloseTo(1, 5)
    expect(three.parts.R2! / (Math.sqrt(K3) / (TAU * f * C * (K3 - 1)))).toBeCloseTo(1, 5)
    expect(three.parts.R3! / (R1 / (K3 - 1))).toBeCloseTo(1, 5)
    expect(three.parts.C3! / ((K3 - 1) / (TAU * f * Math.sqrt(K3) * R1))).toBeCloseTo(1, 5)
  })

  it('has the wanted gain and boost at crossover in spite of its real amplifier', () => {
    const boost = fc.double({ min: 5, max: 75, noNaN: true })
    fc.assert(
      fc.property(
        fc.constantFrom(opAmp, transconductance),
        fc.constantFrom('II' as const, 'III' as const),
        fc.double({ min: 1e3, max: 60e3, noNaN: true }),
        fc.double({ min: 0.1, max: 8, noNaN: true }),
        boost,
        (amplifier, type, f, gain, boostDeg) => {
          const target = { omega: TAU * f, gain, boostDeg }
          const synthesis = kFactorNetwork(settingOf(amplifier), 10e3, type, target)
          if (synthesis.kind === 'problem') throw new Error(synthesis.message)
          expect(modulus(networkGain(synthesis.network, target.omega)) / gain).toBeCloseTo(1, 6)
          expect(Math.abs(boostOf(synthesis.network, target.omega) - boostDeg)).toBeLessThan(0.01)
        },
      ),
    )
  })

  it('of type III reaches 110° even where a divider limits the lead', () => {
    const target = { omega: TAU * 20e3, gain: 2, boostDeg: 110 }
    const { network } = kFactorNetwork(settingOf(transconductance), 10e3, 'III', target) as SynthesisedNetwork
    expect(Math.abs(boostOf(network, target.omega) - 110)).toBeLessThan(0.01)
  })

  it.each([
    ['more than its type has', opAmp, 'II', { omega: TAU * 20e3, gain: 2, boostDeg: 95 }, /type II.*95°/],
    [
      'more than a slow amplifier leaves',
      { ...opAmp, gainBandwidth: 200e3 },
      'II',
      { omega: TAU * 50e3, gain: 2, boostDeg: 80 },
      /amplifier/,
    ],
    [
      'more gain than the amplifier has',
      { ...opAmp, gainBandwidth: 200e3 },
      'III',
      { omega: TAU * 50e3, gain: 50, boostDeg: 60 },
      /amplifier/,
    ],
  ] as const)('says in words when asked for %s', (_, amplifier, type, target, message) => {
    const synthesis = kFactorNetwork(settingOf(amplifier), 10e3, type, target)
    expect(synthesis).toMatchObject({ kind: 'problem', message: expect.stringMatching(message) })
  })
})

describe('zeros and poles placed by hand', () => {
  it('give the lead network of a published buck regulator', () => {
    // Erickson and Maksimović, Fundamentals of Power Electronics, 2nd ed., section 9.5.4: 52° at 5 kHz needs
    // fz = fc·√((1 − sin θ)/(1 + sin θ)) ≈ 1.7 kHz and fp ≈ 14.5 kHz. The numbers are printed to two figures.
    const theta = (52 * Math.PI) / 180
    const ratio = Math.sqrt((1 - Math.sin(theta)) / (1 + Math.sin(theta)))
    const [zero, pole] = [5e3 * ratio, 5e3 / ratio]
    expect(zero).toBeCloseTo(1.7e3, -2)
    expect(pole).toBeCloseTo(14.5e3, -2)
    // As the main pair of a type II network the same pair lifts an integrator by 52° at 5 kHz.
    const omega = TAU * 5e3
    const placed = placeNetwork(ideal, 10e3, { main: { zero, pole }, lead: null }, { omega, gain: 3 })
    const { network } = placed as SynthesisedNetwork
    expect(boostOf(network, omega)).toBeCloseTo(52, 4)
    expect(modulus(networkGain(network, omega))).toBeCloseTo(3, 8)
    // tan(52°/2 + 45°) is the same ratio by another road.
    expect(kFactor('II', 52)).toBeCloseTo(pole / 5e3, 9)
  })

  it.each([
    ['op-amp', ideal] as const,
    ['transconductance', settingOf({ ...transconductance, outputResistance: 1e9 }, 12)] as const,
  ])('are the roots of the network that comes out: %s', (_, setting) => {
    const placement = { main: { zero: 3e3, pole: 90e3 }, lead: { zero: 5e3, pole: 40e3 } }
    const placed = placeNetwork(setting, 10e3, placement, { omega: TAU * 20e3, gain: 3 }) as SynthesisedNetwork
    const { poles, zeros } = networkRoots(placed.network)
    const hertz = (roots: typeof poles) => roots.map((root) => modulus(root) / TAU).sort((a, b) => a - b)
    hertz(zeros).forEach((zero, i) => expect(zero / [3e3, 5e3][i]!).toBeCloseTo(1, 3))
    // What the amplifier moves is below a part in a thousand with these limits.
    hertz(poles)
      .slice(1, 3)
      .forEach((pole, i) => expect(pole / [40e3, 90e3][i]!).toBeCloseTo(1, 3))
  })

  it('without a second pole leave C2 out', () => {
    const placement = pairRoots([2e3], [])
    expect(placement).toEqual({ main: { zero: 2e3, pole: null }, lead: null })
    if ('kind' in placement) throw new Error(placement.message)
    const placed = placeNetwork(ideal, 10e3, placement, { omega: TAU * 20e3, gain: 1 }) as SynthesisedNetwork
    expect(placed.type).toBe('II')
    expect(placed.parts.C2).toBeUndefined()
  })

  it.each([
    [[], [5e3], /needs a zero/],
    [[5e3], [2e3], /above the zero/],
    [[5e3], [6e3, 9e3], /second zero/],
    [[5e3, 6e3], [], /at least one pole/],
    [[5e3, 6e3], [1e3, 2e3], /pole above/],
  ])('zeros %j and poles %j are refused in words', (zeros, poles, message) => {
    expect(pairRoots(zeros, poles)).toMatchObject({ kind: 'problem', message: expect.stringMatching(message) })
  })

  it('say what a divider allows when a lead is too wide for it', () => {
    const placement = { main: { zero: 3e3, pole: 90e3 }, lead: { zero: 5e3, pole: 40e3 } }
    const placed = placeNetwork(settingOf(transconductance), 10e3, placement, { omega: TAU * 20e3, gain: 3 })
    expect(placed).toMatchObject({ kind: 'problem', message: expect.stringContaining('4.13') })
  })
})
