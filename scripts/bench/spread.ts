/** Corners and the statistical run, beside NumPy answering the same question from the textbook's closed form. */
import { execFile } from 'node:child_process'
import { fileURLToPath } from 'node:url'
import { promisify } from 'node:util'

import { analyseToleranceCorners, runSpread } from '@/converters'
import { type BenchLine, median } from '@/scripts/bench/line'
import { benchDesign } from '@/scripts/bench/subject'

const run = promisify(execFile)
const here = (name: string) => fileURLToPath(new URL(name, import.meta.url))

export async function measureSpread(): Promise<BenchLine[]> {
  const { closedForm, statistical } = await besideNumPy(5)
  const switched = await Promise.all([0, 1].map((index) => spreadPart('switched', 10_000, index, 2)))
  const large = await spreadPart('averaged', 100_000, 0, 1)
  return [
    {
      what: 'Tolerance corners, 512, averaged model',
      measured: processorTime(10, () => analyseToleranceCorners(benchDesign, { model: 'averaged' })),
      unit: 'ms',
      goal: 300,
    },
    {
      what: 'Tolerance corners, 512, switched model',
      measured: processorTime(3, () => analyseToleranceCorners(benchDesign)),
      unit: 'ms',
      goal: null,
    },
    {
      what: 'NumPy, second-order closed form, 10 000 samples at 400 frequencies',
      measured: closedForm,
      unit: 'ms',
      goal: null,
    },
    {
      what: 'Statistical run, 10 000 samples, averaged model: half of NumPy',
      measured: statistical,
      unit: 'ms',
      goal: closedForm / 2,
    },
    {
      what: 'The same with the switched model, two cores, each core’s time',
      measured: Math.max(...switched.map((part) => part.processorTime)),
      unit: 'ms',
      goal: 8000,
    },
    { what: 'Memory of a run of 100 000 samples', measured: large.memory, unit: 'MB', goal: 600 },
  ]
}

/** Processor times in ms, taken in turns, so that whatever else the machine does slows both. */
async function besideNumPy(rounds: number): Promise<{ closedForm: number; statistical: number }> {
  const closedForms: number[] = []
  const statisticals: number[] = []
  const work = () => runSpread(benchDesign, { samples: 10_000 })
  for (let round = 0; round < rounds; round++) work() // to warm up
  for (let round = 0; round < rounds; round++) {
    const { stdout } = await run('/usr/bin/python3', [here('secondOrder.py')])
    closedForms.push(Number(stdout))
    statisticals.push(processorTimeOf(work))
  }
  return { closedForm: median(closedForms), statistical: median(statisticals) }
}

/** The middle of the processor times of `runs` calls, in ms, after as many to warm up. */
function processorTime(runs: number, work: () => unknown): number {
  for (let k = 0; k < runs; k++) work()
  return median(Array.from({ length: runs }, () => processorTimeOf(work)))
}

function processorTimeOf(work: () => unknown): number {
  const before = process.cpuUsage()
  work()
  const { user, system } = process.cpuUsage(before)
  return (user + system) / 1000
}

interface Taken {
  readonly processorTime: number // ms
  readonly memory: number // MB
}

async function spreadPart(model: string, samples: number, index: number, of: number): Promise<Taken> {
  const args = ['--import', 'tsx', here('spreadPart.ts'), model, ...[samples, index, of].map(String)]
  const { stdout } = await run(process.execPath, args)
  return JSON.parse(stdout) as Taken
}
