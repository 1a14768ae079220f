/** Textbook results with ideal parts, beside the exact ones: what the designer's own estimate would give. */
import { sensedSlopes } from './averaged/currentMode'
import type { OpenPlant } from './plant'
import type { ClosedForm } from './results'
import type { Formula } from './topologies/topology'

const BOOK = 'Erickson and Maksimović 2001'
const toHertz = (omega: number): number => omega / (2 * Math.PI)

export function closedForms(plant: OpenPlant): ClosedForm[] {
  const forms = [...esrZeros(plant), ...(plant.stage ? continuousForms(plant) : discontinuousForms(plant))]
  // With its losses a stage may sit where the ideal one cannot; its closed form is then left out.
  return forms.filter(({ value }) => Number.isFinite(value))
}

function esrZeros({ circuit }: OpenPlant): ClosedForm[] {
  const { outputStates } = circuit
  return outputStates
    .filter(({ esr }) => esr > 0)
    .map(({ esr, capacitance }, i): ClosedForm => {
      const label =
        outputStates.length > 1 ? `Zero of capacitor ${i + 1} and its ESR` : 'Zero of the capacitor and its ESR'
      return {
        key: 'esr-zero',
        label,
        value: toHertz(1 / (esr * capacitance)),
        unit: 'Hz',
        equation: '1/(2π·ESR·C)',
        source: BOOK,
      }
    })
}

function continuousForms(plant: OpenPlant): ClosedForm[] {
  const { circuit, orbit } = plant
  const { design, lineVoltage, outputCurrent } = circuit
  const ideal = circuit.topology.closedForms.continuous({ design, lineVoltage, outputCurrent }, orbit.dutyCycle)
  const forms: ClosedForm[] = []
  if (ideal.rightHalfPlaneZero !== null) {
    forms.push({
      key: 'right-half-plane-zero',
      label: 'Right-half-plane zero',
      value: toHertz(ideal.rightHalfPlaneZero.value),
      unit: 'Hz',
      equation: `${ideal.rightHalfPlaneZero.equation}/2π`,
      source: BOOK,
    })
  }
  if (design.modulator.kind === 'peak-current-mode') return [...forms, ...currentModeForms(plant)]
  if (ideal.filter) {
    forms.push({
      key: 'resonance',
      label: 'Resonance of the output filter',
      value: toHertz(ideal.filter.resonance.value),
      unit: 'Hz',
      equation: `${ideal.filter.resonance.equation}/2π`,
      source: BOOK,
    })
  }
  // Other loads have no resistance to damp the filter with.
  if (ideal.filter && design.load === 'resistive') {
    forms.push({
      key: 'quality',
      label: 'Q of the output filter, load alone',
      ...ideal.filter.quality,
      unit: '',
      source: BOOK,
    })
  }
  return [...forms, controlGain(ideal.controlGain), lineGain(ideal.lineGain)]
}

const controlGain = (formula: Formula): ClosedForm => ({
  key: 'control-gain',
  label: 'Output per unit of duty at low frequency',
  ...formula,
  unit: 'V',
  source: BOOK,
})

const lineGain = (formula: Formula): ClosedForm => ({
  key: 'line-gain',
  label: 'Output per volt of line at low frequency',
  ...formula,
  unit: 'V/V',
  source: BOOK,
})

/** Q_p = 1/(π(m_c·D′ − ½)), m_c = 1 + S_e/S_n; and the slope at which m_c·D′ is one half. */
function currentModeForms({ circuit, orbit, stage }: OpenPlant): ClosedForm[] {
  if (!stage) return []
  const { rising, compensation } = sensedSlopes(circuit, stage)
  const offDuty = 1 - orbit.dutyCycle
  const damping = (1 + compensation / rising) * offDuty - 0.5
  const critical = Math.max(0, rising * (0.5 / offDuty - 1))
  const forms: ClosedForm[] = [
    {
      key: 'critical-slope',
      label: 'Slope compensation at the edge of subharmonic oscillation',
      value: critical,
      unit: 'V/s',
      equation: 'S_n·(1/(2D′) − 1)',
      source: 'Ridley 1991',
    },
  ]
  if (damping > 0) {
    forms.unshift({
      key: 'sampling-quality',
      label: 'Q of the pair at half the switching frequency',
      value: 1 / (Math.PI * damping),
      unit: '',
      equation: '1/(π(m_c·D′ − ½))',
      source: 'Ridley 1991',
    })
  }
  return forms
}

/** The published expressions hold for a resistive load and, as control gain, for voltage mode. */
function discontinuousForms({ circuit }: OpenPlant): ClosedForm[] {
  const { design, lineVoltage, outputCurrent, topology } = circuit
  const ideal = topology.closedForms.discontinuous?.({ design, lineVoltage, outputCurrent })
  if (!ideal || design.load !== 'resistive' || design.modulator.kind !== 'voltage-mode') return []
  return [
    {
      key: 'load-pole',
      label: 'Pole of load and output capacitance',
      value: toHertz(ideal.pole.value),
      unit: 'Hz',
      equation: `${ideal.pole.equation}/2π`,
      source: BOOK,
    },
    controlGain(ideal.controlGain),
    lineGain(ideal.lineGain),
  ]
}
