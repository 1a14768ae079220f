/**
 * A shunt reference that drives an optocoupler's LED from the output itself:
 *
 *   G = CTR·(R_pull/Z_LED)·(1 + Zf/R1)/((1 + s/ω_opto)(1 + s·R_pull·C2))
 *
 * The 1 is the fast lane: the LED's current follows the output even where the reference no longer does. Zf is R2 + C1
 * from cathode to reference (R2 may be left out), Z_LED the LED's resistor, in type III with R3 + C3 across it, C2 stands
 * at the optocoupler's collector. The reference is taken as fast beside the optocoupler. There is no type I: the fast
 * lane adds its zero at 1/(2π(R1 + R2)C1) whether wanted or not.
 */
import type { CompensatorType } from '../document'
import { complex, divide, multiply, type Complex } from '../numeric/complex'
import { stateSpaceOf, type StateSpace } from './stateSpace'

export interface ShuntOptocouplerNetwork {
  readonly kind: 'shunt-optocoupler'
  readonly type: CompensatorType
  readonly upperConductance: number // S
  readonly R2: number // Ω, 0 when not fitted
  readonly C1: number // F
  readonly C2: number // F, 0 when not fitted
  readonly R3: number // Ω, type III
  readonly C3: number // F, type III
  readonly currentTransferRatio: number
  readonly pullUpResistance: number // Ω
  readonly ledResistance: number // Ω
  readonly optocouplerPole: number // rad/s
}

export function shuntOptocouplerGain(network: ShuntOptocouplerNetwork, omega: number): Complex {
  const { type, upperConductance, R2, C1, C2, R3, C3, pullUpResistance, ledResistance } = network
  const reference = complex(1 + R2 * upperConductance, -upperConductance / (omega * C1))
  const led = complex(1 / ledResistance)
  const across = type === 'III' ? divide(complex(1), complex(R3, -1 / (omega * C3))) : complex(0)
  const drive = complex(led.re + across.re, across.im)
  const lags = multiply(complex(1, omega / network.optocouplerPole), complex(1, omega * pullUpResistance * C2))
  const scale = network.currentTransferRatio * pullUpResistance
  return divide(multiply(complex(scale * drive.re, scale * drive.im), reference), lags)
}

const STATES = ['c1', 'c3', 'optocoupler', 'c2'] as const

/** States: C1's voltage, C3's in type III, the optocoupler's lagging current (times R_pull, V) and C2's where fitted. */
export function shuntOptocouplerStateSpace(network: ShuntOptocouplerNetwork): StateSpace {
  const { type, upperConductance, R2, C1, C2, R3, C3, pullUpResistance, ledResistance, optocouplerPole } = network
  const fitted = STATES.filter((name) => !((name === 'c3' && type !== 'III') || (name === 'c2' && C2 === 0)))
  return stateSpaceOf(STATES, fitted, (v, input) => {
    const referenceCurrent = upperConductance * input
    // From the output to the cathode, which moves against it.
    const acrossLed = input + v.c1 + R2 * referenceCurrent
    const leadCurrent = type === 'III' ? (acrossLed - v.c3) / R3 : 0
    const ledCurrent = acrossLed / ledResistance + leadCurrent
    const driven = network.currentTransferRatio * pullUpResistance * ledCurrent
    return {
      rates: {
        c1: referenceCurrent / C1,
        c3: leadCurrent / C3,
        optocoupler: optocouplerPole * (driven - v.optocoupler),
        c2: (v.optocoupler - v.c2) / (pullUpResistance * C2),
      },
      output: C2 > 0 ? v.c2 : v.optocoupler,
    }
  })
}

/** V across the LED and across the conducting optocoupler transistor; common practice, no source. */
const LED_VOLTAGE = 1.2
const SATURATION = 0.3

/**
 * The largest LED resistor with which the optocoupler can still pull its collector down, Ω: at the output's voltage, with
 * the reference at its lowest cathode voltage (its own reference voltage). Null where no resistor can.
 */
export function largestLedResistance(setting: {
  readonly outputVoltage: number
  readonly referenceVoltage: number
  readonly supplyVoltage: number // of the pull-up
  readonly pullUpResistance: number
  readonly currentTransferRatio: number
}): number | null {
  const headroom = setting.outputVoltage - LED_VOLTAGE - setting.referenceVoltage
  const ledCurrent = (setting.supplyVoltage - SATURATION) / setting.pullUpResistance / setting.currentTransferRatio
  return headroom > 0 && ledCurrent > 0 ? headroom / ledCurrent : null
}
