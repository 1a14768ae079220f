/** The engine on one core, in this process: what a worker thread does for one request. */
import { analyse, analyseCorners, proposeCompensator, simulate } from '@/converters'
import { type BenchLine, medianDuration } from '@/scripts/bench/line'
import { benchDesign, benchFrequencies } from '@/scripts/bench/subject'

export async function measureEngine(): Promise<BenchLine[]> {
  const options = { frequencies: benchFrequencies }
  return [
    {
      what: 'Full analysis, 400 frequencies',
      measured: await medianDuration(100, () => analyse(benchDesign, options)),
      unit: 'ms',
      goal: 8,
    },
    {
      what: 'Compensator proposal over the corners of line and load',
      measured: await medianDuration(20, () => proposeCompensator(benchDesign, {})),
      unit: 'ms',
      goal: 150,
    },
    {
      what: 'Corner set of line and load',
      measured: await medianDuration(30, () => analyseCorners(benchDesign, options)),
      unit: 'ms',
      goal: 300,
    },
    {
      what: 'Closed loop cycle by cycle, 2 000 periods',
      measured: await medianDuration(20, () => simulate(benchDesign, { cycles: 1980 })),
      unit: 'ms',
      goal: 150,
    },
  ]
}
