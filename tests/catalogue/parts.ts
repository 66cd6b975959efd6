import { readFileSync } from 'node:fs'
import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import type { Stage } from '../../src/domain/stage.ts'
import { readCatalogue } from '../../src/input/read-catalogue.ts'
import { readMapping } from '../../src/input/read-mapping.ts'
import { readStage } from '../../src/input/read-stage.ts'
import { inventedCatalogue } from './invented-catalogue.ts'

/** So many invented parts, read through the demonstration's mapping. */
export function inventedParts(count: number, seed: number): readonly RectifierRecord[] {
  const mapping = readMapping(readFileSync('catalogs-demo/catalogue/mapping.yaml', 'utf8'), 'mapping.yaml').value
  const table = mapping && readCatalogue(inventedCatalogue(count, seed), 'parts.csv', mapping).value
  if (!table) throw new Error('the invented table cannot be read')
  return table.records
}

/** A demonstration stage that takes whatever parts there are. */
export function openStage(name: string): Stage {
  const stage = readStage(readFileSync(`catalogs-demo/stages/${name}.yaml`, 'utf8'), name).value?.stage
  if (!stage) throw new Error(`${name} cannot be read`)
  return { ...stage, candidates: null, incumbent: null, dutyProfile: null }
}

export const settings = { seed: 1, draws: 40, version: '0', inputs: [] }
