/** What poles and zeros are called and what they do, in words. */
import { figure } from './format'
import type { Root, RootRole } from '@/converters/results'

export const ROLE_NAMES: Readonly<Record<RootRole, string>> = {
  'output-filter': 'output filter',
  'capacitor-esr': 'capacitor ESR',
  'input-filter': 'input filter',
  coupling: 'coupling capacitor',
  'right-half-plane-zero': 'right half plane',
  sampling: 'sampling',
  inductor: 'inductor',
  'load-capacitor': 'load and capacitor',
  integrator: 'integrator',
  compensator: 'network',
  amplifier: 'amplifier',
  loop: 'loop',
  other: 'other',
}

/** The same where room is short: on drawings. */
export const SHORT_NAMES: Readonly<Record<RootRole, string>> = {
  ...ROLE_NAMES,
  'capacitor-esr': 'ESR',
  coupling: 'coupling',
  'right-half-plane-zero': 'RHP zero',
  'load-capacitor': 'load',
}

/** What a root means in time. */
export function meaning(root: Root, kind: 'pole' | 'zero'): string {
  if (kind === 'zero') return zeroMeaning(root)
  if (root.frequency === 0) return 'adds up for ever'
  const constant = root.timeConstant
  if (root.halfPlane === 'right') return `grows, time constant ${figure(constant, 's')}`
  if (constant === null) return `rings at ${figure(root.ringingFrequency, 'Hz')} without decay`
  const decay = `decays, time constant ${figure(constant, 's')}`
  return root.ringingFrequency > 0 ? `${decay}, rings at ${figure(root.ringingFrequency, 'Hz')}` : decay
}

function zeroMeaning(root: Root): string {
  if (root.halfPlane === 'right') return 'first moves the wrong way; takes phase while it adds gain'
  if (root.ringingFrequency > 0) return `a notch near ${figure(root.ringingFrequency, 'Hz')}`
  return 'gives phase back'
}
