import react from '@vitejs/plugin-react'
import { defineConfig } from 'vitest/config'

const database = './tests/server/harness/global-setup.ts'

export default defineConfig({
  test: {
    projects: [
      {
        plugins: [react()],
        test: {
          name: 'unit',
          include: ['tests/core/**/*.test.{ts,tsx}', 'tests/reference/**/*.test.ts', 'tests/client/**/*.test.{ts,tsx}'],
          // Some of the reference judges are programs that take a second to start.
          testTimeout: 30_000,
        },
      },
      {
        test: {
          name: 'server',
          include: ['tests/server/**/*.test.ts', 'tests/robustness/**/*.test.ts'],
          globalSetup: [database],
          env: { NODE_ENV: 'test' },
          testTimeout: 30_000,
          hookTimeout: 60_000,
        },
      },
      {
        test: {
          name: 'browser',
          include: ['tests/browser/**/*.test.ts'],
          globalSetup: [database, './tests/browser/harness/build.ts'],
          env: { NODE_ENV: 'test' },
          // One file at a time: a browser, a server and a database already keep two cores busy.
          fileParallelism: false,
          testTimeout: 120_000,
          hookTimeout: 180_000,
        },
      },
    ],
  },
})
