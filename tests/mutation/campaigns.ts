/**
 * What must notice a deliberate fault in each folder of the core: the tests that stand beside it.
 * The built command and the long tests of accuracy would notice more, but thousands of faults cannot wait for them.
 */
export const campaigns: Readonly<Record<string, readonly string[]>> = {
  models: ['tests/models/!(*-ode|second-route).test.ts'],
  evidence: ['tests/evidence/!(coverage).test.ts'],
  stage: ['tests/stage/!(*-integration).test.ts'],
  decision: ['tests/decision/*.test.ts'],
  capture: ['tests/capture/!(accuracy|append|command|defects|demo|reduce|robust|settings|table).test.ts'],
  units: ['tests/input/{parse-quantity,unit-class}.test.ts'],
}
