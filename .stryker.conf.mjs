/** `npm run mutation` names the folder whose faults are tried; tests/mutation/campaigns.ts says what must notice them. */
const folder = process.env.EBBWATT_MUTATED ?? 'models'
const sources = folder === 'units' ? 'src/input/units' : `src/${folder}`

export default {
  testRunner: 'vitest',
  vitest: { configFile: 'tests/vitest.config.ts' },
  plugins: ['@stryker-mutator/vitest-runner'],
  mutate: [`${sources}/**/*.ts`],
  ignorePatterns: ['coverage', 'catalogs-demo/**/*.html', 'reports', 'dist'],
  // There is no such file: Stryker would hand it to a compiler interface that TypeScript 7 does not have.
  tsconfigFile: 'tsconfig.none.json',
  coverageAnalysis: 'perTest',
  ignoreStatic: true,
  concurrency: Number(process.env.EBBWATT_MUTATION_PROCESSES ?? 2),
  timeoutMS: 4_000,
  incremental: true,
  incrementalFile: `coverage/mutation-${folder}-known.json`,
  reporters: ['clear-text', 'json'],
  jsonReporter: { fileName: `coverage/mutation-${folder}.json` },
  clearTextReporter: { allowColor: false, logTests: false },
  tempDirName: '.stryker-tmp',
}
