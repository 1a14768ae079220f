import { describe, expect, it } from 'vitest'
import { analyse } from '@/converters'
import { complex, divide, multiply, type Complex } from '@/converters/numeric/complex'
import { readMargins } from '@/converters/loop/margins'
import { buckDesign } from '@/tests/support/designs'
import { expectRelative } from '@/tests/support/expectRelative'
import { scipy } from '@/tests/support/scipy'

const s = (omega: number): Complex => complex(0, omega)
const over = (gain: number, ...factors: Complex[]): Complex => divide(complex(gain), factors.reduce(multiply))
const lag = (omega: number, corner: number): Complex => complex(1, omega / corner)

describe('margins', () => {
  it('of 10/(s(1 + s)²), which can be written down', () => {
    // Phase crossing at ω = 1: |T| = 10/(1·2) = 5. Unstable by Routh: s³ + 2s² + s + 10 has two roots on the right.
    const margins = readMargins((w) => over(10, s(w), lag(w, 1), lag(w, 1)), 10)
    expect(margins.isStable).toBe(false)
    expectRelative(margins.phaseCrossings[0]!.frequency, 1 / (2 * Math.PI), 1e-9)
    expectRelative(margins.phaseCrossings[0]!.margin, -20 * Math.log10(5), 1e-9)
  })

  it('of 1/(s(1 + s)²): gain margin 2, phase margin from the crossing where ω(1 + ω²) = 1', () => {
    const margins = readMargins((w) => over(1, s(w), lag(w, 1), lag(w, 1)), 10)
    const crossing = 0.6823278038280193 // real root of ω³ + ω = 1
    expect(margins.isStable).toBe(true)
    expectRelative(margins.gainMargin!, 20 * Math.log10(2), 1e-9)
    expectRelative(margins.crossover!, crossing / (2 * Math.PI), 1e-9)
    expectRelative(margins.phaseMargin!, 90 - (2 * Math.atan(crossing) * 180) / Math.PI, 1e-9)
    expectRelative(margins.delayMargin!, (margins.phaseMargin! * Math.PI) / 180 / crossing, 1e-9)
    // The peak of |1/(1 + T)| on a fine grid, by SciPy.
    const peak = scipy<number>(
      `
w = np.linspace(0.3, 3, 2000001)
T = 1/(1j*w*(1 + 1j*w)**2)
answer = float(np.max(1/np.abs(1 + T)))`,
      null,
    )
    expectRelative(margins.sensitivityPeak, peak, 1e-6)
  })

  it('of a conditionally stable loop: both ways the gain may go', () => {
    // 200(1 + s)²/(s³(1 + s/50)²): phase starts at −270°, rises above −180° and falls again.
    const loop = (w: number) =>
      divide(
        multiply(complex(20), multiply(lag(w, 1), lag(w, 1))),
        [s(w), s(w), s(w), lag(w, 50), lag(w, 50)].reduce(multiply),
      )
    const margins = readMargins(loop, 1000)
    expect(margins.isStable).toBe(true)
    expect(margins.gainMargin).toBeGreaterThan(0)
    expect(margins.gainReductionMargin).toBeGreaterThan(0)
    // Reduced by more than that margin the loop is unstable, by less it is not.
    const reduced = (extra: number) =>
      readMargins((w) => multiply(loop(w), complex(10 ** (-(margins.gainReductionMargin! + extra) / 20))), 1000)
    expect(reduced(0.5).isStable).toBe(false)
    expect(reduced(-0.5).isStable).toBe(true)
  })

  it('finds both crossings of a narrow resonance that a coarse grid would step over', () => {
    const f0 = 10
    const w0 = 2 * Math.PI * f0
    const loop = (w: number) => over(0.02, complex(1 - (w / w0) ** 2, w / (w0 * 200)))
    const margins = readMargins(loop, 1000, { landmarks: [f0] })
    expect(margins.gainCrossings).toHaveLength(2)
  })

  it('of a stable loop that also crosses with its phase ahead: −180° is as near from that side', () => {
    // 4s/(1 + s)²: a differentiator below, a lag above, no encirclement; at both crossings, (2 ± √3), the phase is ±60°.
    const margins = readMargins((w) => divide(multiply(complex(4), s(w)), multiply(lag(w, 1), lag(w, 1))), 100)
    expect(margins.isStable).toBe(true)
    expect(margins.gainCrossings).toHaveLength(2)
    expectRelative(margins.crossover!, (2 + Math.sqrt(3)) / (2 * Math.PI), 1e-9)
    expectRelative(margins.phaseMargin!, 120, 1e-9)
  })

  it('says that there is none when the gain never reaches one', () => {
    const margins = readMargins((w) => over(0.5, lag(w, 1)), 100)
    expect(margins).toMatchObject({
      crossover: null,
      phaseMargin: null,
      gainMargin: null,
      delayMargin: null,
      isStable: true,
    })
  })

  it('are those of a fine-grid reading of the analysed loop', () => {
    const { margins } = analyse(buckDesign())
    const span = [0.999, 1.001].map((share) => share * margins!.crossover!)
    const frequencies = Array.from({ length: 2000 }, (_, i) => span[0]! + ((span[1]! - span[0]!) * i) / 1999)
    const { loop } = analyse(buckDesign(), { frequencies })
    const crossing = loop!.response.switched.findIndex(({ gainDb }) => gainDb < 0)
    expectRelative(margins!.crossover!, frequencies[crossing]!, 1e-3)
    expect(Math.abs(margins!.phaseMargin! - (180 + loop!.response.switched[crossing]!.phaseDeg))).toBeLessThan(0.05)
  })
})
