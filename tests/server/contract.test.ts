import { describe, expect, expectTypeOf, it } from 'vitest'

import type * as engine from '@/converters/results'
import type * as spread from '@/converters/spread/results'
import { Analysis, AnalysisRequest } from '@/server/contract/analyses'
import { check } from '@/server/contract/checking'
import type { CompensatorProposals } from '@/server/contract/compensators'
import type { CornerSet } from '@/server/contract/corners'
import type { SpreadResult } from '@/server/contract/spreadRuns'
import type { StageProposal } from '@/server/contract/stageProposals'
import type { ToleranceCornerSet } from '@/server/contract/toleranceCorners'
import { buckDesign } from '@/tests/support/designs'

describe('the contract', () => {
  // Held by the compiler in both directions: nothing of the engine's answers is lost, nothing is promised beyond them.
  it('says what the engine answers', () => {
    expectTypeOf<engine.Analysis>().toExtend<Analysis>()
    expectTypeOf<Analysis>().toExtend<engine.Analysis>()
    expectTypeOf<engine.CornerSet>().toExtend<CornerSet>()
    expectTypeOf<CornerSet>().toExtend<engine.CornerSet>()
    expectTypeOf<engine.CompensatorProposals>().toExtend<CompensatorProposals>()
    expectTypeOf<CompensatorProposals>().toExtend<engine.CompensatorProposals>()
    expectTypeOf<engine.StageChoice>().toExtend<StageProposal['choices'][number]>()
    expectTypeOf<StageProposal['choices'][number]>().toExtend<engine.StageChoice>()
    expectTypeOf<spread.SpreadResult>().toExtend<SpreadResult>()
    expectTypeOf<SpreadResult>().toExtend<spread.SpreadResult>()
    expectTypeOf<spread.ToleranceCornerSet>().toExtend<ToleranceCornerSet>()
    expectTypeOf<ToleranceCornerSet>().toExtend<spread.ToleranceCornerSet>()
    expect(Analysis.shape.margins.parse(null)).toBeNull()
  })
})

describe('checking', () => {
  it('gives a sound value with its defaults filled in', () => {
    const checked = check(AnalysisRequest, { design: buckDesign() })
    expect(checked).toMatchObject({ kind: 'sound', value: { design: { dutyLimit: 0.98, load: 'resistive' } } })
  })

  it('names each bad field once, with a sentence', () => {
    const design = { ...buckDesign(), load: 'heavy', dutyLimit: 0, outputCapacitors: 'many', inductor: 4 }
    expect(check(AnalysisRequest, { design })).toEqual({
      kind: 'unsound',
      errors: [
        { field: 'design.load', message: 'Must be one of resistive, constant-current, constant-power.' },
        { field: 'design.inductor', message: 'Must be an object.' },
        { field: 'design.outputCapacitors', message: 'Must be a list.' },
        { field: 'design.dutyLimit', message: 'Must be more than 0.' },
      ],
    })
  })
})
