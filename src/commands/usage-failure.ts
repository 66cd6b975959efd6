import { type CommandFailure, failure } from './failure.ts'

/** What the command line parser refuses, as a problem in our words; `message` is the parser's own sentence. */
export function usageFailure(code: string, message: string): CommandFailure {
  if (code === 'commander.help')
    return failure({ code: 'option-unusable', found: 'no command is given', hint: seeCommands })
  const [sentence = '', ...rest] = message.replace(/^error: /, '').split('\n')
  const [subject = '', value = ''] = [...sentence.matchAll(/'([^']*)'/g)].map(([, word]) => word ?? '')
  const suggestion = /\(Did you mean (.*)\?\)/.exec(rest.join(' '))?.[1]
  const near = suggestion === undefined ? null : `did you mean ${suggestion}?`
  const said = refusals[code]?.({ subject, value, sentence })
  if (said === undefined) {
    return failure({ code: 'option-unusable', path: subject, found: sentence.replace(/\.$/, ''), hint: near ?? '' })
  }
  return failure({ code: 'option-unusable', ...said, hint: near ?? said.hint ?? '' })
}

interface Refused {
  readonly subject: string
  readonly value: string
  readonly sentence: string
}

interface Said {
  readonly path: string
  readonly found: string
  readonly expected?: string
  readonly hint?: string
}

const seeCommands = 'ebbwatt --help lists them'
const seeOptions = 'ebbwatt COMMAND --help lists them'

const refusals: Readonly<Record<string, (refused: Refused) => Said>> = {
  'commander.unknownCommand': ({ subject }) => ({
    path: subject,
    found: 'there is no such command',
    hint: seeCommands,
  }),
  'commander.unknownOption': ({ subject }) => ({ path: subject, found: 'there is no such option', hint: seeOptions }),
  'commander.missingArgument': ({ subject }) => ({
    path: '',
    found: 'no file is named',
    expected: argumentWords[subject] ?? subject,
  }),
  'commander.missingMandatoryOptionValue': ({ subject }) => ({
    path: flagOf(subject),
    found: 'this option is missing',
    expected: subject,
  }),
  'commander.optionMissingArgument': ({ subject }) => ({
    path: flagOf(subject),
    found: 'no value follows',
    expected: subject,
  }),
  'commander.invalidArgument': ({ subject, value, sentence }) => ({
    path: flagOf(subject),
    found: `"${value}" cannot be used`,
    expected: /Wanted is (.*)\.$/.exec(sentence)?.[1] ?? subject,
  }),
  'commander.excessArguments': ({ subject }) => ({
    path: subject,
    found: 'there are more words than this command takes',
    hint: 'put a name with blanks in quotes',
  }),
}

const argumentWords: Readonly<Record<string, string>> = {
  stage: 'a stage file',
  capture: 'a file of capture settings',
  file: 'at least one stage, record, capture or mapping file',
}

/** "--to" of "--to <id>", and "--output" of "-o, --output <file>". */
function flagOf(flags: string): string {
  return /--[a-z-]+/.exec(flags)?.[0] ?? flags
}
