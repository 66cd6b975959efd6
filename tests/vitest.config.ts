import { defineConfig } from 'vitest/config'

/**
 * For mutation testing, which runs the tests thousands of times: what starts processes, needs a built program or a
 * browser, or only repeats the core through other entrances is left out.
 */
const mutating = process.env.STRYKER_MUTATOR_WORKER !== undefined
const left = ['bench', 'commands', 'demo', 'end-to-end', 'faults', 'fuzz', 'report', 'security', 'study']

/** Threads without isolation: the core is pure, so files cannot disturb one another and share their imports. */
export default defineConfig({
  root: new URL('..', import.meta.url).pathname,
  test: {
    include: ['tests/**/*.test.ts'],
    exclude: mutating
      ? ['tests/*.test.ts', `tests/{${left.join(',')}}/**`, 'tests/{capture/command,capture/defects}.test.ts']
      : [],
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
