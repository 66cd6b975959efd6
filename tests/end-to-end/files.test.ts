import { spawn, spawnSync } from 'node:child_process'
import { mkdirSync, readdirSync, readFileSync, rmSync, symlinkSync, writeFileSync } from 'node:fs'
import { join, resolve } from 'node:path'
import { describe, expect, it } from 'vitest'
import { scratchFolder } from '../commands/scratch.ts'
import { ebbwatt } from './run-command.ts'
import { smallStage } from './small-stage.ts'

const program = resolve('dist/cli.cjs')

describe('-o', () => {
  it('writes what stdout would have shown, and nothing to stdout', () => {
    const cwd = smallStage()
    const shown = ebbwatt(['rank', 'stage.yaml', '--json'], { cwd })
    const written = ebbwatt(['rank', 'stage.yaml', '-o', 'out.json'], { cwd })
    expect(written).toMatchObject({ code: 0, out: '' })
    expect(readFileSync(join(cwd, 'out.json'), 'utf8')).toBe(shown.out)
  })

  it('keeps one document on stdout with --json', () => {
    const cwd = smallStage()
    const { out } = ebbwatt(['rank', 'stage.yaml', '--json', '-o', 'out.json'], { cwd })
    expect(out).toBe(readFileSync(join(cwd, 'out.json'), 'utf8'))
  })

  it.each([
    ['out.csv', /^rank,/],
    ['out.md', /^# /],
    ['out.svg', /^<svg /],
    ['out.html', /^<!DOCTYPE html>/],
    ['out.txt', /^Small: /],
  ])('writes %s in its form', (name, beginning) => {
    const cwd = smallStage()
    expect(ebbwatt(['rank', 'stage.yaml', '-o', name], { cwd })).toMatchObject({ code: 0, out: '' })
    expect(readFileSync(join(cwd, name), 'utf8')).toMatch(beginning)
  })

  it.each([
    ['stage.yaml', 'option-unusable'],
    ['link.json', 'file-unwritable'],
    ['folder.json', 'file-unwritable'],
    ['nowhere/out.json', 'file-unwritable'],
    ['input.json', 'file-is-input'],
  ])('refuses %s before the work, with nothing changed', (target, code) => {
    const cwd = smallStage()
    mkdirSync(join(cwd, 'folder.json'))
    writeFileSync(join(cwd, 'real.json'), 'real')
    symlinkSync('real.json', join(cwd, 'link.json'))
    writeFileSync(join(cwd, 'input.json'), readFileSync(join(cwd, 'stage.yaml')))
    const stage = target === 'input.json' ? 'input.json' : 'stage.yaml'
    const before = readdirSync(cwd)
    const { code: exit, err } = ebbwatt(['rank', stage, '-o', target], { cwd })
    expect(exit).toBe(2)
    expect(err).toContain(code)
    expect(readdirSync(cwd)).toEqual(before)
    expect(readFileSync(join(cwd, 'real.json'), 'utf8')).toBe('real')
  })

  it('holds the old file or the new one, whenever the process is killed', async () => {
    const cwd = smallStage()
    const target = join(cwd, 'out.json')
    ebbwatt(['rank', 'stage.yaml', '-o', 'out.json'], { cwd })
    const whole = readFileSync(target, 'utf8')
    for (const wait of [150, 250, 350, 450]) {
      const child = spawn(process.execPath, [program, 'rank', 'stage.yaml', '-o', 'out.json'], { cwd })
      const ended = new Promise((done) => child.on('exit', done))
      await new Promise((after) => setTimeout(after, wait))
      child.kill('SIGKILL')
      await ended
      expect(readFileSync(target, 'utf8')).toBe(whole)
    }
  })

  it('tells a full disk and leaves the old file', (context) => {
    const disk = scratchFolder()
    const mounted = spawnSync('mount', ['-t', 'tmpfs', '-o', 'size=8k', 'tmpfs', disk]).status === 0
    if (!mounted) return context.skip('no right to mount a small disk here')
    try {
      writeFileSync(join(disk, 'out.json'), 'old')
      const { code, err } = ebbwatt(['rank', 'stage.yaml', '-o', join(disk, 'out.json')], { cwd: smallStage() })
      expect(code).toBe(2)
      expect(err).toContain('file-unwritable  cannot be written: no space is left on the disk')
      expect(readdirSync(disk)).toEqual(['out.json'])
      expect(readFileSync(join(disk, 'out.json'), 'utf8')).toBe('old')
    } finally {
      spawnSync('umount', [disk])
    }
  })
})

describe('review', () => {
  it('writes one file, the same bytes from any folder', () => {
    const cwd = smallStage()
    expect(ebbwatt(['review', 'stage.yaml', '-o', 'review.html'], { cwd })).toMatchObject({ code: 0, out: '' })
    const first = readFileSync(join(cwd, 'review.html'), 'utf8')
    ebbwatt(['review', join(cwd, 'stage.yaml'), '-o', join(cwd, 'again.html')], { cwd: '/' })
    expect(readFileSync(join(cwd, 'again.html'), 'utf8')).toBe(first)
    expect(first).toMatch(/qualified persons/)
    expect(first).not.toMatch(/(src|href)="(https?:)?\/\//)
  })

  it('asks for the name of the file', () => {
    const { code, err } = ebbwatt(['review', 'stage.yaml'], { cwd: smallStage() })
    expect(code).toBe(2)
    expect(err).toBe('command line  option-unusable  -o: no file is named; wanted is -o review.html or -o review.md\n')
  })
})

describe('start', () => {
  it('writes files that pass the check and rank as they are', () => {
    const cwd = scratchFolder()
    expect(ebbwatt(['start', 'mine'], { cwd })).toMatchObject({
      code: 0,
      err: '',
      out: 'mine/stage.yaml\nmine/rectifiers/first-parts.yaml\n\nNext: ebbwatt rank mine/stage.yaml\n',
    })
    expect(ebbwatt(['check', 'mine/stage.yaml', 'mine/rectifiers'], { cwd })).toMatchObject({ code: 0, err: '' })
    const { code, out } = ebbwatt(['rank', 'mine/stage.yaml', '--json'], { cwd })
    expect(code).toBe(0)
    expect(JSON.parse(out).candidates.map(({ accepted }: { accepted: boolean }) => accepted)).toEqual([true, true])
  })

  it('has optional lines that pass the check, too', () => {
    const cwd = scratchFolder()
    ebbwatt(['start'], { cwd })
    const stage = readFileSync(join(cwd, 'stage.yaml'), 'utf8')
    writeFileSync(join(cwd, 'stage.yaml'), stage.replace(/^# (?=[a-z_]+:| {2})/gm, ''))
    expect(ebbwatt(['check', 'stage.yaml'], { cwd })).toMatchObject({ code: 0, err: '' })
  })

  it('never writes over a file', () => {
    const cwd = scratchFolder()
    ebbwatt(['start'], { cwd })
    writeFileSync(join(cwd, 'stage.yaml'), 'mine')
    rmSync(join(cwd, 'rectifiers'), { recursive: true })
    const { code, err } = ebbwatt(['start', '--json'], { cwd })
    expect(code).toBe(2)
    expect(err).toBe(
      'stage.yaml  file-exists  exists already and is not overwritten; name another folder: ebbwatt start FOLDER\n',
    )
    expect(readdirSync(cwd)).toEqual(['stage.yaml'])
  })
})
