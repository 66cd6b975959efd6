import { expect, it } from 'vitest'
import { usageFailure } from '../../src/commands/usage-failure.ts'

const said = (code: string, message: string) => usageFailure(`commander.${code}`, `error: ${message}`).message

it.each([
  [
    'unknownOption',
    "unknown option '--jsn'\n(Did you mean --json?)",
    '--jsn: there is no such option (did you mean --json?)',
  ],
  ['unknownOption', "unknown option '--x'", '--x: there is no such option (ebbwatt COMMAND --help lists them)'],
  ['unknownCommand', "unknown command 'xyz'", 'xyz: there is no such command (ebbwatt --help lists them)'],
  ['missingArgument', "missing required argument 'stage'", 'no file is named; wanted is a stage file'],
  [
    'missingMandatoryOptionValue',
    "required option '--to <id>' not specified",
    '--to: this option is missing; wanted is --to <id>',
  ],
  [
    'optionMissingArgument',
    "option '-o, --output <file>' argument missing",
    '--output: no value follows; wanted is -o, --output <file>',
  ],
  [
    'invalidArgument',
    "option '--steps <n>' argument '1' is invalid. Wanted is a whole number from 2 to 1000.",
    '--steps: "1" cannot be used; wanted is a whole number from 2 to 1000',
  ],
  [
    'excessArguments',
    "too many arguments for 'rank'. Expected 1 argument but got 2.",
    'rank: there are more words than this command takes (put a name with blanks in quotes)',
  ],
])('what the parser says of %s is told in our words: %s', (code, message, sentence) => {
  expect(said(code, message)).toBe(`command line  option-unusable  ${sentence}`)
})
