/** Kinds that a drawn design picks from. */
export const CONTROLS = ['voltage-mode', 'peak-current-mode'] as const
export const AMPLIFIER_KINDS = ['op-amp', 'transconductance', 'shunt-optocoupler'] as const
