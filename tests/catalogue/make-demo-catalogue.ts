/**
 * Writes the invented table of 60 parts in catalogs-demo/catalogue, or a larger one anywhere else.
 * npm run tools && node dist/build/run-tool.js tests/catalogue/make-demo-catalogue.ts [COUNT FILE]
 */
import { writeFileSync } from 'node:fs'
import { inventedCatalogue } from './invented-catalogue.ts'

const [count = '60', file = 'catalogs-demo/catalogue/parts.csv'] = process.argv.slice(2)
writeFileSync(file, inventedCatalogue(Number(count), 7, count === '60' ? 25 : 250))
