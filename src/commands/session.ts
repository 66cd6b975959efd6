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
  /** Columns to fill: COLUMNS of the environment, else those of the terminal that shows stdout, else a fixed width. */
  readonly width: number
  readonly colour: boolean
  /** Shows a passing line on a terminal's stderr; "" removes it. Silent elsewhere. */
  readonly progress: (text: string) => void
}

const widthWithoutTerminal = 120
const [narrowest, widest] = [40, 400]

/** The session of this process. */
export function openSession(root: URL): Session {
  const { stdout, stderr, env } = process
  return {
    root,
    version: JSON.parse(readFileSync(new URL('package.json', root), 'utf8')).version,
    print: (text) => void stdout.write(text),
    tell: (text) => void stderr.write(text),
    width: widthOf(env.COLUMNS, stdout.isTTY ? stdout.columns : undefined),
    colour: stdout.isTTY && (env.NO_COLOR ?? '') === '' && env.TERM !== 'dumb',
    progress: (text) => {
      if (stderr.isTTY) stderr.write(`\r\u001B[K${text}`)
    },
  }
}

/** COLUMNS counts where it is a sensible whole number, with and without a terminal. */
export function widthOf(asked: string | undefined, terminal: number | undefined): number {
  const columns = /^\d{1,4}$/.test(asked ?? '') ? Number(asked) : 0
  if (columns >= narrowest && columns <= widest) return columns
  return terminal === undefined || terminal === 0 ? widthWithoutTerminal : terminal
}

/** Lets a waiting Ctrl-C through: signals are heard only between two turns of the event loop. */
export function breathe(): Promise<void> {
  return new Promise((resolve) => setImmediate(resolve))
}
