import { execFileSync } from 'node:child_process'
import * as fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  buildNetwork,
  networkGain,
  networkRoots,
  networkStateSpace,
  type AmplifierSetting,
  type CompensatorChoice,
} from '@/converters/compensators/networks'
import type { StateSpace } from '@/converters/compensators/stateSpace'
import { DesignError } from '@/converters/errors'
import { add, complex, divide, modulus, multiply, subtract, type Complex } from '@/converters/numeric/complex'

const TAU = 2 * Math.PI
const output = { voltage: 3.3, currentMinimum: 0.5, currentMaximum: 8 }
const sense = { referenceVoltage: 0.8, upperResistance: 10e3 }
const opAmp = { kind: 'op-amp', gainBandwidth: 10e6, openLoopGain: 1e4 } as const
const transconductance = { kind: 'transconductance', transconductance: 1e-3, outputResistance: 1e6 } as const
const typeThree: CompensatorChoice = {
  type: 'III',
  parts: { R2: 4.7e3, R3: 220, C1: 4.7e-9, C2: 100e-12, C3: 1.5e-9 },
}

function relativeError(actual: Complex, expected: Complex): number {
  return modulus(subtract(actual, expected)) / modulus(expected)
}

/** Impedances in series and parallel, as the circuit diagram shows them: the independent road to the same gain. */
const parallel = (a: Complex, b: Complex): Complex => divide(multiply(a, b), add(a, b))
const capacitor = (omega: number, C: number): Complex => complex(0, -1 / (omega * C))

function gainFromImpedances(setting: AmplifierSetting, { type, parts }: CompensatorChoice, omega: number): Complex {
  const R1 = parts.R1 || setting.sense.upperResistance
  const { referenceVoltage } = setting.sense
  const lower = complex((R1 * referenceVoltage) / (setting.output.voltage - referenceVoltage))
  const lead = () => add(complex(parts.R3!), capacitor(omega, parts.C3!))
  const upper = type === 'III' ? parallel(complex(R1), lead()) : complex(R1)
  const C1 = capacitor(omega, parts.C1!)
  const series = type === 'I' ? C1 : add(complex(parts.R2!), C1)
  const branch = type !== 'I' && parts.C2 ? parallel(series, capacitor(omega, parts.C2)) : series
  const { amplifier } = setting
  if (amplifier.kind === 'transconductance') {
    const divider = divide(lower, add(lower, upper))
    const drive = multiply(complex(amplifier.transconductance), divider)
    return multiply(drive, parallel(branch, complex(amplifier.outputResistance)))
  }
  if (amplifier.kind !== 'op-amp') throw new Error('no such amplifier here')
  const { openLoopGain, gainBandwidth } = amplifier
  const A = divide(complex(openLoopGain), complex(1, (omega * openLoopGain) / (TAU * gainBandwidth)))
  const error = divide(add(complex(1), divide(branch, parallel(upper, lower))), A)
  return divide(divide(branch, upper), add(complex(1), error))
}

/** C·(jω − A)⁻¹·B + D by Gaussian elimination with pivoting. */
function gainFromStates({ A, B, C, D }: StateSpace, omega: number): Complex {
  const rows = A.map((row, i) => [...row.map((a, j) => complex(-a, i === j ? omega : 0)), complex(B[i]![0]!)])
  const n = rows.length
  for (let k = 0; k < n; k++) {
    const pivot = rows
      .slice(k)
      .reduce((best, row, i) => (modulus(row[k]!) > modulus(rows[best]![k]!) ? k + i : best), k)
    ;[rows[k], rows[pivot]] = [rows[pivot]!, rows[k]!]
    for (let i = 0; i < n; i++) {
      if (i === k) continue
      const factor = divide(rows[i]![k]!, rows[k]![k]!)
      rows[i] = rows[i]!.map((value, j) => subtract(value, multiply(factor, rows[k]![j]!)))
    }
  }
  const states = rows.map((row, i) => divide(row[n]!, row[i]!))
  return states.reduce((sum, x, i) => add(sum, multiply(complex(C[0]![i]!), x)), complex(D[0]![0]!))
}

const logarithmic = (from: number, to: number) =>
  fc.double({ min: Math.log10(from), max: Math.log10(to), noNaN: true }).map((exponent) => 10 ** exponent)
const anyCompensator = fc.record({
  type: fc.constantFrom('I' as const, 'II' as const, 'III' as const),
  parts: fc.record({
    R1: logarithmic(1e3, 1e6),
    R2: logarithmic(100, 1e6),
    R3: logarithmic(10, 1e5),
    C1: logarithmic(10e-12, 1e-6),
    C2: fc.oneof(fc.constant(0), logarithmic(1e-12, 1e-7)),
    C3: logarithmic(10e-12, 1e-7),
  }),
})
const anyAmplifier = fc.oneof(
  fc.record({
    kind: fc.constant('op-amp' as const),
    gainBandwidth: logarithmic(1e5, 1e9),
    openLoopGain: logarithmic(100, 1e7),
  }),
  fc.record({
    kind: fc.constant('transconductance' as const),
    transconductance: logarithmic(1e-5, 1e-2),
    outputResistance: logarithmic(1e4, 1e8),
  }),
)

