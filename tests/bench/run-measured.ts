import { spawnSync } from 'node:child_process'

/** What a run of the built command took. */
export interface MeasuredRun {
  /** By the clock, and of all threads together. [s] */
  readonly seconds: number
  readonly processorSeconds: number
  /** Largest resident memory. [MB] */
  readonly megabytes: number
  readonly out: string
}

const tell = "process.on('exit',()=>process.stderr.write('\\n'+JSON.stringify(process.resourceUsage())))"

/** Runs `dist/cli.cjs`, which must end with 0, and asks its process for what it used. */
export function runMeasured(args: readonly string[]): MeasuredRun {
  const begun = performance.now()
  const { status, stdout, stderr } = spawnSync(
    process.execPath,
    ['--import', `data:text/javascript,${encodeURIComponent(tell)}`, 'dist/cli.cjs', ...args],
    { encoding: 'utf8', maxBuffer: 1 << 30 },
  )
  const seconds = (performance.now() - begun) / 1000
  if (status !== 0) throw new Error(`ebbwatt ${args.join(' ')} ended with ${status}: ${stderr.slice(0, 1000)}`)
  const used = JSON.parse(stderr.slice(stderr.lastIndexOf('\n')))
  return {
    seconds,
    processorSeconds: (used.userCPUTime + used.systemCPUTime) / 1e6,
    megabytes: used.maxRSS / 1024,
    out: stdout,
  }
}
