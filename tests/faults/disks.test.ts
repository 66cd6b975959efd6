import { copyFileSync, cpSync, readdirSync, readFileSync, statSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { ebbwatt } from '../end-to-end/run-command.ts'
import { smallStage } from '../end-to-end/small-stage.ts'
import { benchFolder, readRecord } from './bench-folder.ts'
import { makeReadOnly, smallDisk } from './small-disk.ts'

describe('a full disk', () => {
  it('takes nothing from a record', (context) => {
    const { folder } = benchFolder(1)
    const disk = smallDisk(context, 16)
    copyFileSync(join(folder, 'records.yaml'), join(disk, 'records.yaml'))
    const used = Math.ceil(statSync(join(disk, 'records.yaml')).size / 4096) * 4096
    writeFileSync(join(disk, 'filler'), Buffer.alloc(16 * 1024 - used))
    const args = ['reduce', 'capture-1.yaml', '--quiet', '--into', join(disk, 'records.yaml')]
    const { code, err } = ebbwatt(args, { cwd: folder })
    expect(code).toBe(2)
    expect(err).toContain('no space is left on the disk')
    expect(err).not.toMatch(/^\s+at /m)
    expect(readRecord(disk)).toBe(readRecord(folder))
    expect(readdirSync(disk).sort()).toEqual(['filler', 'records.yaml'])
  })

  it('keeps the old review document, and says so', (context) => {
    const cwd = smallStage()
    const disk = smallDisk(context, 16)
    writeFileSync(join(disk, 'review.html'), 'old')
    const { code, err } = ebbwatt(['review', 'stage.yaml', '-o', join(disk, 'review.html')], { cwd })
    expect(code).toBe(2)
    expect(err).toContain('no space is left on the disk')
    expect(readFileSync(join(disk, 'review.html'), 'utf8')).toBe('old')
    expect(readdirSync(disk)).toEqual(['review.html'])
  })

  it('keeps start from half a starter', (context) => {
    const disk = smallDisk(context, 4)
    writeFileSync(join(disk, 'filler'), Buffer.alloc(4096))
    const { code, err } = ebbwatt(['start', disk])
    expect(code).toBe(2)
    expect(err).toContain('no space is left on the disk')
    expect(readdirSync(disk)).toEqual(['filler'])
  })
})

describe('a disk that is read-only', () => {
  it('is told for -o, --into and start, before or after the work, with nothing changed', (context) => {
    const { folder } = benchFolder(1)
    const disk = smallDisk(context, 400)
    cpSync(folder, disk, { recursive: true })
    makeReadOnly(disk)
    const names = readdirSync(disk)
    for (const args of [
      ['reduce', 'capture-1.yaml', '--into', 'records.yaml', '--quiet'],
      ['reduce', 'capture-1.yaml', '-o', 'event.svg', '--quiet'],
      ['start', 'mine'],
    ]) {
      const { code, out, err } = ebbwatt(args, { cwd: disk })
      expect({ args, code, out }).toEqual({ args, code: 2, out: '' })
      expect(err).toContain('file-unwritable')
      expect(err).toContain('the file system is read-only')
      expect(err).not.toMatch(/^\s+at /m)
    }
    expect(readdirSync(disk)).toEqual(names)
    expect(readRecord(disk)).toBe(readRecord(folder))
  })
})
