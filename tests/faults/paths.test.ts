import { execFileSync } from 'node:child_process'
import { linkSync, mkdirSync, readFileSync, symlinkSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { ebbwatt } from '../end-to-end/run-command.ts'
import { smallStage } from '../end-to-end/small-stage.ts'
import { benchFolder, readRecord } from './bench-folder.ts'

/** Paths that are no file to read, and what is said of each. */
const unreadable: readonly (readonly [string, string])[] = [
  ['absent', 'there is no such file'],
  ['folder', 'it is a folder'],
  ['pipe', 'it is a pipe, socket or device'],
  ['circle', 'its symbolic links lead in a circle'],
  ['dangling', 'there is no such file'],
  ['/dev/zero', 'it is a pipe, socket or device'],
  ['/dev/null', 'it is a pipe, socket or device'],
  ['stage.yaml/below', 'a part of its path is a file'],
  ['x'.repeat(300), 'its path is longer than the system allows'],
]

function withOddPaths(folder: string): void {
  mkdirSync(join(folder, 'folder'))
  execFileSync('mkfifo', [join(folder, 'pipe')])
  symlinkSync('circle', join(folder, 'circle'))
  symlinkSync('nowhere', join(folder, 'dangling'))
  for (const extension of ['csv', 'yaml']) {
    mkdirSync(join(folder, `folder.${extension}`))
  }
}

describe.each(unreadable)('%s', (path, said) => {
  function refused(args: readonly string[], cwd: string): void {
    const { code, out, err } = ebbwatt(args, { cwd })
    expect({ args, code, out }).toEqual({ args, code: 2, out: '' })
    // samples may be any regular file, of any size, and are read by other means
    expect(err.replace('it is no regular file', said)).toContain(said)
    expect(err).not.toMatch(/^\s+at /m)
  }

  it('is told as a stage, a record, a mapping and a file to check', () => {
    const cwd = smallStage()
    withOddPaths(cwd)
    refused(['rank', path], cwd)
    if (path !== 'folder') {
      refused(['rank', 'stage.yaml', '--records', path], cwd)
      refused(['check', path], cwd)
    }
    writeFileSync(join(cwd, 'table.csv'), 'id\na\n')
    refused(['rank', 'stage.yaml', '--records', 'table.csv', '--mapping', path], cwd)
  })

  it('is told as settings, samples, reference and record of a capture', () => {
    const { folder } = benchFolder(1)
    withOddPaths(folder)
    writeFileSync(join(folder, 'stage.yaml'), 'x')
    refused(['reduce', path], folder)
    refused(['reduce', 'capture-1.yaml', '--quiet', '--into', path], folder)
    const settings = readFileSync(join(folder, 'capture-1.yaml'), 'utf8')
    if (path.startsWith('/')) return
    writeFileSync(join(folder, 'other.yaml'), settings.replace('capture-1.csv', path))
    refused(['reduce', 'other.yaml', '--quiet'], folder)
    writeFileSync(join(folder, 'other.yaml'), `${settings}reference: ${path}\n`)
    refused(['reduce', 'other.yaml', '--quiet'], folder)
  })
})

describe('a target', () => {
  it('that is a record of the stage is refused, whichever name it has', () => {
    const cwd = smallStage()
    const before = readFileSync(join(cwd, 'parts'), 'utf8')
    linkSync(join(cwd, 'parts'), join(cwd, 'twin.html'))
    for (const command of ['rank', 'review']) {
      const { code, err } = ebbwatt([command, 'stage.yaml', '-o', 'twin.html'], { cwd })
      expect(code).toBe(2)
      expect(err).toContain('file-is-input')
    }
    expect(readFileSync(join(cwd, 'parts'), 'utf8')).toBe(before)
  })

  it('that is a symbolic link to the record is not written through', () => {
    const { folder } = benchFolder(1)
    symlinkSync('records.yaml', join(folder, 'link.yaml'))
    const before = readRecord(folder)
    const { code, err } = ebbwatt(['reduce', 'capture-1.yaml', '--quiet', '--into', 'link.yaml'], { cwd: folder })
    expect(code).toBe(2)
    expect(err).toContain('it is a symbolic link')
    expect(readRecord(folder)).toBe(before)
  })

  it('is not reached through a link that waits where the new text is prepared', () => {
    const cwd = smallStage()
    writeFileSync(join(cwd, 'victim'), 'victim')
    // the program's own process number is not known beforehand: all that could be next are taken
    const { pid } = process
    for (let next = pid; next < pid + 3000; next++) symlinkSync('victim', join(cwd, `.ebbwatt-${next}.tmp`))
    ebbwatt(['rank', 'stage.yaml', '-o', 'out.json', '--quiet'], { cwd })
    expect(readFileSync(join(cwd, 'victim'), 'utf8')).toBe('victim')
  })
})

describe('the same input gives the same bytes', () => {
  const surroundings = [
    { LANG: 'C', TZ: 'UTC' },
    { LANG: 'tr_TR.UTF-8', LC_ALL: 'tr_TR.UTF-8', TZ: 'Pacific/Chatham', COLUMNS: '40', LINES: '10' },
    { LC_ALL: 'ar_EG.UTF-8', TZ: 'America/St_Johns', COLUMNS: '300', TERM: 'xterm-256color', COLORTERM: 'truecolor' },
  ]

  it.each([
    'rank --csv',
    'rank --markdown',
    'rank',
    'swap --to guessed --json',
    'trend --over load --from=10% --to=100% --steps=3 --json',
  ])('in any language, time zone, terminal and folder: %s', (words) => {
    const cwd = smallStage()
    const [command = '', ...options] = words.split(' ')
    const outputs = surroundings.map((environment, index) => {
      const inside = index !== 1
      const stage = inside ? 'stage.yaml' : join(cwd, 'stage.yaml')
      // The table alone is fitted to a stated width.
      const stated = options.length === 0 ? { ...environment, COLUMNS: '120' } : environment
      return ebbwatt([command, stage, ...options, '--quiet'], { cwd: inside ? cwd : '/', environment: stated }).out
    })
    expect(outputs[0]).not.toBe('')
    expect(outputs[1]).toBe(outputs[0])
    expect(outputs[2]).toBe(outputs[0])
  })

  it('for a capture as well', () => {
    const { folder } = benchFolder(1)
    const [one, two, three] = surroundings.map((environment) =>
      ebbwatt(['reduce', 'capture-1.yaml', '--json'], { cwd: folder, environment }),
    )
    expect(one!.code).toBe(0)
    expect(two).toEqual(one)
    expect(three).toEqual(one)
  })
})
