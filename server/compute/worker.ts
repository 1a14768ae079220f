/** Runs in a worker thread: one task in, one answer out, already written as JSON so that the server only passes it on. */
import { DesignError } from '@/converters/errors'
import type { WorkerAnswer, WorkerMessage } from '@/server/compute/messages'
import { requestField } from '@/server/compute/requestField'
import { compute } from '@/server/compute/tasks'
import { writeAnswer } from '@/server/presenters/answer'

export default function run({ request, started }: WorkerMessage): WorkerAnswer {
  Atomics.store(started, 0, 1)
  try {
    return { kind: 'answered', json: writeAnswer(compute(request)) }
  } catch (error) {
    // An error loses its fields on the way between threads.
    if (!(error instanceof DesignError)) throw error
    const { code, message } = error
    const problems = error.problems.map((problem) => ({ ...problem, field: requestField(request.task, problem.field) }))
    return { kind: 'refused', code, message, problems }
  }
}
