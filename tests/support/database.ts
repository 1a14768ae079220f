import { randomUUID } from 'node:crypto'

import { Client } from 'pg'

/** The server on which tests make their databases; the test commands start one and say where it is. */
function adminUrl(): string {
  const url = process.env.DATABASE_ADMIN_URL
  if (!url)
    throw new Error('DATABASE_ADMIN_URL is not set: run the tests with npm test, npm run test:api or test:browser.')
  return url
}

async function asAdmin(statement: string): Promise<void> {
  const client = new Client({ connectionString: adminUrl() })
  await client.connect()
  try {
    await client.query(statement)
  } finally {
    await client.end()
  }
}

export interface TestDatabase {
  readonly url: string
  readonly drop: () => Promise<void>
}

/** Makes an empty database of its own for one test file, so that files can run side by side. */
export async function createTestDatabase(): Promise<TestDatabase> {
  const name = `test_${randomUUID().replaceAll('-', '')}`
  await asAdmin(`create database ${name}`)
  const url = new URL(adminUrl())
  url.pathname = `/${name}`
  return { url: url.href, drop: () => asAdmin(`drop database if exists ${name} with (force)`) }
}
