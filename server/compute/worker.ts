/** Runs in a worker thread: one task in, one answer out, already written as JSON so that the server only passes it on. */
import { DesignError } from '@/converters/errors'
import type { SpreadAnswer, SpreadWork, TaskName, WorkerAnswer, WorkerMessage } from '@/server/compute/messages'
import { requestField } from '@/server/compute/requestField'
import { doSpreadWork } from '@/server/compute/spreadWork'
import { compute } from '@/server/compute/tasks'
import { writeAnswer } from '@/server/presenters/answer'

export default function run({ request, started }: WorkerMessage): WorkerAnswer {
  Atomics.store(started, 0, 1)
  return refusing(request.task, () => ({ kind: 'answered', json: writeAnswer(compute(request)) }))
}

/** A piece of a statistical run, by its name from the pool. */
export function spread(work: SpreadWork): SpreadAnswer {
  return refusing('spreadCheck', () => doSpreadWork(work))
}

function refusing<Answer>(task: TaskName, answer: () => Answer): Answer | (WorkerAnswer & { kind: 'refused' }) {
  try {
    return answer()
  } catch (error) {
    // An error loses its fields on the way between threads.
    if (!(error instanceof DesignError)) throw error
    const { code, message } = error
    const problems = error.problems.map((problem) => ({ ...problem, field: requestField(task, problem.field) }))
    return { kind: 'refused', code, message, problems }
  }
}
