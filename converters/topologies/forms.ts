/** Closed forms that several topologies share: buck-like and buck-boost-like stages, seen from the secondary. */
import { letters } from './elements'
import type { IdealContinuous, IdealDiscontinuous, TopologyPoint } from './topology'

/** A buck whose inductor is on the output side, fed with n times the line. */
export function buckForms(point: TopologyPoint, D: number, n = 1): IdealContinuous {
  const { L, C, V, R } = letters(point, n)
  return {
    controlGain: { value: V / D, equation: 'V/D' },
    lineGain: { value: n * D, equation: n === 1 ? 'D' : 'n·D' },
    filter: {
      resonance: { value: 1 / Math.sqrt(L * C), equation: '1/√(LC)' },
      quality: { value: R * Math.sqrt(C / L), equation: 'R√(C/L)' },
    },
    rightHalfPlaneZero: null,
  }
}

export function buckDiscontinuousForms(point: TopologyPoint, n = 1): IdealDiscontinuous {
  const { L, C, V, R, M, switchingFrequency } = letters(point, n)
  const D = M * Math.sqrt((2 * L * switchingFrequency) / R / (1 - M))
  return {
    controlGain: { value: ((2 * V) / D) * ((1 - M) / (2 - M)), equation: '(2V/D)·(1 − M)/(2 − M)' },
    lineGain: { value: n * M, equation: n === 1 ? 'M' : 'n·M' },
    pole: { value: (2 - M) / ((1 - M) * R * C), equation: '(2 − M)/((1 − M)RC)' },
  }
}

/** A buck-boost; through a transformer the inductance counts n² times and the line n times. */
export function buckBoostForms(point: TopologyPoint, D: number, n = 1): IdealContinuous {
  const { L, C, V, R } = letters(point, n)
  const off = 1 - D
  const Ls = n * n * L
  const inductance = n === 1 ? 'L' : 'n²L'
  return {
    controlGain: { value: V / (D * off), equation: 'V/(D·D′)' },
    lineGain: { value: (n * D) / off, equation: n === 1 ? 'D/D′' : 'n·D/D′' },
    filter: {
      resonance: { value: off / Math.sqrt(Ls * C), equation: `D′/√(${inductance}·C)` },
      quality: { value: off * R * Math.sqrt(C / Ls), equation: `D′R√(C/${inductance})` },
    },
    rightHalfPlaneZero: { value: (off * off * R) / (D * Ls), equation: `D′²R/(D·${inductance})` },
  }
}

export function buckBoostDiscontinuousForms(point: TopologyPoint, n = 1): IdealDiscontinuous {
  const { L, C, V, R, M, switchingFrequency } = letters(point, n)
  const D = M * Math.sqrt((2 * n * n * L * switchingFrequency) / R)
  return {
    controlGain: { value: V / D, equation: 'V/D' },
    lineGain: { value: n * M, equation: n === 1 ? 'M' : 'n·M' },
    pole: { value: 2 / (R * C), equation: '2/(RC)' },
  }
}

/** Two inductors and a coupling capacitor: the gains are those of a buck-boost, the rest is of fourth order. */
export function coupledForms(point: TopologyPoint, D: number): IdealContinuous {
  return { ...buckBoostForms(point, D), filter: null, rightHalfPlaneZero: null }
}
