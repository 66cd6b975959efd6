import { spawnSync } from 'node:child_process'
import { readFileSync, rmSync } from 'node:fs'
import { join, resolve } from 'node:path'
import { type FuzzCase, type FuzzOutcome, wordsOf } from './fuzz-case.ts'
import { layOut, type RunPlace, writtenFiles } from './run-inside.ts'

const program = resolve('dist/cli.cjs')
const peakFile = '.peak'

/** Loaded before the program: leaves behind how much memory the process took at most. */
const peakReporter = `data:text/javascript,${encodeURIComponent(
  `import { writeFileSync } from 'node:fs'; process.on('exit', () => writeFileSync('${peakFile}', String(process.resourceUsage().maxRSS)))`,
)}`

/** Runs the built command as a process of its own, with its memory measured and its time limited. */
export async function runChild(fuzzCase: FuzzCase, place: RunPlace): Promise<FuzzOutcome> {
  layOut(fuzzCase, place)
  const begin = performance.now()
  const { status, stdout, stderr } = spawnSync(
    process.execPath,
    ['--import', peakReporter, program, ...wordsOf(fuzzCase)],
    {
      cwd: place.folder,
      encoding: 'utf8',
      env: { PATH: process.env.PATH },
      maxBuffer: 512 * 1024 * 1024,
      timeout: 60_000,
    },
  )
  const seconds = (performance.now() - begin) / 1000
  const memory = Number(readFileSync(join(place.folder, peakFile), 'utf8')) * 1024
  rmSync(join(place.folder, peakFile))
  const written = writtenFiles(fuzzCase, place)
  return { code: status, out: stdout, err: stderr, seconds, memory, written, notFinite: [] }
}
