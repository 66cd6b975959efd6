import { spawnSync } from 'node:child_process'
import { readFileSync, rmSync } from 'node:fs'
import { join, resolve } from 'node:path'
import { type FuzzCase, type FuzzOutcome, wordsOf } from './fuzz-case.ts'
import { layOut, processorSeconds, type RunPlace, writtenFiles } from './run-inside.ts'

const program = resolve('dist/cli.cjs')
const usageFile = '.usage'

/** Loaded before the program: leaves behind how much memory the process took at most, and how much time of processors. */
const usageReporter = `data:text/javascript,${encodeURIComponent(
  `import { writeFileSync } from 'node:fs'; process.on('exit', () => writeFileSync('${usageFile}', JSON.stringify({ ...process.cpuUsage(), memory: process.resourceUsage().maxRSS })))`,
)}`

/** Runs the built command as a process of its own, with its memory measured and its time limited. */
export async function runChild(fuzzCase: FuzzCase, place: RunPlace): Promise<FuzzOutcome> {
  layOut(fuzzCase, place)
  const { status, stdout, stderr } = spawnSync(
    process.execPath,
    ['--import', usageReporter, program, ...wordsOf(fuzzCase)],
    {
      cwd: place.folder,
      encoding: 'utf8',
      env: { PATH: process.env.PATH },
      maxBuffer: 512 * 1024 * 1024,
      timeout: 60_000,
    },
  )
  const usage = JSON.parse(readFileSync(join(place.folder, usageFile), 'utf8'))
  rmSync(join(place.folder, usageFile))
  const written = writtenFiles(fuzzCase, place)
  return {
    code: status,
    out: stdout,
    err: stderr,
    seconds: processorSeconds(usage),
    memory: usage.memory * 1024,
    written,
    notFinite: [],
  }
}
