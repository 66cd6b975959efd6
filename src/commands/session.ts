import { readFileSync } from 'node:fs'

/** The process as a command sees it; `cli.ts` opens the real one, tests make their own. */
export interface Session {
  /** Folder of the installed package, for what ships beside the program. */
  readonly root: URL
  readonly version: string
  /** Writes to stdout: results only. */
  readonly print: (text: string) => void
  /** Writes to stderr: everything else. */
  readonly tell: (text: string) => void
  /** Columns of the terminal that shows stdout; a fixed width where there is none. */
  readonly width: number
  readonly colour: boolean
  /** Shows a passing line on a terminal's stderr; "" removes it. Silent elsewhere. */
  readonly progress: (text: string) => void
}

const widthWithoutTerminal = 120

/** The session of this process. */
export function openSession(root: URL): Session {
  const { stdout, stderr, env } = process
  return {
    root,
    version: JSON.parse(readFileSync(new URL('package.json', root), 'utf8')).version,
    print: (text) => void stdout.write(text),
    tell: (text) => void stderr.write(text),
    width: stdout.isTTY ? stdout.columns : widthWithoutTerminal,
    colour: stdout.isTTY && (env.NO_COLOR ?? '') === '' && env.TERM !== 'dumb',
    progress: (text) => {
      if (stderr.isTTY) stderr.write(`\r\u001B[K${text}`)
    },
  }
}

/** Lets a waiting Ctrl-C through: signals are heard only between two turns of the event loop. */
export function breathe(): Promise<void> {
  return new Promise((resolve) => setImmediate(resolve))
}
