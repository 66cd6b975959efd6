import { spawnSync } from 'node:child_process'
import { resolve } from 'node:path'

export interface Outcome {
  readonly code: number | null
  readonly out: string
  readonly err: string
}

const program = resolve('dist/cli.cjs')

/** Runs the built command as a shell would, without a terminal. */
export function ebbwatt(args: readonly string[], { cwd = '.', environment = {} }: RunPlace = {}): Outcome {
  const { status, stdout, stderr } = spawnSync(process.execPath, [program, ...args], {
    cwd,
    encoding: 'utf8',
    env: { PATH: process.env.PATH, ...environment },
    maxBuffer: 64 * 1024 * 1024,
  })
  return { code: status, out: stdout, err: stderr }
}

interface RunPlace {
  readonly cwd?: string
  readonly environment?: Readonly<Record<string, string>>
}
