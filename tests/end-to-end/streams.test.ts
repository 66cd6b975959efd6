import { execFileSync, spawn, spawnSync } from 'node:child_process'
import { readFileSync } from 'node:fs'
import { join, resolve } from 'node:path'
import { describe, expect, it } from 'vitest'
import { ebbwatt } from './run-command.ts'
import { smallStage } from './small-stage.ts'

const program = resolve('dist/cli.cjs')

describe('exit codes', () => {
  const rank = (...options: readonly string[]) =>
    ebbwatt(['rank', 'stage.yaml', '--json', ...options], { cwd: smallStage() })

  it('0: done, although one part is rejected', () => {
    const { code, out, err } = rank('--quiet')
    expect({ code, err }).toEqual({ code: 0, err: '' })
    const small = JSON.parse(out).candidates.find(({ id }: { id: string }) => id === 'small')
    expect(small).toMatchObject({ rank: null, accepted: false, odds_best: 0 })
  })

  it('2: an id that is not there, with the nearest that is', () => {
    const { code, out } = rank('--only', 'plian')
    expect(code).toBe(2)
    expect(JSON.parse(out).error.problems).toEqual([
      {
        code: 'id-unknown',
        file: 'command line',
        line: 0,
        column: 0,
        path: '--only',
        found: 'plian',
        expected: expect.stringMatching(/^known are .*plain/),
        hint: 'did you mean "plain"?',
      },
    ])
  })

  it('3: no candidate is acceptable, and the full result is printed', () => {
    const { code, out } = rank('--only', 'small')
    expect(code).toBe(3)
    expect(JSON.parse(out).candidates).toHaveLength(1)
  })

  it('4: --strict and a figure of a ranked candidate is a class guess, with the full result', () => {
    const { code, out } = rank('--only', 'guessed', '--strict')
    expect(code).toBe(4)
    expect(JSON.parse(out).candidates[0]).toMatchObject({ id: 'guessed', accepted: true })
  })
})

describe('the command line', () => {
  it.each([
    [[], 'no command is given (ebbwatt --help lists them)'],
    [['rnk'], 'rnk: there is no such command (did you mean rank?)'],
    [['rank', 'a', '--jsonn'], '--jsonn: there is no such option (did you mean --json?)'],
    [['rank'], 'no file is named; wanted is a stage file'],
    [['rank', 'a', 'b'], 'rank: there are more words than this command takes'],
    [['rank', 'a', '--seed'], '--seed: no value follows; wanted is --seed <n>'],
    [['rank', 'a', '--seed', '-1'], '--seed: "-1" cannot be used; wanted is a whole number from 0 to 4294967295'],
    [['rank', 'a', '--draws', '0'], '--draws: "0" cannot be used; wanted is a whole number from 1 to 1000000'],
    [['rank', 'a', '--draws', '1e3'], '--draws: "1e3" cannot be used; wanted is a whole number from 1 to 1000000'],
    [['rank', 'a', '--json', '--csv'], '--json --csv: these ask for different forms; wanted is one of them'],
  ] as const)('refuses %j in one line', (args, sentence) => {
    const { code, out, err } = ebbwatt(args)
    expect(code).toBe(2)
    expect(err).toContain(sentence)
    expect(err.trim().split('\n')).toHaveLength(1)
    if ((args as readonly string[]).includes('--json')) expect(JSON.parse(out).error.code).toBe('option-unusable')
    else expect(out).toBe('')
  })

  it('answers --help and --version on stdout', () => {
    const { version } = JSON.parse(readFileSync('package.json', 'utf8'))
    expect(ebbwatt(['--version'])).toEqual({ code: 0, out: `${version}\n`, err: '' })
    for (const args of [['--help'], ['help', 'rank'], ['rank', '--help']]) {
      expect(ebbwatt(args)).toMatchObject({ code: 0, err: '', out: expect.stringContaining('Usage: ebbwatt') })
    }
  })
})

