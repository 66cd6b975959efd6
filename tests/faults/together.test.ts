import { readdirSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { ebbwatt } from '../end-to-end/run-command.ts'
import { benchFolder, ended, readRecord, start } from './bench-folder.ts'

describe('several processes that append to one record at once', () => {
  it('lose nothing: each row is there or its writer was refused', async () => {
    const { folder, names } = benchFolder(6)
    const before = readRecord(folder)
    const arguments_ = (name: string) => ['reduce', `${name}.yaml`, '--into', 'records.yaml']
    const ends = await Promise.all(names.map((name) => ended(start(arguments_(name), folder))))
    const record = readRecord(folder)
    for (const [index, { code, err }] of ends.entries()) {
      const there = record.includes(`${names[index]}.csv sha256`)
      expect({ code, there }).toEqual(code === 0 ? { code: 0, there: true } : { code: 2, there: false })
      if (code !== 0) expect(err).toContain('another process is appending to it')
    }
    expect(ends.some(({ code }) => code === 0)).toBe(true)
    for (const [index, { code }] of ends.entries()) {
      if (code !== 0) expect(ebbwatt(arguments_(names[index]!), { cwd: folder }).code).toBe(0)
    }
    const all = readRecord(folder)
    for (const name of names) expect(all.split(`${name}.csv sha256`)).toHaveLength(2)
    const rest = all.split('\n').filter((line) => !line.includes('capture-'))
    expect(rest).toEqual(before.split('\n'))
    expect(readdirSync(folder).filter((name) => /lock|tmp/.test(name))).toEqual([])
  })
})