describe('the gain of an error amplifier', () => {
  it('is that of its impedances, over frequency, for any parts', () => {
    fc.assert(
      fc.property(anyCompensator, anyAmplifier, logarithmic(1, 1e7), (compensator, amplifier, frequency) => {
        const setting = { amplifier, sense, output }
        const gain = networkGain(buildNetwork(setting, compensator), TAU * frequency)
        expect(relativeError(gain, gainFromImpedances(setting, compensator, TAU * frequency))).toBeLessThan(1e-9)
      }),
    )
  })

  it('is that of its state equations, over frequency, for any parts', () => {
    // Time constants go down to 0.1 ns, so below 1 kHz the rounding of the matrix itself comes near the tolerance.
    fc.assert(
      fc.property(anyCompensator, anyAmplifier, logarithmic(1e3, 1e7), (compensator, amplifier, frequency) => {
        const network = buildNetwork({ amplifier, sense, output }, compensator)
        const expected = gainFromStates(networkStateSpace(network), TAU * frequency)
        expect(relativeError(networkGain(network, TAU * frequency), expected)).toBeLessThan(1e-9)
      }),
    )
  })

  it('becomes the ideal Zf/Zi as the amplifier becomes ideal', () => {
    const amplifier = { ...opAmp, gainBandwidth: 1e16, openLoopGain: 1e14 }
    const { R2, C1 } = { R2: 4.7e3, C1: 4.7e-9 }
    const network = buildNetwork({ amplifier, sense, output }, { type: 'II', parts: { R2, C1 } })
    const omega = TAU * 20e3
    const ideal = divide(add(complex(R2), capacitor(omega, C1)), complex(sense.upperResistance))
    // What is left of the amplifier is (1 + Zf/Zi)·ω/GBW, near 1e-10 here.
    expect(relativeError(networkGain(network, omega), ideal)).toBeLessThan(1e-9)
  })

  it('at a low frequency is the open-loop gain times the divider, not an ideal integrator', () => {
    const network = buildNetwork({ amplifier: opAmp, sense, output }, typeThree)
    // G → A₀·Rlower/(R1 + Rlower) = A₀·Vref/V, since no current flows in Zf.
    expect(networkGain(network, 1e-4).re / ((1e4 * 0.8) / 3.3)).toBeCloseTo(1, 6)
    const followed = buildNetwork({ amplifier: transconductance, sense, output }, typeThree)
    // gm·Ro·Vref/V
    expect(networkGain(followed, 1e-4).re / ((1e3 * 0.8) / 3.3)).toBeCloseTo(1, 6)
  })

  it('needs no lower resistor when the output itself is compared with the reference', () => {
    const setting = { amplifier: transconductance, sense: { ...sense, referenceVoltage: 3.3 }, output }
    const gain = networkGain(buildNetwork(setting, { type: 'I', parts: { C1: 10e-9 } }), TAU * 1e3)
    // gm/(1/Ro + jωC1)
    expect(relativeError(gain, divide(complex(1e-3), complex(1e-6, TAU * 1e3 * 10e-9)))).toBeLessThan(1e-12)
  })
})

