import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import type { Stage } from '../../src/domain/stage.ts'
import { normalQuantile } from '../../src/numerics/normal-quantile.ts'
import { quantile } from '../../src/numerics/quantile.ts'
import { seededStream } from '../../src/numerics/seeded-stream.ts'
import { createKernel } from '../../src/stage/create-kernel.ts'
import { settle } from '../../src/stage/thermal-balance.ts'
import { stageLossOf, totalLossOf } from '../../src/study/nominal-point.ts'
import { rank } from '../../src/study/rank.ts'
import { coverageOf } from '../evidence/coverage.ts'
import { priorWorld, roughWorld, type World } from '../evidence/worlds.ts'
import type { Comparison, ValidationSection } from './compare.ts'

/** Worlds of each kind; fixed seeds, so the figures are the same in every run. */
const worlds = 500
const seed = 11
const draws = 400

/** Does the tool know how sure it is? Synthetic parts whose truth is known, judged from what a data sheet would say. */
export function honestySection(): ValidationSection {
  return {
    title: 'Honesty of the intervals and of "decided"',
    text:
      `${worlds} synthetic worlds of each kind, seed ${seed}: ultrafast parts drawn from the class prior, or following power laws that are none of the models; ` +
      '1 to 4 typical rows misread by the stated errors; used at 60 to 110 °C and one to six times the reference slope. ' +
      'The truth is that of one unit on one bench: its own spread, and in a whole stage the true slope, voltage fall and cooling.',
    rows: () => [...eventRows(), ...stageRows()],
  }
}

function eventRows(): readonly Comparison[] {
  const prior = coverageOf(Array.from({ length: worlds }, (_, index) => priorWorld({ seed, index })))
  const rough = coverageOf(Array.from({ length: worlds }, (_, index) => roughWorld({ seed, index })))
  const because = 'own claim: an interval holds what it says and is no wider than needed'
  return [
    inRange(
      'W1',
      'truth inside the 90 % interval of one event, parts from the prior',
      prior.inside,
      [0.85, 0.95],
      because,
    ),
    inRange('W2', 'truth inside the 90 % interval of one event, rough parts', rough.inside, [0.8, 1], because),
    inRange('W3', 'median high/low of the interval, parts from the prior', prior.ratio, [1, 2.2], because),
    inRange('W4', 'median high/low of the interval, rough parts', rough.ratio, [1, 2.2], because),
  ]
}

/** Whole stages with three competing parts each. */
function stageRows(): readonly Comparison[] {
  let inside = 0
  let intervals = 0
  let decided = 0
  let right = 0
  const ratios: number[] = []
  for (let index = 0; index < worlds; index++) {
    const parts = [0, 1, 2].map((k) => competitor(index, k))
    const stage = stageOf(index)
    const bench = benchOf(stage, index)
    const result = rank(
      stage,
      parts.map(({ record }) => record),
      { seed: index, draws, version: 'test', inputs: [] },
    )
    const truths = new Map(parts.map((part) => [part.record.id, truthOf(stage, part, bench)]))
    for (const { id, interval_w } of result.candidates) {
      const truth = truths.get(id)
      if (interval_w === null || truth == null) continue
      intervals++
      if (truth.total >= interval_w.low && truth.total <= interval_w.high) inside++
      ratios.push(interval_w.high / interval_w.low)
    }
    if (result.verdict.decided !== true || result.verdict.runner_up === null) continue
    decided++
    const accepted = result.candidates.filter(({ accepted }) => accepted).map(({ id }) => id)
    const cheapest = accepted.reduce((best, id) => (lossOf(truths, id) < lossOf(truths, best) ? id : best))
    if (cheapest === result.verdict.best) right++
  }
  const because = 'own claim; the binomial error of the count is 1 to 2 %'
  return [
    inRange('W5', 'true total inside interval_w, whole stage, three parts', inside / intervals, [0.85, 0.95], because),
    inRange(
      'W6',
      'median high/low of interval_w, whole stage',
      quantile(Float64Array.from(ratios), 0.5),
      [1, 2.2],
      because,
    ),
    inRange(
      'W7',
      `named best truly best where decided (${decided} of ${worlds} worlds)`,
      right / decided,
      [0.9, 1],
      because,
    ),
  ]
}

