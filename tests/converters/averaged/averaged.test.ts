/**
 * [EM01] is Erickson and Maksimović, Fundamentals of Power Electronics, 2nd ed., 2001; its numbers are quoted from
 * memory and re-derived in each test. [R91] is Ridley, "A new, continuous-time model for current-mode control", IEEE
 * Trans. Power Electronics, 1991.
 */
import { describe, expect, it } from 'vitest'
import { analyse } from '@/converters'
import type { DesignDocumentInput } from '@/converters/document'
import type { ClosedForm, Root } from '@/converters/results'
import { boostDesign, buckDesign } from '@/tests/support/designs'
import { angleBetween, expectRelative } from '@/tests/support/expectRelative'
import { scipy } from '@/tests/support/scipy'

const TAU = 2 * Math.PI
const value = (forms: readonly ClosedForm[], key: ClosedForm['key']): number =>
  forms.find((form) => form.key === key)?.value ?? Number.NaN

/** An ideal stage at one point, so that the averaged model is the book's. */
function ideal(
  overrides: Partial<DesignDocumentInput>,
  line: number,
  voltage: number,
  current: number,
): DesignDocumentInput {
  return {
    topology: 'buck',
    switchingFrequency: 100e3,
    line: { minimum: line, nominal: line, maximum: line },
    output: { voltage, currentMinimum: current, currentMaximum: current },
    inductor: { inductance: 50e-6 },
    outputCapacitors: [{ count: 1, capacitance: 500e-6 }],
    rectifier: { kind: 'synchronous' },
    modulator: { kind: 'voltage-mode', rampAmplitude: 1 },
    ...overrides,
  }
}

describe('continuous conduction, voltage mode', () => {
  it("gives the published buck regulator's resonance and Q", () => {
    // [EM01] section 9.5.4: 28 V to 15 V into 3 Ω, 50 µH, 500 µF, 100 kHz; f0 = 1 kHz and Q0 = 9.5 as printed.
    const { plant } = analyse(ideal({}, 28, 15, 5))
    expectRelative(plant.poles[0]!.frequency, 1e3, 0.01)
    expectRelative(plant.poles[0]!.quality!, 9.5, 0.01)
    expectRelative(value(plant.closedForms, 'control-gain'), 28, 1e-9)
    expect(plant.zeros).toHaveLength(0)
  })

  it('agrees with the table of salient features for an ideal boost', () => {
    // [EM01] table 8.2: Gd0 = V/D′, Gg0 = 1/D′, ω0 = D′/√(LC), Q = D′R√(C/L), ωz = D′²R/L. An identity: round-off only,
    // except for the duty, which the ripple of the switched orbit moves by parts in a million.
    const R = 24
    const { plant, operatingPoint, responses } = analyse(ideal({ topology: 'boost' }, 12, 24, 1), {
      frequencies: [0.01],
    })
    const off = 1 - operatingPoint.dutyCycle
    expectRelative(off, 0.5, 1e-4)
    const omega0 = off / Math.sqrt(50e-6 * 500e-6)
    expectRelative(plant.poles[0]!.frequency, omega0 / TAU, 1e-9)
    expectRelative(plant.poles[0]!.quality!, off * R * Math.sqrt(500e-6 / 50e-6), 1e-9)
    expectRelative(plant.zeros[0]!.frequency, (off * off * R) / 50e-6 / TAU, 1e-9)
    expect(plant.zeros[0]!.halfPlane).toBe('right')
    expectRelative(10 ** (responses.controlToOutput.averaged[0]!.gainDb / 20), 12 / off / off, 1e-4)
    expectRelative(10 ** (responses.lineToOutput.averaged[0]!.gainDb / 20), 1 / off, 1e-6)
    expectRelative(value(plant.closedForms, 'right-half-plane-zero'), plant.zeros[0]!.frequency, 1e-9)
  })

  it('finds the poles, zeros and responses that SciPy finds for a boost with every parasitic', () => {
    const design = boostDesign({ modulator: { kind: 'voltage-mode', rampAmplitude: 1.2 }, compensator: null })
    const frequencies = [50, 700, 3e3, 2e4, 9e4]
    const { plant, operatingPoint, responses } = analyse(design, { frequencies })
    // Averaged state matrices written by hand from Kirchhoff's laws; SciPy takes it from there.
    const answer = scipy<{ poles: number[][]; zeros: number[][]; gains: number[][] }>(
      `
D, vg, R = data['D'], 5.0, 24/0.6
L, RL, Ron, Rd, VF, C, r = 10e-6, 20e-3, 12e-3, 20e-3, 0.4, 40e-6, 1e-3
k = R/(R + r)
A1 = np.array([[-(RL+Ron)/L, 0], [0, -1/(C*(R+r))]]); A2 = np.array([[-(RL+Rd+k*r)/L, -k/L], [k/C, -1/(C*(R+r))]])
B = np.array([[1/L], [0]]); b2 = np.array([[-VF/L], [0]])
C1 = np.array([[0, k]]); C2 = np.array([[k*r, k]])
A = D*A1 + (1-D)*A2; Cc = D*C1 + (1-D)*C2
X = -np.linalg.solve(A, B*vg + (1-D)*b2)
E = ((A1-A2) @ X - b2)/1.2; F = ((C1-C2) @ X)/1.2
num, den = scipy.signal.ss2tf(A, E, Cc, F)
w, h = scipy.signal.freqresp((A, E, Cc, F), 2*np.pi*np.array(data['frequencies']))
pair = lambda v: [v.real, v.imag]
answer = {'poles': [pair(v) for v in sorted(np.roots(den), key=abs)], 'zeros': [pair(v) for v in sorted(np.roots(num[0]), key=abs)], 'gains': [pair(v) for v in h]}`,
      { D: operatingPoint.dutyCycle, frequencies },
    )
    const compare = (roots: readonly Root[], expected: number[][]) => {
      expect(roots).toHaveLength(expected.length)
      for (const { real, imaginary } of roots) {
        const nearest = Math.min(...expected.map(([re, im]) => Math.hypot(real - re!, imaginary - im!)))
        expect(nearest / Math.hypot(real, imaginary)).toBeLessThan(1e-6)
      }
    }
    compare(plant.poles, answer.poles)
    compare(plant.zeros, answer.zeros)
    answer.gains.forEach(([re, im], i) => {
      const ours = responses.controlToOutput.averaged[i]!
      expect(Math.abs(ours.gainDb - 20 * Math.log10(Math.hypot(re!, im!)))).toBeLessThan(1e-5)
      expect(angleBetween(ours.phaseDeg, (Math.atan2(im!, re!) * 180) / Math.PI)).toBeLessThan(1e-4)
    })
  })

  it('agrees with the switched model for a buck to a fifth of the switching frequency', () => {
    const frequencies = Array.from({ length: 60 }, (_, i) => 50 * 2000 ** (i / 59))
    const { responses } = analyse(buckDesign(), { frequencies })
    for (const quantity of ['controlToOutput', 'lineToOutput', 'outputImpedance'] as const) {
      responses[quantity].averaged.forEach((point, i) => {
        const exact = responses[quantity].switched[i]!
        expect(Math.abs(point.gainDb - exact.gainDb)).toBeLessThan(0.05)
        expect(angleBetween(point.phaseDeg, exact.phaseDeg)).toBeLessThan(0.3)
      })
    }
  })
})

