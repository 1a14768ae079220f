import { describe, expect, it } from 'vitest'

import { EnvError, readEnv } from '@/server/env'

describe('settings', () => {
  it('work without any variable set', () => {
    const env = readEnv({})
    expect(env).toMatchObject({ HOST: '127.0.0.1', PORT: 3000, NODE_ENV: 'development' })
    expect(new URL(env.DATABASE_URL).hostname).toBe('127.0.0.1')
  })

  it('take an empty variable for one that is not set', () => {
    expect(readEnv({ PORT: '', DATABASE_URL: '' })).toEqual(readEnv({}))
  })

  it('read numbers from text', () => {
    expect(readEnv({ PORT: '8080', COMPUTE_TIMEOUT_MS: '2500' })).toMatchObject({
      PORT: 8080,
      COMPUTE_TIMEOUT_MS: 2500,
    })
  })

  it('name everything that is wrong at once, each with what it should be', () => {
    const bad = { PORT: 'high', COMPUTE_THREADS: '0', LOG_LEVEL: 'loud', TRUSTED_PROXIES: '1.5' }
    expect(() => readEnv(bad)).toThrow(EnvError)
    expect(() => readEnv(bad)).toThrow(/PORT must be a number, but is "high"\.$/m)
    expect(() => readEnv(bad)).toThrow(/COMPUTE_THREADS must be at least 1, but is "0"\.$/m)
    expect(() => readEnv(bad)).toThrow(/LOG_LEVEL must be silent, error, warn, info or debug, but is "loud"\.$/m)
    expect(() => readEnv(bad)).toThrow(/TRUSTED_PROXIES must be a whole number, but is "1\.5"\.$/m)
  })

  it('never print a database address, which may hold a password', () => {
    expect(() => readEnv({ DATABASE_URL: 'mysql://root:hunter2@db/steadrail' })).toThrow(/DATABASE_URL must be/)
    expect(() => readEnv({ DATABASE_URL: 'mysql://root:hunter2@db/steadrail' })).not.toThrow(/hunter2/)
  })
})
