import { copyFileSync, mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { beforeEach, describe, expect, it } from 'vitest'
import { appendRow } from '../../src/commands/append-row.ts'
import { type ReduceOptions, runReduce } from '../../src/commands/reduce.ts'
import type { CaptureDocument } from '../../src/domain/capture.ts'
import { scratchFolder } from '../commands/scratch.ts'
import { recordingSession } from '../commands/session-double.ts'

let folder = ''
beforeEach(() => {
  folder = scratchFolder()
  mkdirSync(join(folder, 'captures'))
  for (const file of readdirSync('catalogs-demo/captures'))
    copyFileSync(`catalogs-demo/captures/${file}`, join(folder, 'captures', file))
  copyFileSync('catalogs-demo/bench/records.yaml', join(folder, 'records.yaml'))
})

async function run(name: string, options: ReduceOptions = {}) {
  const session = recordingSession()
  const code = await runReduce(join(folder, 'captures', `${name}.yaml`), options, session)
  return { code, out: session.printed.join(''), err: session.told.join('') }
}

async function refusal(name: string, options: ReduceOptions): Promise<string> {
  return run(name, options).then(
    () => 'nothing was refused',
    (error) => String(error.message).replaceAll(folder, ''),
  )
}

const record = () => join(folder, 'records.yaml')

describe('ebbwatt reduce', () => {
  it('prints exactly one document, with every key of the interface', async () => {
    const { code, out } = await run('clean', { json: true })
    const document = JSON.parse(out) as CaptureDocument
    expect(code).toBe(0)
    const { fixture, row, spread, charge_by_end, warnings, understood } = document
    expect(fixture).toBe('ramp')
    expect(Object.keys(row)).toEqual([
      'current_a',
      'slope_a_per_s',
      'peak_reverse_a',
      'ta_s',
      'tb_s',
      'trr_s',
      'trr_by',
      'qrr_c',
      'softness',
      'softness_slopes',
      'voltage_v',
      'energy_j',
    ])
    expect(row.trr_by).toBe('line-90-25')
    for (const key of Object.keys(row)) if (key !== 'trr_by') expect(spread[key], key).toBeGreaterThan(0)
    expect(charge_by_end.map(({ end }) => end)).toEqual(['2 % of I_RM', '10 % of I_RM', 'whole tail'])
    expect(warnings).toEqual([])
    expect(understood).toMatchObject({ delimiter: ',', decimal: 'point', samples: 1752, segments: 1 })
    expect(document.inputs.map(({ path }) => path)).toEqual(['clean.csv', 'clean.yaml'])
  })

  it('gives a step its own row, and an upper bound where nothing can be told', async () => {
    const step = JSON.parse((await run('step', { json: true })).out)
    expect(Object.keys(step.row)).toEqual(
      expect.arrayContaining(['current_a', 'reverse_a', 'storage_s', 'trr_s', 'until_a', 'tau_s', 'tau_rr_s']),
    )
    const { recovery, upper_bound, row } = JSON.parse((await run('schottky', { json: true })).out)
    expect(recovery).toBe('none-measurable')
    expect(upper_bound.qrr_c).toBeGreaterThan(0)
    expect([row.trr_s, row.storage_s, row.tau_s]).toEqual([null, null, null])
  })

  it('tells what it understood before the figures, draws the event, and never drops a caution', async () => {
    const { out, err } = await run('noisy', { quiet: false })
    expect(err).toMatch(
      /^understood noisy\.csv: delimiter ";", decimal comma, 2 header rows; time = column 1 "Zeit" in us/,
    )
    expect(out).toContain('recovered charge (Qrr)')
    expect(out).toMatch(/±\d/)
    expect(out).toContain('lethal-voltage')
    expect(Math.max(...out.split('\n').map((line) => [...line].length))).toBeLessThanOrEqual(100)
    const quiet = await run('noisy', { quiet: true })
    expect(quiet.err).toBe('')
    expect(quiet.out).toContain('lethal-voltage')
  })

  it('writes a drawing with its cautions on stderr', async () => {
    const target = join(folder, 'event.svg')
    const { out, err } = await run('ringing', { output: target, quiet: true })
    expect(out).toBe('')
    expect(err).toContain('caution  lethal-voltage')
    expect(readFileSync(target, 'utf8')).toMatch(/^<svg .*>samples<.*>fit<.*<\/svg>/s)
  })

  it('is the same byte for byte when run again', async () => {
    expect((await run('stacked', { json: true })).out).toBe((await run('stacked', { json: true })).out)
  })

  it('answers 4 to --strict where the capture is warned about', async () => {
    expect((await run('skewed', { strict: true })).code).toBe(4)
    expect((await run('clean', { strict: true })).code).toBe(0)
  })

  it('refuses to write over what it reads', async () => {
    const settings = join(folder, 'captures', 'clean.yaml')
    copyFileSync(join(folder, 'captures', 'clean.csv'), join(folder, 'captures', 'samples.txt'))
    writeFileSync(settings, readFileSync(settings, 'utf8').replace('clean.csv', 'samples.txt'))
    const over = await refusal('clean', { output: join(folder, 'captures', 'samples.txt') })
    expect(over).toContain('is read by this command')
  })

  it('tells a missing file, a foreign encoding and a broken row with their places', async () => {
    const csv = join(folder, 'captures', 'clean.csv')
    const text = readFileSync(csv, 'utf8')
    const lines = text.split('\n')
    writeFileSync(csv, lines.with(700, '12.5,,300').join('\n'))
    expect(await refusal('clean', {})).toBe(
      '/captures/clean.csv:701:1  table-cell  "" cannot be used; column 2 holds numbers with a decimal point',
    )
    writeFileSync(csv, Buffer.from(`\uFEFF${text}`, 'utf16le'))
    expect((await run('clean', { json: true })).code).toBe(0)
    writeFileSync(csv, '')
    expect(await refusal('clean', {})).toContain('file-empty')
    writeFileSync(csv, lines.map((line, k) => (k < 6 ? line : line.replace(/^([^,]*),.*/, '$1,0,0'))).join('\n'))
    expect(await refusal('clean', {})).toContain('no fall from forward to reverse current can be fitted')
  })
})

describe('--into', () => {
  it('appends a measured row with source and spread, and nothing else changes', async () => {
    const before = readFileSync(record(), 'utf8')
    const { err } = await run('clean', { into: record() })
    expect(err).toContain('appended to')
    const added = readFileSync(record(), 'utf8')
      .split('\n')
      .filter((line) => !before.split('\n').includes(line))
    expect(added).toHaveLength(1)
    expect(added[0]).toMatch(
      /^ {4}- \{fixture: ramp, current: 8\.\d+ A, slope: 20\d(\.\d)? A\/us, voltage: \d+(\.\d)? V, trr: 10\d(\.\d)? ns, qrr: \d+(\.\d)? nC, irrm: 5\.\d+ A, trr_by: line-90-25, junction: 25 degC, grade: measured, spread: [3-5](\.\d)? %, source: clean\.csv sha256 [0-9a-f]{12}\}$/,
    )
  })

  it('refuses the same capture twice, an unknown id, a part without stored charge, and a capture without a figure', async () => {
    await run('clean', { into: record() })
    const once = readFileSync(record(), 'utf8')
    expect(await refusal('clean', { into: record() })).toContain('this capture is in the record already, line')
    expect(await refusal('schottky', { into: record() })).toContain('bench-schottky is of class schottky')
    const rename = (from: string, to: string) => {
      const path = join(folder, 'captures', 'schottky.yaml')
      writeFileSync(path, readFileSync(path, 'utf8').replace(from, to))
    }
    rename('bench-schottky', 'bench-unit-33')
    expect(await refusal('schottky', { into: record() })).toMatch(
      /id-unknown {2}no record has the id "bench-unit-33" \(did you mean "bench-unit-3"\?; known are bench-schottky, .*\)/,
    )
    rename('bench-unit-33', 'bench-unit-3')
    expect(await refusal('schottky', { into: record() })).toContain('no recovery could be told from the fixture')
    expect(readFileSync(record(), 'utf8')).toBe(once)
  })

  it('refuses while another process writes, and leaves no lock behind', async () => {
    writeFileSync(`${record()}.lock`, '1')
    expect(await refusal('clean', { into: record() })).toContain('another process is appending to it')
    const document = JSON.parse((await run('step', { json: true })).out) as CaptureDocument
    const other = join(folder, 'other.yaml')
    copyFileSync(record(), other)
    expect(
      appendRow(other, { ...document, device: { id: 'bench-unit-5', junction_c: 25 } }, 'a.csv', 'f'.repeat(64)),
    ).toContain('reverse: 10.0')
    expect(readdirSync(folder).filter((file) => file.includes('lock') || file.includes('tmp'))).toEqual([
      'records.yaml.lock',
    ])
  })
})
