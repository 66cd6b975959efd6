/** `npm test` after the build: static checks, then every test; the last line is "N passed, N failed". */
import { spawnSync } from 'node:child_process'
import { readFileSync, rmSync } from 'node:fs'
import { findChromium } from './chromium.ts'

const reportFile = 'dist/build/test-report.json'

function run(command: string, args: readonly string[], environment: Record<string, string> = {}): boolean {
  const { status } = spawnSync(`node_modules/.bin/${command}`, args, {
    stdio: 'inherit',
    env: { ...process.env, ...environment },
  })
  return status === 0
}

function runVitest(chromium: string | null): { passed: number; failed: number } {
  rmSync(reportFile, { force: true })
  const args = ['run', '--config', 'tests/vitest.config.ts', '--reporter=default', '--reporter=json']
  const browser = chromium === null ? {} : { EBBWATT_CHROMIUM: chromium }
  const succeeded = run('vitest', [...args, `--outputFile.json=${reportFile}`], browser)
  const report = JSON.parse(readFileSync(reportFile, 'utf8'))
  const failed = report.numFailedTests + report.testResults.filter(unloadable).length
  // An error outside any test (an unhandled rejection) fails the run although every test passed.
  return { passed: report.numPassedTests, failed: succeeded ? failed : Math.max(failed, 1) }
}

/** A file that could not be loaded fails without holding a single test. */
function unloadable(file: { status: string; assertionResults: unknown[] }): boolean {
  return file.status === 'failed' && file.assertionResults.length === 0
}

const chromium = findChromium()
const checks: readonly (readonly [string, readonly string[]])[] = [
  ['tsc', ['--noEmit', '-p', 'tests']],
  ['biome', ['check', '--config-path=.biome.json']],
  ['knip', []],
]
const brokenChecks = checks.filter(([command, args]) => !run(command, args)).map(([command]) => command)
if (process.env.CI === 'true' && chromium === null) brokenChecks.push('chromium')
const { passed, failed } = runVitest(chromium)
if (brokenChecks.length > 0) console.error(`failed outside the tests: ${brokenChecks.join(', ')}`)
const allFailed = failed + brokenChecks.length
console.log(`${passed} passed, ${allFailed} failed`)
process.exitCode = allFailed === 0 ? 0 : 1
