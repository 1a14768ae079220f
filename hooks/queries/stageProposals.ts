import { useMutation } from '@tanstack/react-query'
import { api } from '@/hooks/api'
import { StageProposal, type StageProposalRequestInput } from '@/server/contract/stageProposals'

/** A whole power stage from the few figures of the quick start. */
export function useStageProposalMutation() {
  return useMutation({
    mutationFn: (requirements: StageProposalRequestInput['requirements']) =>
      api.post('/stage-proposals', { requirements }, StageProposal),
  })
}