describe('discontinuous conduction, voltage mode', () => {
  const diode = { kind: 'diode' } as const
  const cases = [
    { topology: 'buck', line: 12, voltage: 5 },
    { topology: 'boost', line: 12, voltage: 24 },
  ] as const

  it.each(cases)('has the gain and pole of the published table, ideal $topology', ({ topology, line, voltage }) => {
    // [EM01] table 11.3. The table leaves the inductor's own pole out and takes the output as free of ripple, which is
    // good to some parts in a thousand here.
    const design = ideal(
      {
        topology,
        rectifier: diode,
        inductor: { inductance: 3e-6 },
        outputCapacitors: [{ count: 1, capacitance: 200e-6 }],
      },
      line,
      voltage,
      0.4,
    )
    const { operatingPoint, plant, responses } = analyse(design, { frequencies: [0.01] })
    expect(operatingPoint.conduction).toBe('discontinuous')
    const R = voltage / 0.4
    const M = voltage / line
    const [gain, pole] =
      topology === 'buck'
        ? [((2 * voltage) / operatingPoint.dutyCycle) * ((1 - M) / (2 - M)), (2 - M) / ((1 - M) * R * 200e-6)]
        : [((2 * voltage) / operatingPoint.dutyCycle) * ((M - 1) / (2 * M - 1)), (2 * M - 1) / ((M - 1) * R * 200e-6)]
    expectRelative(10 ** (responses.controlToOutput.averaged[0]!.gainDb / 20), gain, 0.005)
    expectRelative(plant.poles[0]!.frequency, pole / TAU, 0.005)
    expectRelative(value(plant.closedForms, 'load-pole'), pole / TAU, 1e-9)
  })
})

describe('peak current mode', () => {
  it("places Ridley's pair at half the switching frequency with Q_p = 1/(π(m_c·D′ − ½))", () => {
    // [R91]: exact for the current loop by itself; a large capacitor keeps the output out of it.
    const slope = 30e3
    const design = ideal(
      {
        outputCapacitors: [{ count: 1, capacitance: 0.05 }],
        modulator: { kind: 'peak-current-mode', currentSenseResistance: 0.1, slopeCompensation: slope },
        inductor: { inductance: 10e-6 },
      },
      12,
      5,
      10,
    )
    const { plant, operatingPoint } = analyse(design)
    const D = operatingPoint.dutyCycle
    const rising = (0.1 * (12 - 5)) / 10e-6
    const Q = 1 / (Math.PI * ((1 + slope / rising) * (1 - D) - 0.5))
    const [pole] = plant.poles.filter(({ role }) => role === 'sampling')
    expectRelative(pole!.frequency, 50e3, 1e-3)
    expectRelative(pole!.quality!, Q, 1e-3)
    expectRelative(value(plant.closedForms, 'sampling-quality'), Q, 1e-9)
  })

  it('agrees with the switched model to a fifth of the switching frequency', () => {
    // The sampled-data gain is an approximation; [R91] claims it to half the switching frequency for control to output.
    const frequencies = Array.from({ length: 40 }, (_, i) => 50 * 1200 ** (i / 39))
    const { responses } = analyse(boostDesign(), { frequencies })
    responses.controlToOutput.averaged.forEach((point, i) => {
      const exact = responses.controlToOutput.switched[i]!
      expect(Math.abs(point.gainDb - exact.gainDb)).toBeLessThan(0.5)
      expect(angleBetween(point.phaseDeg, exact.phaseDeg)).toBeLessThan(3)
    })
  })
})
