import { DesignDocument } from '@/converters/document'
import type { TaskName } from '@/server/compute/messages'

const DESIGN_SECTIONS = new Set(Object.keys(DesignDocument.shape))

/** Tasks whose request carries the engine's options apart from the design. */
const HAS_OPTIONS: ReadonlySet<TaskName> = new Set(['compensators', 'simulation', 'toleranceCorners', 'spreadCheck'])

/**
 * The engine names a field by its path in the design or in the options, `outputCapacitors[0].esr`; the API by its path in
 * the request, `design.outputCapacitors.0.esr`.
 */
export function requestField(task: TaskName, engineField: string): string {
  const path = engineField.replace(/\[(\d+)\]/g, '.$1')
  const [section = ''] = path.split('.')
  if (task === 'stageProposal') return path === '' ? 'requirements' : `requirements.${path}`
  if (path === '') return 'design'
  if (DESIGN_SECTIONS.has(section)) return `design.${path}`
  return HAS_OPTIONS.has(task) && section !== 'options' ? `options.${path}` : path
}
