import { describe, expect, it } from 'vitest'
import { analyse, DesignError, simulate } from '@/converters'
import type { DesignDocumentInput } from '@/converters/document'
import { boostDesign, buckDesign } from '@/tests/support/designs'
import { angleBetween, expectRelative } from '@/tests/support/expectRelative'

/** A duty of 60 % in current mode; without slope compensation the current alternates. */
function currentModeBuck(slopeCompensation: number): DesignDocumentInput {
  return buckDesign({
    line: { minimum: 12, nominal: 12, maximum: 12 },
    output: { voltage: 7.2, currentMinimum: 2, currentMaximum: 5 },
    switchingFrequency: 200e3,
    inductor: { inductance: 10e-6 },
    outputCapacitors: [{ count: 1, capacitance: 200e-6, esr: 2e-3 }],
    modulator: { kind: 'peak-current-mode', currentSenseResistance: 0.1, slopeCompensation },
    compensator: { type: 'II', parts: { R1: 10e3, R2: 4.7e3, C1: 10e-9, C2: 220e-12 } },
  })
}

/**
 * Capacitors of much ESR, a small ramp and no last pole: nearly all of the output ripple reaches the comparator. Only R2
 * tells a switched loop that holds from one that does not.
 */
function ripplingBuck(R2: number): DesignDocumentInput {
  return buckDesign({
    line: { minimum: 12, nominal: 12, maximum: 12 },
    output: { voltage: 10.8, currentMinimum: 1, currentMaximum: 5 },
    inductor: { inductance: 4.7e-6, resistance: 8e-3 },
    outputCapacitors: [{ count: 1, capacitance: 470e-6, esr: 0.05 }],
    switch: { onResistance: 5e-3 },
    rectifier: { kind: 'synchronous', onResistance: 5e-3 },
    modulator: { kind: 'voltage-mode', rampAmplitude: 0.5 },
    amplifier: { kind: 'op-amp', gainBandwidth: 100e6, openLoopGain: 1e4 },
    compensator: { type: 'II', parts: { R1: 10e3, R2, C1: 10e-9 } },
  })
}

describe('the period map of the closed loop', () => {
  it('has the multipliers e^(pT) of the averaged closed-loop poles, where these are slow', () => {
    const { loop } = analyse(buckDesign())
    for (const pole of loop!.closedLoopPoles.filter(({ frequency }) => frequency < 30e3)) {
      const size = Math.exp(pole.real / 500e3)
      const angle = pole.imaginary / 500e3
      const distances = loop!.periodMap.multipliers.map((m) =>
        Math.hypot(m.real - size * Math.cos(angle), m.imaginary - size * Math.sin(angle)),
      )
      // Averaging is good to about (ω/ω_s)², a few parts in a thousand at a seventeenth of the switching frequency.
      expect(Math.min(...distances)).toBeLessThan(5e-3)
    }
  })

  it('finds a loop unstable that every margin calls fine, and says why; less gain cures it', () => {
    const bad = analyse(ripplingBuck(56e3))
    expect(bad.margins!.isStable).toBe(true)
    expect(bad.averagedMargins!.isStable).toBe(true)
    expect(bad.averagedMargins!.phaseMargin).toBeGreaterThan(60)
    expect(bad.loop!.periodMap.isStable).toBe(false)
    expect(Math.min(...bad.loop!.periodMap.multipliers.map(({ real }) => real))).toBeLessThan(-1)
    const warning = bad.warnings.find(({ code }) => code === 'unstable-switching')
    expect(warning?.message).toMatch(/ripple.*comparator.*half the switching frequency/)

    const good = analyse(ripplingBuck(40e3))
    expect(good.loop!.periodMap.isStable).toBe(true)
    expect(good.warnings.map(({ code }) => code)).not.toContain('unstable-switching')
  })

  it('agrees with the cycle-by-cycle simulation, which knows nothing of it', () => {
    expect(simulate(ripplingBuck(56e3), { cycles: 600 }).readings.alternates).toBe(true)
    expect(simulate(ripplingBuck(40e3), { cycles: 600 }).readings.alternates).toBe(false)
  })

  it('and in current mode at 60 % duty: alternating without a ramp, at rest with the one that is named', () => {
    const open = analyse(currentModeBuck(0))
    expect(open.loop!.periodMap.isStable).toBe(false)
    expect(simulate(currentModeBuck(0), { cycles: 600 }).readings.alternates).toBe(true)
    const cured = currentModeBuck(1.2 * open.periodMap.slopeNeeded!)
    expect(analyse(cured).loop!.periodMap.isStable).toBe(true)
    expect(simulate(cured, { cycles: 600 }).readings.alternates).toBe(false)
  })
})

