import { readdirSync } from 'node:fs'

/** One folder of the core, and the tests beside it that must notice a deliberate fault there. */
export interface Campaign {
  readonly sources: string
  readonly tests: string
  /** Names of test files that are left out: the long ones, and those of other folders. */
  readonly without?: RegExp
  readonly only?: RegExp
  /** Files are loaded anew for every fault: they remember what was asked once. */
  readonly anew?: boolean
}

/** The built command and the long tests of accuracy would notice more, but thousands of faults cannot wait for them. */
export const campaigns: Readonly<Record<string, Campaign>> = {
  models: { sources: 'src/models', tests: 'tests/models', without: /-ode|second-route/ },
  evidence: { sources: 'src/evidence', tests: 'tests/evidence', without: /coverage/ },
  stage: { sources: 'src/stage', tests: 'tests/stage', without: /-integration/ },
  decision: { sources: 'src/decision', tests: 'tests/decision' },
  capture: {
    sources: 'src/capture',
    tests: 'tests/capture',
    without: /^(accuracy|append|command|defects|demo|reduce|robust|settings|table)\./,
  },
  units: { sources: 'src/input/units', tests: 'tests/input', only: /^(parse-quantity|unit-class)\./, anew: true },
}

export function sourcesOf({ sources }: Campaign): readonly string[] {
  return filesIn(sources).filter((name) => name.endsWith('.ts'))
}

export function testsOf({ tests, without, only }: Campaign): readonly string[] {
  const name = (path: string): string => path.slice(path.lastIndexOf('/') + 1)
  return filesIn(tests)
    .filter((path) => path.endsWith('.test.ts'))
    .filter((path) => !without?.test(name(path)) && (only?.test(name(path)) ?? true))
}

function filesIn(folder: string): readonly string[] {
  return readdirSync(folder, { recursive: true, encoding: 'utf8' })
    .map((name) => `${folder}/${name}`)
    .sort()
}
