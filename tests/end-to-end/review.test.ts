import { mkdirSync, readFileSync, writeFileSync } from 'node:fs'
import { join, resolve } from 'node:path'
import { describe, expect, it } from 'vitest'
import { scratchFolder } from '../commands/scratch.ts'
import { ebbwatt } from './run-command.ts'
import { smallStage } from './small-stage.ts'

describe('ebbwatt review', () => {
  it('writes the same bytes from whatever folder it is called', () => {
    const folder = smallStage()
    ebbwatt(['review', 'stage.yaml', '-o', 'here.html', '--draws', '50'], { cwd: folder })
    ebbwatt(['review', join(folder, 'stage.yaml'), '-o', join(folder, 'there.html'), '--draws', '50'])
    const here = readFileSync(join(folder, 'here.html'), 'utf8')
    expect(readFileSync(join(folder, 'there.html'), 'utf8')).toBe(here)
    expect(here).not.toContain(folder)
    expect(here).toContain('parts:1')
  })

  it('writes Markdown to a file or to standard output', () => {
    const folder = smallStage()
    const file = ebbwatt(['review', 'stage.yaml', '-o', 'r.md', '--draws', '20'], { cwd: folder })
    expect(file).toMatchObject({ code: 0, out: '', err: expect.stringContaining('wrote r.md') })
    const { out } = ebbwatt(['review', 'stage.yaml', '--markdown', '--draws', '20'], { cwd: folder })
    expect(out).toBe(readFileSync(join(folder, 'r.md'), 'utf8'))
  })

  it('says which file to name where none is, and refuses forms it does not write', () => {
    const folder = smallStage()
    const none = ebbwatt(['review', 'stage.yaml'], { cwd: folder })
    expect(none).toMatchObject({ code: 2, out: '', err: expect.stringContaining('-o review.html') })
    const csv = ebbwatt(['review', 'stage.yaml', '-o', 'r.csv'], { cwd: folder })
    expect(csv).toMatchObject({ code: 2, err: expect.stringContaining('does not write csv') })
    const json = ebbwatt(['review', 'stage.yaml', '--json'], { cwd: folder })
    expect(JSON.parse(json.out).error.code).toBe('option-unusable')
  })

  it('ends with 3 where nothing is acceptable and with 4 where --strict finds a guess, its document written', () => {
    const folder = smallStage()
    const strict = ebbwatt(['review', 'stage.yaml', '-o', 's.html', '--strict', '--draws', '20'], { cwd: folder })
    expect(strict.code).toBe(4)
    expect(readFileSync(join(folder, 's.html'), 'utf8')).toContain('</html>')
    const none = ebbwatt(['review', 'stage.yaml', '-o', 'n.html', '--only', 'small', '--draws', '20'], { cwd: folder })
    expect(none.code).toBe(3)
    expect(readFileSync(join(folder, 'n.html'), 'utf8')).toContain('No candidate is acceptable.')
  })

  it('stays below 600 kB for 20 candidates of a mains stage', () => {
    const folder = scratchFolder()
    mkdirSync(join(folder, 'parts'))
    const names = [
      'garnet-650v-10a-sic',
      'larch-600v-8a-soft',
      'linden-600v-8a-soft',
      'rowan-600v-8a',
      'thistle-600v-8a',
    ]
    const ids = names.flatMap((name) =>
      ['', '-b', '-c', '-d'].map((suffix) => {
        const record = readFileSync(resolve(`catalogs-demo/rectifiers/${name}.yaml`), 'utf8')
        writeFileSync(
          join(folder, 'parts', `${name}${suffix}.yaml`),
          record.replace(/^id: .*$/m, `id: ${name}${suffix}`),
        )
        return `${name}${suffix}`
      }),
    )
    const stage = readFileSync('catalogs-demo/stages/cold-store-mains.yaml', 'utf8')
      .replace(/^records: .*$/m, 'records: [parts]')
      .replace(/^candidates: .*$/m, `candidates: [${ids.join(', ')}]`)
    writeFileSync(join(folder, 'stage.yaml'), stage)
    const { code, err } = ebbwatt(['review', 'stage.yaml', '-o', 'r.html', '--quiet', '--draws', '50'], { cwd: folder })
    expect(code, err).toBe(0)
    const bytes = readFileSync(join(folder, 'r.html')).length
    expect(bytes).toBeLessThan(600_000)
    expect(bytes).toBeGreaterThan(300_000)
  })
})
