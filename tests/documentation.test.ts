import { spawnSync } from 'node:child_process'
import { readdirSync, readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'

/** A public function with the comment above it. */
interface Documented {
  readonly file: string
  readonly name: string
  readonly comment: string
}

function documentedFunctions(folder: string): readonly Documented[] {
  return readdirSync(folder)
    .filter((file) => file.endsWith('.ts'))
    .flatMap((file) => {
      const text = readFileSync(`${folder}/${file}`, 'utf8')
      const found = text.matchAll(/\/\*\*((?:(?!\*\/)[\s\S])*)\*\/\nexport function (\w+)/g)
      return [...found].map(([, comment, name]) => ({ file: `${folder}/${file}`, name: name!, comment: comment! }))
    })
}

function exportedFunctions(folder: string): readonly string[] {
  return readdirSync(folder).flatMap((file) =>
    [...readFileSync(`${folder}/${file}`, 'utf8').matchAll(/^export function (\w+)/gm)].map(([, name]) => name!),
  )
}

/** Examples may call anything of these folders, so all of it stands in their scope. */
async function scopeOf(folders: readonly string[]): Promise<Readonly<Record<string, unknown>>> {
  const files = folders.flatMap((folder) => readdirSync(folder).map((file) => `../${folder}/${file}`))
  return Object.assign({}, ...(await Promise.all(files.map((file) => import(file)))))
}

interface Example {
  readonly place: string
  readonly call: string
  readonly value: string
}

function examplesOf({ file, name, comment }: Documented): readonly Example[] {
  return [...comment.matchAll(/@example (.+?) \/\/ (.+)$/gm)].map(([, call, value]) => ({
    place: `${file} ${name}`,
    call: call!,
    value: value!.trim(),
  }))
}

function run(call: string, scope: Readonly<Record<string, unknown>>): unknown {
  return new Function(...Object.keys(scope), `return ${call}`)(...Object.values(scope))
}

/** A number agrees when it rounds to the printed digits, a list when each number does, anything else when it is equal. */
function agrees(actual: unknown, printed: string): boolean {
  if (typeof actual === 'number') return roundsTo(actual, printed)
  if (!(actual instanceof Float64Array) && !Array.isArray(actual)) return actual === JSON.parse(printed)
  const items = printed.slice(1, -1).split(', ')
  return items.length === actual.length && items.every((item, index) => agrees(actual[index], item))
}

function roundsTo(actual: number, printed: string): boolean {
  const [, whole = '', decimals = '', exponent = '0'] = /^-?(\d*)\.?(\d*)(?:e([+-]?\d+))?$/.exec(printed) ?? []
  if (whole + decimals === '') return false
  const lastDigit = 10 ** (Number(exponent) - decimals.length)
  return Math.abs(actual - Number(printed)) <= 0.5000001 * lastDigit
}

const models = documentedFunctions('src/models')
const numerics = documentedFunctions('src/numerics')
const scope = await scopeOf(['src/models', 'src/numerics'])

describe('the examples in the comments', () => {
  const examples = [...models, ...numerics].flatMap(examplesOf)

  it('are there for every model', () => {
    const without = models.filter((each) => /@see/.test(each.comment) && examplesOf(each).length === 0)
    expect(without.map(({ file, name }) => `${file} ${name}`)).toEqual([])
  })

  it.each(examples.map((example) => [example.place, example] as const))('hold: %s', (_, { call, value }) => {
    const actual = run(call, scope)
    expect(agrees(actual, value), `${call} gives ${String(actual)}, the comment says ${value}`).toBe(true)
  })

  it('would not hold with a wrong digit', () => {
    expect(agrees(0.41421, '0.41422')).toBe(false)
    expect(agrees(0.41421356, '0.41421')).toBe(true)
    expect(agrees(8.80000001e-5, '8.80000e-5')).toBe(true)
    expect(agrees(Float64Array.of(1, 2), '[1, 3]')).toBe(false)
  })
})

describe('the comment of a published model', () => {
  const parts = ['Equation', 'Valid for:', 'Deviations:', '@returns', '@throws', '@see', '@example']

  it('stands above every exported function', () => {
    const commented = new Set(models.map(({ name }) => name))
    expect(exportedFunctions('src/models').filter((name) => !commented.has(name))).toEqual([])
  })

  it('has all its parts wherever a source is named', () => {
    const gaps = models
      .filter(({ comment }) => comment.includes('@see'))
      .flatMap(({ file, name, comment }) =>
        parts.filter((part) => !comment.includes(part)).map((part) => `${file} ${name}: ${part}`),
      )
    expect(gaps).toEqual([])
  })
})

const readme = readFileSync('README.md', 'utf8')

/** What stands between ```sh fences, with the ```text block right after it, if any. */
function shellBlocks(text: string): readonly { readonly command: string; readonly output: string | null }[] {
  const blocks = text.matchAll(/^```sh\n([\s\S]*?)^```\n(?:\n```text\n([\s\S]*?)^```\n)?/gm)
  return [...blocks].map(([, command, output]) => ({ command: command!.trim(), output: output ?? null }))
}

/** The installation is the same in every block and has been done before these tests run; the rest runs as it stands. */
function withoutInstallation(command: string): string {
  return command.replace(/^npm ci( && |\n)/, '')
}

/** A line "..." stands for lines left out; `$` keeps the rest exact. */
function matchesOutput(printed: string, actual: string): boolean {
  const pattern = printed
    .trimEnd()
    .split(/^\.\.\.\n?/m)
    .map((piece) => piece.replace(/[.*+?^${}()|[\]\\]/g, '\\$&'))
    .join('[\\s\\S]*?')
  return new RegExp(`^${pattern}\\s*$`).test(actual)
}

describe('README.md', () => {
  const blocks = shellBlocks(readme)
  const runnable = blocks.filter(({ command }) => withoutInstallation(command) !== 'npm test')

  it('begins with set-up and main job, then the tests', () => {
    expect(blocks[0]?.command).toMatch(/^npm ci && node dist\/cli\.cjs rank /)
    expect(blocks[1]?.command).toBe('npm ci && npm test')
    expect(readme.split('\n').findIndex((line) => line.startsWith('```sh'))).toBeLessThan(40)
  })

  it.each(runnable.map(({ command, output }) => [withoutInstallation(command), output] as const))(
    'tells the truth about: %s',
    (command, output) => {
      const { status, stdout, stderr } = spawnSync('bash', ['-c', command], { encoding: 'utf8' })
      expect([0, 3, 4], `${command}\n${stderr}`).toContain(status)
      if (output !== null) expect(matchesOutput(output, stdout), stdout).toBe(true)
    },
  )

  it('would not pass with another output', () => {
    expect(matchesOutput('a\n...\nz\n', 'a\nb\nc\nz\n')).toBe(true)
    expect(matchesOutput('a\n...\nz\n', 'a\nb\nc\ny\n')).toBe(false)
    expect(matchesOutput('a.c\n', 'abc\n')).toBe(false)
  })

  it('names every command and every option of the program', () => {
    const help = (...args: readonly string[]) =>
      spawnSync('node', ['dist/cli.cjs', ...args, '--help'], { encoding: 'utf8' }).stdout
    const commands = [...help().matchAll(/^ {2}(\w+) (?:\[options\] )?[<[]/gm)].map(([, name]) => name!)
    const explained = [...readme.matchAll(/^\| `(\w+)(?: [^`]*)?` \|/gm)].map(([, name]) => name!)
    expect(commands.filter((name) => name !== 'help' && !explained.includes(name))).toEqual([])
    expect(commands).toHaveLength(8)
    const options = new Set(commands.flatMap((name) => help(name).match(/--[a-z]+/g) ?? []))
    const known: readonly string[] = readme.match(/--[a-z]+|-o FILE/g) ?? []
    const unnamed = [...options].filter(
      (option) => !known.includes(option) && !['--help', '--output', '--version'].includes(option),
    )
    expect(unnamed).toEqual([])
  })
})
