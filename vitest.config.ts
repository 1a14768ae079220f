import { fileURLToPath } from 'node:url'
import { defineConfig } from 'vitest/config'

const alias = { '@': fileURLToPath(new URL('.', import.meta.url)).replace(/\/$/, '') }
const API_TESTS = ['tests/server/**/*.test.ts', 'tests/db/**/*.test.ts']

export default defineConfig({
  resolve: { alias },
  test: {
    projects: [
      {
        resolve: { alias },
        test: {
          name: 'unit',
          include: ['tests/**/*.test.{ts,tsx}'],
          exclude: [...API_TESTS, 'tests/browser/**'],
          testTimeout: 30_000,
        },
      },
      {
        // Each file makes its own database on the server that DATABASE_ADMIN_URL names.
        resolve: { alias },
        test: { name: 'api', include: API_TESTS, testTimeout: 30_000, hookTimeout: 60_000 },
      },
    ],
  },
})
