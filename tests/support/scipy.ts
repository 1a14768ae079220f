import { execFileSync } from 'node:child_process'

/**
 * Runs a piece of Python with NumPy and SciPy (Debian's packages) as the independent reference.
 * @param script - reads the JSON `input` as `data` and assigns what it found to `answer`.
 */
export function scipy<T>(script: string, input: unknown): T {
  const program = `import json, sys, numpy as np, scipy.linalg, scipy.signal\ndata = json.load(sys.stdin)\n${script}\nprint(json.dumps(answer))`
  const output = execFileSync('/usr/bin/python3', ['-c', program], { input: JSON.stringify(input), encoding: 'utf8' })
  return JSON.parse(output) as T
}
