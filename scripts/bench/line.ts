/** One line of the table: what was measured, what it is held to. */
export interface BenchLine {
  readonly what: string
  readonly measured: number
  readonly unit: 'ms' | 'MB' | 'kB'
  /** The most that it may be; null for what stands there for comparison. */
  readonly goal: number | null
}

/** The middle of the durations of `runs` calls, in ms, after as many calls to warm up. */
export async function medianDuration(runs: number, work: () => unknown): Promise<number> {
  for (let run = 0; run < runs; run += 1) await work()
  const durations: number[] = []
  for (let run = 0; run < runs; run += 1) {
    const start = performance.now()
    await work()
    durations.push(performance.now() - start)
  }
  return median(durations)
}

export function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b)
  return sorted[Math.floor(sorted.length / 2)] ?? NaN
}

/** Prints the lines as one table with a verdict each. @returns whether all goals were met */
export function printTable(lines: readonly BenchLine[]): boolean {
  const figure = (value: number, unit: string) => `${value.toPrecision(value < 100 ? 2 : 3)} ${unit}`
  const rows = lines.map(({ what, measured, unit, goal }) => ({
    what,
    measured: figure(measured, unit),
    goal: goal === null ? 'for comparison' : `under ${figure(goal, unit)}`,
    verdict: goal === null ? '' : measured < goal ? 'holds' : 'misses',
  }))
  const columns = ['what', 'measured', 'goal', 'verdict'] as const
  const widths = columns.map((column) => Math.max(column.length, ...rows.map((row) => row[column].length)))
  const print = (cells: readonly string[]) =>
    console.log(cells.map((cell, i) => cell.padEnd(widths[i] ?? 0)).join('  '))
  print(columns)
  print(widths.map((width) => '-'.repeat(width)))
  for (const row of rows) print(columns.map((column) => row[column]))
  return rows.every(({ verdict }) => verdict !== 'misses')
}
