/** One worker's part of a statistical run, in a process of its own: what it takes in processor time and memory, as JSON. */
import { startRun } from '@/converters'
import { benchDesign } from '@/scripts/bench/subject'

const [model, samples, index, of] = process.argv.slice(2)
const before = process.cpuUsage()
const run = startRun(benchDesign, { model, samples: Number(samples) }, { index: Number(index), of: Number(of) })
while (run.next(500));
run.snapshot()
const { user, system } = process.cpuUsage(before)
console.log(
  JSON.stringify({
    processorTime: (user + system) / 1000,
    memory: process.resourceUsage().maxRSS / 1024,
  }),
)