describe('the simulation of a step', () => {
  it.each([
    ['buck, voltage mode', buckDesign()],
    ['boost, current mode', boostDesign()],
  ])('dips and recovers as the averaged model expects of a small step: %s', (_name, design) => {
    const { currentMaximum } = design.output
    const small = { kind: 'load-step' as const, from: 0.9 * currentMaximum, to: 0.95 * currentMaximum }
    const { readings, prediction } = simulate(design, { scenario: small })
    // The simulation reads the mean of each period, which rounds a dip off that lasts a few of them.
    expectRelative(readings.peakDeviation, prediction!.peakDeviation, 0.05)
    expect(Math.abs(readings.peakTime - prediction!.peakTime)).toBeLessThan(2 / design.switchingFrequency)
    expect(readings.recoveryTime).not.toBeNull()
    expectRelative(readings.recoveryTime!, prediction!.recoveryTime!, 0.15)
  })

  it('stands still before the step: the orbit is the one that the simulation runs on', () => {
    for (const design of [buckDesign(), boostDesign(), currentModeBuck(30e3)]) {
      const { meanOutput, duty, disturbedAt, time } = simulate(design)
      const before = time.filter((t) => t < disturbedAt).length
      const wanted = design.output.voltage
      meanOutput.slice(0, before).forEach((value) => expectRelative(value, wanted, 1e-5))
      const { operatingPoint } = analyse(design, {
        operatingPoint: { outputCurrent: (design.output.currentMinimum + design.output.currentMaximum) / 2 },
      })
      duty.slice(0, before).forEach((value) => expectRelative(value, operatingPoint.dutyCycle, 1e-4))
    }
  })

  it('starts softly from nothing and settles at the output without passing it by a tenth', () => {
    const { meanOutput } = simulate(buckDesign(), { scenario: { kind: 'soft-start' } })
    expect(Math.abs(meanOutput[0]!)).toBeLessThan(0.01)
    expectRelative(meanOutput.at(-1)!, 3.3, 1e-3)
    expect(Math.max(...meanOutput)).toBeLessThan(1.1 * 3.3)
  })

  it('an overload drives the duty to its limit and the loop comes back from it', () => {
    const design = buckDesign({ dutyLimit: 0.35 })
    const { duty, meanOutput } = simulate(design, { scenario: { kind: 'overload', current: 40, cycles: 300 } })
    expectRelative(Math.max(...duty), 0.35, 1e-6)
    expect(Math.min(...meanOutput)).toBeLessThan(3.2)
    expectRelative(meanOutput.at(-1)!, 3.3, 1e-3)
  })

  it('keeps the amplifier within the limits of the document', () => {
    const amplifier = {
      kind: 'op-amp' as const,
      gainBandwidth: 10e6,
      openLoopGain: 1e4,
      outputLimits: { minimum: 0.2, maximum: 0.6 },
    }
    const { control } = simulate(buckDesign({ amplifier }), { scenario: { kind: 'overload', current: 30 } })
    expect(Math.max(...control)).toBeLessThanOrEqual(0.61)
    expect(Math.min(...control)).toBeGreaterThanOrEqual(0.19)
  })

  it('reads the loop gain that the open-loop model has, where the ripple is small', () => {
    const { loopWithRipple } = simulate(buckDesign(), { scenario: { kind: 'line-step', from: 12 } })
    const { loop } = analyse(buckDesign(), { frequencies: loopWithRipple!.frequencies })
    loopWithRipple!.response.forEach((point, i) => {
      if (loopWithRipple!.frequencies[i]! > 50e3) return
      const open = loop!.response.switched[i]!
      expect(Math.abs(point.gainDb - open.gainDb)).toBeLessThan(0.6)
      expect(angleBetween(point.phaseDeg, open.phaseDeg)).toBeLessThan(3)
    })
  })

  it.each([
    [{ cycles: 5 }, 'cycles'],
    [{ cycles: 1e9 }, 'cycles'],
    [{ scenario: { kind: 'load-step', from: 0 } }, 'scenario.from'],
    [{ scenario: { kind: 'dance' } }, 'scenario.kind'],
    [{ lineVoltage: Number.NaN }, 'lineVoltage'],
  ])('refuses %j at its field', (options, field) => {
    try {
      simulate(buckDesign(), options as Parameters<typeof simulate>[1])
    } catch (error) {
      expect(error).toBeInstanceOf(DesignError)
      expect((error as DesignError).problems.map((problem) => problem.field)).toContain(field)
      return
    }
    throw new Error('was not refused')
  })

  it('ends in words where currents run away, such as with a constant-power load that no loop can hold', () => {
    const design: DesignDocumentInput = {
      topology: 'buck-boost',
      switchingFrequency: 91.5e3,
      line: { minimum: 1.24, nominal: 1.24, maximum: 1.24 },
      output: { voltage: 0.0916, currentMinimum: 57.4, currentMaximum: 57.4 },
      load: 'constant-power',
      inductor: { inductance: 32.7e-6 },
      outputCapacitors: [{ count: 1, capacitance: 440e-6 }],
      rectifier: { kind: 'diode', forwardVoltage: 0.5 },
      modulator: { kind: 'voltage-mode', rampAmplitude: 1.6 },
      sense: { referenceVoltage: 0.0916, upperResistance: 10e3 },
      compensator: { type: 'III', parts: { R2: 2.25e3, R3: 68, C1: 13e-9, C2: 50e-12, C3: 225e-12 } },
    }
    expect(analyse(design).margins!.isStable).toBe(false)
    expect(() => simulate(design, { cycles: 20_000 })).toThrow(/runs away/)
  })
})
