import type { ReactNode } from 'react'
import { AmplifierFields, ModulatorFields } from './ControlFields'
import {
  BankFields,
  CouplingCapacitorFields,
  InductorFields,
  LineFields,
  LoadFields,
  RectifierFields,
  SecondInductorFields,
  SwitchFields,
  TransformerFields,
} from './groups'
import { InputFilterFields } from './InputFilterFields'
import type { StagePart } from '@/components/schematic/stageParts'
import { Sheet } from '@/components/ui/Sheet'

const SHEETS: Readonly<Record<Exclude<StagePart['kind'], 'bank'>, { title: string; content: ReactNode }>> = {
  line: { title: 'Line', content: <LineFields /> },
  switch: { title: 'Switch', content: <SwitchFields /> },
  rectifier: { title: 'Rectifier', content: <RectifierFields /> },
  inductor: { title: 'Inductor', content: <InductorFields /> },
  secondInductor: { title: 'Second inductor', content: <SecondInductorFields /> },
  couplingCapacitor: { title: 'Coupling capacitor', content: <CouplingCapacitorFields /> },
  transformer: { title: 'Transformer', content: <TransformerFields /> },
  inputFilter: { title: 'Input filter', content: <InputFilterFields /> },
  load: { title: 'Load', content: <LoadFields /> },
  modulator: { title: 'Modulator', content: <ModulatorFields /> },
  amplifier: { title: 'Error amplifier', content: <AmplifierFields /> },
}

export interface PartSheetProps {
  readonly part: StagePart | null
  readonly onClose: () => void
}

/** The entries of one part, opened from the schematic. */
export function PartSheet({ part, onClose }: PartSheetProps) {
  const sheet =
    part?.kind === 'bank'
      ? { title: `Output capacitors, bank ${part.index + 1}`, content: <BankFields index={part.index} /> }
      : part && SHEETS[part.kind]
  return (
    <Sheet title={sheet?.title ?? ''} isOpen={part !== null} onClose={onClose}>
      {sheet?.content}
    </Sheet>
  )
}
