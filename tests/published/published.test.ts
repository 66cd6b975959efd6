import { describe, expect, it } from 'vitest'
import { models } from '../../src/models/registry.ts'
import { halfLastDigit } from './compare.ts'
import { modelsWithoutCase, publishedRows, rowsWithoutCase, sections } from './sections.ts'

describe.each(sections.map((section) => [section.title, section] as const))('%s', (_title, section) => {
  it.each(section.rows().map((row) => [`${row.id}: ${row.quantity}`, row] as const))('%s', (_name, row) => {
    expect(Number.isFinite(row.computed)).toBe(true)
    expect(Math.abs(row.error), `${row.computed} instead of ${row.expected} ${row.unit}`).toBeLessThanOrEqual(
      row.tolerance + 1e-12 * Math.abs(row.expected),
    )
    expect(row.within).toBe(true)
    expect(row.because).not.toBe('')
    expect(row.source).not.toBe('')
  })
})

describe('completeness of the outside checks', () => {
  it('every row of the list of sources, P01 to P42, has a case or a reason, never both', () => {
    const covered = publishedRows.flatMap(({ id }) => id.match(/P\d\d/g) ?? [])
    for (let n = 1; n <= 42; n++) {
      const id = `P${String(n).padStart(2, '0')}`
      expect([id, covered.includes(id)]).toEqual([id, rowsWithoutCase[id] === undefined])
    }
  })

  it('every model of the registry has a published case or a reason, never both', () => {
    const covered = new Set(publishedRows.flatMap((row) => row.models))
    for (const { id } of models) expect([id, covered.has(id)]).toEqual([id, modelsWithoutCase[id] === undefined])
    const known = new Set(models.map(({ id }) => id))
    for (const id of [...covered, ...Object.keys(modelsWithoutCase)]) expect([id, known.has(id)]).toEqual([id, true])
  })

  it('every row has at least one figure and an id of its own', () => {
    for (const row of publishedRows) expect(row.evaluate().flatMap(({ figures }) => figures).length).toBeGreaterThan(0)
    expect(new Set(publishedRows.map(({ id }) => id)).size).toBe(publishedRows.length)
  })

  it('takes half a unit of the last printed digit as tolerance where none is stated', () => {
    expect(halfLastDigit('5.37575')).toBeCloseTo(5e-6, 15)
    expect(halfLastDigit('150')).toBe(0.5)
    expect(halfLastDigit('1.5e-3')).toBeCloseTo(5e-5, 15)
    expect(halfLastDigit('.79762')).toBeCloseTo(5e-6, 15)
  })
})
