import type { Proposal } from '@/converters/results'

const METHODS: Readonly<Record<Proposal['method'], string>> = {
  'k-factor': 'by the K factor',
  optimised: 'optimised over the corners',
  placed: 'zeros and poles placed',
}

export const proposalName = ({ type, method }: Pick<Proposal, 'type' | 'method'>): string =>
  `Type ${type}, ${METHODS[method]}`
