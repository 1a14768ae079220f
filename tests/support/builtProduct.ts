/** The built product on TEST_PORT with a database of its own, for tests and measurements in the browser. */
import { createTestDatabase } from '@/tests/support/database'

const { url, drop } = await createTestDatabase()
Object.assign(process.env, {
  NODE_ENV: 'production',
  DATABASE_URL: url,
  PORT: process.env.TEST_PORT,
  LOG_LEVEL: 'warn',
  RATE_LIMIT_PER_MINUTE: '1000000',
})
const built = new URL('../../build/', import.meta.url)
await import(new URL('prepare.js', built).href)
await import(new URL('index.js', built).href)
process.on('beforeExit', () => void drop().finally(() => process.exit()))
