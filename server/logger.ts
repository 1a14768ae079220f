import { type Logger, pino } from 'pino'

import type { Env } from '@/server/env'

/** One JSON object a line on standard output. */
export function createLogger({ LOG_LEVEL }: Pick<Env, 'LOG_LEVEL'>): Logger {
  return pino({ level: LOG_LEVEL, base: undefined, timestamp: pino.stdTimeFunctions.isoTime })
}
