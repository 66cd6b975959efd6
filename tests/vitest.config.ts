import { defineConfig } from 'vitest/config'

/** Threads without isolation: the core is pure, so files cannot disturb one another and share their imports. */
export default defineConfig({
  root: new URL('..', import.meta.url).pathname,
  test: {
    include: ['tests/**/*.test.ts'],
    pool: 'threads',
    isolate: false,
    maxWorkers: 2,
    testTimeout: 60_000,
    hookTimeout: 60_000,
    coverage: {
      provider: 'v8',
      include: ['src/{models,evidence,stage,decision,capture}/**', 'src/input/units/**'],
      reportsDirectory: 'coverage',
    },
  },
})
