#!/usr/bin/env node
import { Command, CommanderError, InvalidArgumentError } from 'commander'
import type { StudyOptions } from './commands/read-study.ts'
import { openSession } from './commands/session.ts'
import { loadProgram, type Program } from './load-program.ts'

/** Both `src/` and `dist/` lie right under the package's folder. */
const session = openSession(new URL('..', import.meta.url))
let loaded: Program | undefined

/** Needed once there is work, so that --help does not wait for it. */
function loadOnce(): Program {
  loaded ??= loadProgram(session.root)
  return loaded
}

process.on('SIGINT', () => process.exit(130))
for (const stream of [process.stdout, process.stderr]) {
  stream.on('error', (error) => process.exit(loadOnce().outcomeOfStream(error, session) ?? process.exitCode ?? 0))
}

const argv = process.argv.slice(2)
void obey(argv).then((outcome) => {
  process.exitCode = outcome
})

async function obey(argv: readonly string[]): Promise<number> {
  const command = new Command('ebbwatt')
  let outcome = 0
  describe(command, async (run) => {
    outcome = await run
  })
  try {
    await command.parseAsync([...argv], { from: 'user' })
    return outcome
  } catch (error) {
    if (!(error instanceof CommanderError)) return loadOnce().outcomeOf(session, argv, () => Promise.reject(error))
    if (error.exitCode === 0) return 0
    const refused = loadOnce().usageFailure(error.code, error.message)
    return loadOnce().outcomeOf(session, argv, () => Promise.reject(refused))
  }
}

type Settle = (run: Promise<number>) => Promise<void>

function describe(program: Command, settle: Settle): void {
  program
    .description(
      "Compares rectifiers for one hard-switched converter stage: what each one's reverse recovery, conduction and\nleakage cost at the stage's own operating point, how hot it gets, and how sure that is.",
    )
    .version(session.version, '-V, --version', 'print the version')
    .helpOption('-h, --help', 'print this help')
    .exitOverride()
    .configureOutput({ writeOut: session.print, writeErr: () => {}, getOutHelpWidth: () => session.width })
    .showSuggestionAfterError(true)
    .addHelpText('after', afterword)
  describeStudies(program, settle)
  describeFiles(program, settle)
}

const afterword = `
Exit codes: 0 done, 1 internal fault, 2 input cannot be used, 3 no candidate is acceptable,
4 --strict and a warning names a ranked candidate or one of its figures is a class guess.

First steps: ebbwatt start my-stage && ebbwatt rank my-stage/stage.yaml`

function describeStudies(program: Command, settle: Settle): void {
  studyCommand(program, 'rank', 'rank the candidate rectifiers of a stage: losses, temperature, margin, odds')
    .option('--top <n>', 'list at most so many; the others are counted', wholeNumber(2, 1e6), 50)
    .action((stage: string, options: StudyOptions) => settle(loadOnce().runRank(stage, options, session)))
  studyCommand(
    program,
    'trend',
    'follow losses and temperatures over a quantity; where the order changes, what sets the limits',
  )
    .requiredOption('--over <quantity>', 'frequency, load, slope, ambient, input or inductance')
    .requiredOption('--from <value>', 'lower end, with its unit: "20 kHz"')
    .requiredOption('--to <value>', 'upper end, with its unit')
    .option('--steps <n>', 'number of points', wholeNumber(2, 1000), 25)
    .option('--log', 'equal ratios between the points instead of equal steps')
    .action((stage, options) => settle(loadOnce().runTrend(stage, options, session)))
  studyCommand(program, 'swap', 'is replacing one rectifier by another justified?')
    .option('--from <id>', "the part in use (default: the stage's incumbent)")
    .requiredOption('--to <id>', 'the part to replace it')
    .action((stage, options) => settle(loadOnce().runSwap(stage, options, session)))
  studyCommand(program, 'review', 'write the document for a design review: -o review.html or -o review.md').action(
    (stage: string, options: StudyOptions) => settle(loadOnce().runReview(stage, options, session)),
  )
}

/** A command that studies one stage takes the same options as the others. */
function studyCommand(program: Command, name: string, summary: string): Command {
  return program
    .command(name)
    .argument('<stage>', 'stage file')
    .summary(summary)
    .description(summary)
    .option('--json', 'print one JSON document')
    .option('--csv', 'print CSV, units in the header')
    .option('--markdown', 'print a Markdown table')
    .option('-o, --output <file>', 'write to a file; its ending decides the form (.html .md .csv .json .svg .txt)')
    .option('--records <path>', 'rectifier records, a file or a folder; may be repeated', collect)
    .option('--only <id>', 'consider this candidate; may be repeated', collect)
    .option('--mapping <file>', 'which column of a CSV catalogue is which property')
    .option('--seed <n>', 'start of the random draws', wholeNumber(0, 2 ** 32 - 1), 1)
    .option('--draws <n>', 'number of random draws', wholeNumber(1, 1e6), 1000)
    .option('--strict', 'exit code 4 where a warning or a class guess touches a ranked candidate')
    .option('--quiet', 'no progress and no notes; cautions stay')
}

function describeFiles(program: Command, settle: Settle): void {
  program
    .command('reduce')
    .argument('<capture>', 'capture settings')
    .summary('reduce an oscilloscope capture to a recovery row')
    .description('reduce an oscilloscope capture to a recovery row')
    .option('--json', 'print one JSON document')
    .option('-o, --output <file>', 'write to a file; its ending decides the form')
    .option('--into <record>', 'append the row to the record whose id is device.id')
    .option('--strict', 'exit code 4 where the capture is warned about')
    .option('--quiet', 'no notes')
    .action((capture, options) => settle(loadOnce().runReduce(capture, options, session)))
  program
    .command('check')
    .argument('<file...>', 'stage, record, capture and mapping files')
    .summary('check files; all problems at once')
    .description('check files; all problems at once')
    .option('--json', 'print one JSON document')
    .option('--quiet', 'print problems only')
    .action((files, options) => settle(loadOnce().runCheck(files, options, session)))
  program
    .command('start')
    .argument('[folder]', 'where to put them', '.')
    .summary('write a commented starter stage and record')
    .description('write a commented starter stage and record')
    .option('--json', 'print one JSON document')
    .option('--quiet', 'print nothing')
    .action((folder, options) => settle(loadOnce().runStart(folder, options, session)))
}

function collect(value: string, earlier: readonly string[] = []): readonly string[] {
  return [...earlier, value]
}

function wholeNumber(least: number, most: number): (text: string) => number {
  return (text) => {
    const value = /^\d+$/.test(text) ? Number(text) : Number.NaN
    if (value >= least && value <= most) return value
    throw new InvalidArgumentError(`Wanted is a whole number from ${least} to ${most}.`)
  }
}
