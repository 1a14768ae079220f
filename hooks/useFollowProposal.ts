import { useEffect } from 'react'
import { useDraft } from './draft/useDraft'
import { draftStore } from './draft/store'
import { useProposals } from './useProposals'

/** When another crossover is wanted and the network is a proposed one, the network for it goes in as it arrives. */
export function useFollowProposal(): void {
  const { awaitsProposal, design } = useDraft()
  const { data, isCurrent } = useProposals()
  const type = design.compensator?.type
  useEffect(() => {
    if (!awaitsProposal || !isCurrent || !data) return
    const next = data.proposals.find((proposal) => proposal.type === type) ?? data.proposals[0]
    if (next) draftStore.takeNetwork({ type: next.type, parts: next.parts.preferred })
  }, [awaitsProposal, isCurrent, data, type])
}
