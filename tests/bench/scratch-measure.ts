import { readFileSync } from 'node:fs'
import { readCatalogue } from '../../src/input/read-catalogue.ts'
import { readMapping } from '../../src/input/read-mapping.ts'
import { readStage } from '../../src/input/read-stage.ts'
import { prepareCandidate } from '../../src/study/candidate.ts'
import { judge } from '../../src/study/judge-candidate.ts'
import { assessCandidate } from '../../src/study/assess-candidate.ts'
import { stageLossOf } from '../../src/study/nominal-point.ts'
import { drawAll } from '../../src/study/uncertainty.ts'
import { pointCaveats } from '../../src/study/point-caveats.ts'

const t = () => performance.now()
const read = (f: string) => readFileSync(f, 'utf8')
const stage = readStage(read('/tmp/pump-cat.yaml'), 's').value!.stage
const mapping = readMapping(read('catalogs-demo/catalogue/mapping.yaml'), 'm').value!
let a = t()
const cat = readCatalogue(read('/tmp/parts50k.csv'), 'c', mapping).value!
console.log('read', t() - a, cat.rows, cat.badRows, process.memoryUsage().rss / 1e6)
a = t()
const losses: number[] = []
let prep = 0
let judged = 0
for (const record of cat.records) {
  const b = t()
  const candidate = prepareCandidate(stage, record, cat.records)
  const c = t()
  const j = judge(candidate)
  prep += c - b
  judged += t() - c
  losses.push(j.point === null ? NaN : stageLossOf(candidate, j.point.rows))
}
console.log('prepare', prep, 'judge', judged, 'us each', (prep / cat.records.length) * 1e3, (judged / cat.records.length) * 1e3)
a = t()
const as = cat.records.slice(0, 3000).map((r) => assessCandidate(prepareCandidate(stage, r, cat.records)))
console.log('full assess us', ((t() - a) / 3000) * 1e3)
a = t()
as.map(pointCaveats)
console.log('pointCaveats us', ((t() - a) / 3000) * 1e3)
a = t()
drawAll(stage, as.slice(0, 200), 1, 1000)
console.log('draws ms each', (t() - a) / 200)
a = t()
const clone = structuredClone(cat.records)
console.log('clone ms', t() - a, clone.length, process.memoryUsage().rss / 1e6)