function lossOf(truths: ReadonlyMap<string, Truth | null>, id: string): number {
  return truths.get(id)?.stageLoss ?? Number.POSITIVE_INFINITY
}

/** One of three parts of a world, with an id of its own. */
function competitor(index: number, k: number): World {
  const world = priorWorld({ seed: seed + 1, index: 3 * index + k, class: k === 2 ? 'soft-ultrafast' : 'ultrafast' })
  const record: RectifierRecord = {
    ...world.record,
    id: `part-${k}`,
    thermal: { kind: 'case', junctionToCase: 1.5, caseToSink: 0.5 },
  }
  return { ...world, record, truth: { ...world.truth, id: record.id } }
}

/** A boost stage with 400 V on the rectifier, at the worlds' range of slopes and load. */
function stageOf(index: number): Stage {
  const stream = seededStream(seed, 'stage', index)
  const between = (low: number, high: number): number => low + (high - low) * stream.uniform()
  return {
    kind: 'boost',
    title: null,
    input: { kind: 'dc', voltage: 200 },
    output: { voltage: 400, current: between(1, 3.5), capacitance: null, bleeder: null },
    frequency: between(40e3, 120e3),
    inductor: { inductance: 1e-3, resistance: 0.05, coreLoss: 0 },
    switch: {
      onResistance: 0.06,
      onResistancePerKelvin: 0.006,
      slope: { kind: 'given', slope: between(1e8, 6e8) },
      voltageFall: 20e-9,
      turnOff: null,
      storedEnergy: 0,
      turnOn: null,
      thermal: null,
    },
    loopInductance: null,
    snubberCapacitance: 0,
    cooling: { kind: 'sink', ambientTemperature: 323.15, sinkToAmbient: 2, shared: false },
    limits: { junction: null, voltageUse: 1 },
    spread: { slope: 0.25, voltageFall: 0.25, thermal: 0.1 },
    fixedLosses: 0,
    dutyProfile: null,
    candidates: null,
    incumbent: null,
    parallel: { parts: 1, imbalance: 0 },
    assumed: [],
  }
}

interface Bench {
  readonly slope: number
  readonly voltageFall: number
  readonly thermal: number
}

/** What the bench of this world really shows of the stage, the same for all its parts. */
function benchOf(stage: Stage, index: number): Bench {
  const stream = seededStream(seed, 'bench', index)
  const factor = (spread: number): number => Math.exp(spread * normalQuantile(stream.uniform()))
  return {
    slope: factor(stage.spread.slope),
    voltageFall: factor(stage.spread.voltageFall),
    thermal: factor(stage.spread.thermal),
  }
}

interface Truth {
  readonly total: number
  readonly stageLoss: number
}

/** The same engine without doubt: the own unit on the real bench; null where it has no stable temperature. */
function truthOf(stage: Stage, { record, truth }: World, bench: Bench): Truth | null {
  const kernel = createKernel({ stage, record, rectifier: truth })
  kernel.slopeFactor = bench.slope
  kernel.voltageFall *= bench.voltageFall
  kernel.thermal.factor = bench.thermal
  if (!settle(kernel)) return null
  const candidate = { stage, record, read: record, rectifier: truth, kernel, turnOn: null, caveats: [] }
  return { total: totalLossOf(kernel.rows), stageLoss: stageLossOf(candidate, kernel.rows) }
}

function inRange(
  id: string,
  quantity: string,
  computed: number,
  [low, high]: readonly [number, number],
  because: string,
): Comparison {
  const middle = (low + high) / 2
  return {
    id,
    quantity,
    unit: '1',
    printed: `${low} to ${high}`,
    expected: middle,
    computed,
    error: computed - middle,
    tolerance: (high - low) / 2,
    within: computed >= low && computed <= high,
    because,
    source: 'own synthetic worlds',
  }
}
