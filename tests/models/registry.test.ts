import { readdirSync, readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { models } from '../../src/models/registry.ts'

const folder = new URL('../../src/models/', import.meta.url)
const exported = (file: string) =>
  [...readFileSync(new URL(file, folder), 'utf8').matchAll(/^export function (\w+)/gm)].map((match) => match[1]!)
/** Inner parts of methods: the root that the ramp models share, and their error. */
const inner = ['ramp-root.ts', 'meaningless.ts']

describe('registry of the models', () => {
  it('lists every exported function exactly once, under the file that holds it', () => {
    const listed = models.flatMap(({ file, functions }) => functions.map((name) => `${file}: ${name}`)).sort()
    const files = readdirSync(folder).filter((file) => !inner.includes(file) && !/^(registry|model-entry)/.test(file))
    expect(listed).toEqual(files.flatMap((file) => exported(file).map((name) => `${file}: ${name}`)).sort())
  })

  it('gives every model an id of its own, an equation, a source and its known bias', () => {
    expect(new Set(models.map(({ id }) => id)).size).toBe(models.length)
    for (const { id, equation, source, bias } of models) {
      expect(id).toMatch(/^[a-z0-9]+(-[a-z0-9]+)*$/)
      for (const text of [equation, source, bias]) expect(text.length).toBeGreaterThan(5)
    }
  })

  it('states ranges whose ends are in order, with a unit', () => {
    for (const { low, high, unit } of models.flatMap(({ validity }) => validity)) {
      expect(unit).not.toBe('')
      if (low !== null && high !== null) expect(low).toBeLessThan(high)
    }
  })
})