describe('poles and zeros of an error amplifier', () => {
  const hertz = (roots: readonly Complex[]) => roots.map((root) => modulus(root) / TAU).sort((a, b) => a - b)
  // An amplifier this fast moves the poles of the network by parts in a million only.
  const ideal = { ...opAmp, gainBandwidth: 1e14, openLoopGain: 1e12 }

  it('of type II stand where the textbook has them', () => {
    const [R2, C1, C2] = [4.7e3, 4.7e-9, 100e-12]
    const network = buildNetwork({ amplifier: ideal, sense, output }, { type: 'II', parts: { R2, C1, C2 } })
    const { poles, zeros } = networkRoots(network)
    // Venable 1983, type 2 amplifier: zero 1/(2πR2C1), poles at the origin and (C1 + C2)/(2πR2C1C2).
    expect(hertz(zeros)).toHaveLength(1)
    expect(hertz(zeros)[0]! * TAU * R2 * C1).toBeCloseTo(1, 9)
    expect(hertz(poles)[0]).toBeLessThan(1e-3)
    expect((hertz(poles)[1]! * TAU * R2 * C1 * C2) / (C1 + C2)).toBeCloseTo(1, 5)
  })

  it('of type III stand where the textbook has them', () => {
    const { R2, R3, C1, C2, C3 } = { R2: 4.7e3, R3: 220, C1: 4.7e-9, C2: 100e-12, C3: 1.5e-9 }
    const { poles, zeros } = networkRoots(buildNetwork({ amplifier: ideal, sense, output }, typeThree))
    // Venable 1983, type 3 amplifier: zeros 1/(2πR2C1), 1/(2π(R1 + R3)C3); poles 0, (C1 + C2)/(2πR2C1C2), 1/(2πR3C3).
    const expectedZeros = [1 / (R2 * C1), 1 / ((sense.upperResistance + R3) * C3)].map((w) => w / TAU)
    const expectedPoles = [(C1 + C2) / (R2 * C1 * C2), 1 / (R3 * C3)].map((w) => w / TAU)
    hertz(zeros).forEach((zero, i) => expect(zero / expectedZeros.sort((a, b) => a - b)[i]!).toBeCloseTo(1, 9))
    expectedPoles.sort((a, b) => a - b).forEach((pole, i) => expect(hertz(poles)[i + 1]! / pole).toBeCloseTo(1, 5))
  })

  it('of a transconductance amplifier with lead stand where its divider puts them', () => {
    const { R3, C3 } = { R3: 220, C3: 1.5e-9 }
    const { poles, zeros } = networkRoots(buildNetwork({ amplifier: transconductance, sense, output }, typeThree))
    const R1 = sense.upperResistance
    const lower = (R1 * 0.8) / 2.5
    // H = Rlower/(Rlower + R1 ∥ (R3 + 1/sC3)) has its zero at 1/((R1 + R3)C3), its pole at 1/((R3 + R1 ∥ Rlower)C3).
    const zero = 1 / ((R1 + R3) * C3)
    const pole = 1 / ((R3 + (R1 * lower) / (R1 + lower)) * C3)
    const nearest = (roots: readonly Complex[], omega: number) =>
      Math.min(...roots.map((root) => Math.abs(root.re / -omega - 1)))
    expect(nearest(zeros, zero)).toBeLessThan(1e-9)
    expect(nearest(poles, pole)).toBeLessThan(1e-9)
  })

  it('agree with SciPy on the same state equations', () => {
    const cases = [opAmp, transconductance].map((amplifier) => buildNetwork({ amplifier, sense, output }, typeThree))
    const script = [
      'import json, sys',
      'from scipy import linalg',
      'import numpy as np',
      'answers = []',
      'for s in json.load(sys.stdin):',
      '    A, B, C, D = (np.array(s[k], float) for k in "ABCD")',
      '    # Zeros: finite generalised eigenvalues of the system pencil.',
      '    n = len(A)',
      '    pencil = linalg.eigvals(np.block([[A, B], [C, D]]), np.diag([1.0] * n + [0.0]))',
      '    poles = np.linalg.eigvals(A)',
      '    zeros = pencil[np.isfinite(pencil) & (abs(pencil) < 1e3 * max(abs(poles)))]',
      '    answers.append({"poles": sorted(abs(poles)), "zeros": sorted(abs(zeros)),',
      '        "gain": [[g.real, g.imag] for w in (1e3, 1e5, 1e6)',
      '                 for g in [(C @ linalg.solve(1j * w * np.eye(n) - A, B) + D)[0, 0]]]})',
      'print(json.dumps(answers))',
    ].join('\n')
    const input = JSON.stringify(cases.map(networkStateSpace))
    const answers = JSON.parse(execFileSync('/usr/bin/python3', ['-c', script], { input, encoding: 'utf8' })) as {
      poles: number[]
      zeros: number[]
      gain: [number, number][]
    }[]
    cases.forEach((network, i) => {
      const { poles, zeros } = networkRoots(network)
      const moduli = (roots: readonly Complex[]) => roots.map(modulus).sort((a, b) => a - b)
      // Two eigenvalue solvers on the same unscaled matrix: 1e-6 is what the engine promises for poles and zeros.
      moduli(poles).forEach((pole, k) => expect(pole / answers[i]!.poles[k]!).toBeCloseTo(1, 6))
      expect(zeros).toHaveLength(answers[i]!.zeros.length)
      moduli(zeros).forEach((zero, k) => expect(zero / answers[i]!.zeros[k]!).toBeCloseTo(1, 6))
      answers[i]!.gain.forEach(([re, im], k) => {
        expect(relativeError(networkGain(network, [1e3, 1e5, 1e6][k]!), { re, im })).toBeLessThan(1e-6)
      })
    })
  })
})

describe('a network that cannot be built', () => {
  const build = (setting: Partial<AmplifierSetting>, compensator: CompensatorChoice) => {
    try {
      buildNetwork({ amplifier: opAmp, sense, output, ...setting }, compensator)
    } catch (error) {
      if (error instanceof DesignError) return { code: error.code, field: error.problems[0]?.field }
    }
    return null
  }

  it.each([
    ['I', 'C1', { R2: 1e3 }],
    ['II', 'R2', { C1: 1e-9 }],
    ['II', 'C1', { R2: 1e3, C1: 0 }],
    ['III', 'R3', { R2: 1e3, C1: 1e-9, C2: 1e-10, C3: 1e-9 }],
    ['III', 'C3', { R2: 1e3, C1: 1e-9, R3: 100, C3: null }],
  ] as const)('of type %s names its missing part %s', (type, part, parts) => {
    expect(build({}, { type, parts })).toEqual({ code: 'invalid-compensator', field: `compensator.parts.${part}` })
  })

  it('names the reference that lies above the output', () => {
    const problem = build({ sense: { ...sense, referenceVoltage: 5 } }, typeThree)
    expect(problem).toEqual({ code: 'invalid-document', field: 'sense.referenceVoltage' })
  })
})