describe('stdout and stderr', () => {
  it('keeps the cautions of a CSV on stderr, --quiet included, and their codes in the last column', () => {
    const { out, err } = ebbwatt(['rank', 'stage.yaml', '--csv', '--quiet'], { cwd: smallStage() })
    const [header = '', first = ''] = out.split('\n')
    expect(header).toMatch(/,cautions$/)
    const codes = first.split(',').at(-1)!.split(' ')
    for (const code of codes) expect(err).toContain(`caution  ${code}  `)
    expect(err).toMatch(/qualified persons/)
    expect(out).not.toMatch(/(^|,)=/m)
  })

  it.each([
    ['--markdown', 'qualified persons'],
    ['--json', 'qualified persons'],
    ['--quiet', 'qualified persons'],
  ])('has the cautions in the result with %s', (option, words) => {
    expect(ebbwatt(['rank', 'stage.yaml', option], { cwd: smallStage() }).out.replace(/\s+/g, ' ')).toContain(words)
  })

  it('has no colour outside a terminal', () => {
    expect(ebbwatt(['rank', 'stage.yaml'], { cwd: smallStage(), environment: { FORCE_COLOR: '1' } }).out).not.toContain(
      '\u001B',
    )
  })

  it('ends quietly when the reader has seen enough', () => {
    const { status, stderr, stdout } = spawnSync(
      'bash',
      ['-c', `set -o pipefail; "${process.execPath}" "${program}" rank stage.yaml | head -1`],
      {
        cwd: smallStage(),
        encoding: 'utf8',
      },
    )
    expect({ status, stderr, lines: stdout.trim().split('\n').length }).toEqual({ status: 0, stderr: '', lines: 1 })
  })

  it('says that a full disk took nothing', () => {
    const { status, stderr } = spawnSync(
      'bash',
      ['-c', `"${process.execPath}" "${program}" rank stage.yaml --json > /dev/full`],
      {
        cwd: smallStage(),
        encoding: 'utf8',
      },
    )
    expect(status).toBe(2)
    expect(stderr).toContain('no space is left')
    expect(stderr).not.toContain('    at ')
  })

  it('ends with 130 on Ctrl-C and leaves nothing behind', async () => {
    const cwd = smallStage()
    // However busy the machine is: as long as the command takes with few draws, one with very many is at work.
    const begun = performance.now()
    spawnSync(process.execPath, [program, 'rank', 'stage.yaml'], { cwd })
    const usual = performance.now() - begun
    const child = spawn(process.execPath, [program, 'rank', 'stage.yaml', '--draws', '300000', '-o', 'out.json'], {
      cwd,
    })
    await new Promise((after) => setTimeout(after, usual + 200))
    child.kill('SIGINT')
    const code = await new Promise((done) => child.on('exit', done))
    expect(code).toBe(130)
    expect(execFileSync('ls', ['-A', cwd], { encoding: 'utf8' }).split('\n').filter(Boolean)).toEqual([
      'parts',
      'stage.yaml',
    ])
  })
})

describe('the same input gives the same bytes', () => {
  it('from any folder, in any language and time zone', () => {
    const cwd = smallStage()
    const here = ebbwatt(['rank', 'stage.yaml', '--json'], { cwd })
    const environment = { LANG: 'tr_TR.UTF-8', LC_ALL: 'de_DE.UTF-8', TZ: 'Pacific/Chatham', COLUMNS: '40' }
    const there = ebbwatt(['rank', join(cwd, 'stage.yaml'), '--json'], { cwd: '/', environment })
    expect(here.code).toBe(0)
    expect(there.out).toBe(here.out)
  })

  it('with records named again, however they are spelt', () => {
    const cwd = smallStage()
    const named = (...paths: readonly string[]) => {
      const options = paths.flatMap((path) => ['--records', path])
      return JSON.parse(ebbwatt(['rank', 'stage.yaml', '--json', ...options], { cwd }).out).candidates
    }
    expect(named().map(({ id }: { id: string }) => id)).toEqual(['plain', 'guessed', 'small'])
    expect(named('parts', './parts', join(cwd, 'parts'))).toEqual(named())
  })
})
