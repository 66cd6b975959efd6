import { spawnSync } from 'node:child_process'

/** How long a command takes beside a bare `node -e 0` of the same round. */
export interface StartUp {
  readonly command: string
  /** Median of the rounds. [s] */
  readonly seconds: number
  /** Median of command over bare, round by round: what else the machine does hits both. */
  readonly timesBare: number
}

const bare = ['-e', '0']
const commands: readonly (readonly [string, readonly string[]])[] = [
  ['ebbwatt --help', ['dist/cli.cjs', '--help']],
  ['ebbwatt rank pump-boost.yaml', ['dist/cli.cjs', 'rank', 'catalogs-demo/stages/pump-boost.yaml']],
]

/** Runs every command once per round, beside a bare node; the first round warms the disk's cache and does not count. */
export function measureStartUp(rounds: number): readonly StartUp[] {
  const samples = Array.from({ length: rounds + 1 }, () => {
    const reference = secondsOf(bare)
    return commands.map(([, args]) => ({ seconds: secondsOf(args), reference }))
  }).slice(1)
  return commands.map(([command], index) => ({
    command,
    seconds: median(samples.map((round) => round[index]!.seconds)),
    timesBare: median(samples.map((round) => round[index]!.seconds / round[index]!.reference)),
  }))
}

function secondsOf(args: readonly string[]): number {
  const begun = process.hrtime.bigint()
  const { status } = spawnSync(process.execPath, args, { stdio: 'ignore' })
  if (status !== 0) throw new Error(`node ${args.join(' ')} ended with ${status}`)
  return Number(process.hrtime.bigint() - begun) / 1e9
}

function median(values: readonly number[]): number {
  const sorted = values.toSorted((a, b) => a - b)
  return (sorted[(sorted.length - 1) >> 1]! + sorted[sorted.length >> 1]!) / 2
}
