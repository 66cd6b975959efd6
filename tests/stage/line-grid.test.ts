import { describe, expect, it } from 'vitest'
import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import { evaluateRound, placeConditions } from '../../src/stage/evaluate.ts'
import { type Kernel, type PartState, row } from '../../src/stage/kernel.ts'
import { solveLineInstant } from '../../src/stage/line-cycle.ts'
import { drop, partOf } from './by-hand.ts'
import { type Angle, angleAt, type LineInput, type RowName } from './line-by-hand.ts'
import { partRows } from './rows-by-hand.ts'
import { carbide, kelvin, kernelOf, ledgerAt, mainsStage, silicon, stage } from './samples.ts'

const junction = 370
const stages = {
  continuous: mainsStage(),
  both: mainsStage({ output: { current: 0.6 } }),
  discontinuous: mainsStage({ output: { current: 0.1 } }),
}
type Name = keyof typeof stages
const names = Object.keys(stages) as Name[]

const lineInput = (name: Name, kernel: Kernel, at: number): LineInput => ({
  at: stages[name],
  part: partOf(kernel),
  junction: at,
  onResistance: kernel.onResistance,
  angles: 0,
})

/** Mean over the nodes of the kernel. */
function nodeMean({ line }: Kernel, f: (sine: number) => number): number {
  let sum = 0
  for (let k = 0; k < line.count; k++) sum += line.weight[k]! * f(line.sine[k]!)
  return sum
}

/** Forward recovery of {@link slowToConduct}: (V_FP - V_F) I t/2 with V_FP by the root of the turn-off slope. [W] */
function overshoot(kernel: Kernel, { share }: PartState): number {
  const current = kernel.instant.peak * share
  const peak = 9 * Math.sqrt(current / 10e-9 / 1e8)
  const lost = Math.max(peak - drop(partOf(kernel), current, junction), 0)
  return (lost * current * 150e-9 * 65e3) / 2
}
const slowToConduct = { forwardRecovery: { peak: 9, time: 150e-9, slope: 1e8 } }

const carried = ({ valley, peak, share }: Angle): number => ((valley + peak) / 2) * share

describe('the nodes over the line', () => {
  it.each(names)('integrate a quarter of the line: %s', (name) => {
    const kernel = kernelOf(stages[name], silicon())
    // Four nodes below the layer leave 1e-5 of the highest power. Over a quarter the mean of 1 is 1, of the sine 2/pi, of its powers 1/2, 4/(3 pi) and 3/8.
    expect(nodeMean(kernel, () => 1)).toBeCloseTo(1, 13)
    expect(nodeMean(kernel, (sine) => sine)).toBeCloseTo(2 / Math.PI, 8)
    expect(nodeMean(kernel, (sine) => sine ** 2)).toBeCloseTo(1 / 2, 5)
    expect(nodeMean(kernel, (sine) => sine ** 3)).toBeCloseTo(4 / (3 * Math.PI), 5)
    expect(nodeMean(kernel, (sine) => sine ** 4)).toBeCloseTo(3 / 8, 4)
  })

  it('split where the valley turns positive, at the temperature of the surroundings', () => {
    const kernel = kernelOf(stages.both, silicon())
    const border = (1 - kernel.line.continuousShare) * (Math.PI / 2)
    expect(border).toBeGreaterThan(0.3)
    expect(border).toBeLessThan(1.3)
    const input = lineInput('both', kernel, kelvin(40))
    const at = (angle: number): Angle => angleAt(input, 230, kernel.line.startCrest, angle)
    expect(at(border * (1 - 1e-6)).discontinuous).toBe(true)
    expect(at(border * (1 + 1e-6)).discontinuous).toBe(false)
    // Four nodes up to three quarters of the border, eight in the layer below it, twelve above.
    const angles = [...kernel.line.sine.subarray(0, kernel.line.count)].map(Math.asin)
    const between = (low: number, high: number): number => angles.filter((a) => a > low && a < high).length
    expect([between(0, 0.75 * border), between(0.75 * border, border), between(border, 2)]).toEqual([4, 8, 12])
    expect(kernel.line.count).toBe(24)
  })

  it('need no panel above the border where there is none', () => {
    const { line } = kernelOf(stages.discontinuous, silicon())
    expect([line.continuousShare, line.count]).toEqual([0, 12])
  })

  it('lie at the crest that carries the output with drops at the surroundings', () => {
    for (const name of names) {
      const kernel = kernelOf(stages[name], silicon())
      const input = lineInput(name, kernel, kelvin(40))
      const mean = nodeMean(kernel, (sine) => carried(angleAt(input, 230, kernel.line.startCrest, Math.asin(sine))))
      expect(mean / stages[name].output.current).toBeCloseTo(1, 9)
    }
  })

  it('do not depend on what was solved before', () => {
    const alone = { kind: 'sink', ambientTemperature: kelvin(40), sinkToAmbient: 1, shared: false } as const
    for (const cooling of [mainsStage().cooling, alone]) {
      const kernel = kernelOf(mainsStage({ output: { current: 0.6 }, cooling }), silicon())
      const nodes = kernel.line.sine.slice()
      const started = kernel.temperatures.slice()
      kernel.temperatures.set([440, started[1]!, 430])
      if (kernel.thermal.switchSolved) kernel.temperatures[1] = 420
      kernel.line.crestCurrent = 77
      kernel.startCurrent = 5
      placeConditions(kernel)
      expect(kernel.line.sine).toEqual(nodes)
      expect(kernel.temperatures).toEqual(started)
      expect(kernel.startCurrent).toBe(0)
    }
  })

  it('are those of the mains alone: a dc stage keeps its temperatures and has no nodes', () => {
    const kernel = kernelOf(stage(), silicon())
    kernel.temperatures.set([400, 390, 380])
    placeConditions(kernel)
    expect([...kernel.temperatures]).toEqual([400, 390, 380])
    expect(kernel.line.count).toBe(0)
  })

  it('a synchronous part is continuous all over', () => {
    const body = silicon({ channel: { onResistance: 0.05, perKelvin: 0 }, deadTime: { before: 1e-7, after: 1e-7 } })
    const { line } = kernelOf(stages.discontinuous, body)
    expect([line.continuousShare, line.count]).toEqual([1, 12])
  })
})

describe('the ledger of a mains stage', () => {
  it.each(
    names.flatMap(
      (name) =>
        [
          [name, 'silicon', 1, silicon(slowToConduct)],
          [name, 'carbide', 2, carbide(slowToConduct)],
          [name, 'silicon', 3, silicon(slowToConduct)],
        ] as const,
    ),
  )(
    '%s, %s, %d in parallel: is the weighted sum of its periods, and its crest carries the output',
    (name: Name, _: string, parts: number, part: RectifierRecord) => {
      const at = mainsStage({ output: stages[name].output, parallel: { parts, imbalance: 0.2 } })
      const kernel = ledgerAt(kernelOf(at, part), junction)!
      const rows = kernel.rows.slice()
      let mean = 0
      const sums: Record<string, number> = {}
      const add = (key: RowName, watts: number): void => {
        sums[key] = (sums[key] ?? 0) + watts
      }
      for (let k = 0; k < kernel.line.count; k++) {
        const weight = kernel.line.weight[k]!
        expect(solveLineInstant(kernel, kernel.line.sine[k]!)).toBe(true)
        const { valley, peak, duty, conductionShare } = kernel.instant
        mean += weight * ((valley + peak) / 2) * conductionShare
        const shares = [kernel.hot, ...Array<PartState>(parts - 1).fill(kernel.other)]
        for (const [index, state] of shares.entries()) {
          const own = partRows(kernel, state, junction, 200e6)
          const forward = overshoot(kernel, state)
          for (const key of ['conduction', 'leakage', 'capacitive', 'recoverySwitch', 'recoveryRectifier'] as const)
            add(key, weight * own[key])
          add('forwardRecovery', weight * forward)
          const heat = own.conduction + own.leakage + own.recoveryRectifier + forward
          if (index < 2) add(index === 0 ? 'hotPart' : 'otherPart', weight * heat)
        }
        const square = (valley ** 2 + valley * peak + peak ** 2) / 3
        add('switchConduction', weight * square * duty * kernel.onResistance)
        add('inductor', weight * (square * (duty + conductionShare) * 0.05 + 2))
        add('turnOnBase', weight * 0.5 * 400 * valley * (valley / 200e6 + 15e-9) * 65e3)
        add('turnOff', weight * 0.5 * 400 * peak * 22e-9 * 65e3)
      }
      expect(mean / at.output.current).toBeCloseTo(1, 11)
      expect(rows[row.meanRectifierCurrent]).toBe(at.output.current)
      for (const [key, sum] of Object.entries(sums)) {
        const found = rows[row[key as RowName]]!
        expect(Math.abs(found - sum), `${key}: ${found} W against ${sum} W`).toBeLessThan(2e-6 * sum + 1e-12)
      }
      expect(rows[row.stored]).toBeCloseTo(2e-6 * 65e3, 12)
    },
  )

  it('one round books at the crest it finds and corrects it by what it carries', () => {
    const kernel = kernelOf(stages.both, silicon())
    kernel.temperatures.fill(junction)
    const crest = 0.9 * kernel.line.startCrest
    kernel.line.crestCurrent = crest
    evaluateRound(kernel)
    const mean = nodeMean(kernel, (sine) =>
      carried(angleAt(lineInput('both', kernel, junction), 230, crest, Math.asin(sine))),
    )
    expect(kernel.line.bookedMean / mean).toBeCloseTo(1, 12)
    expect(kernel.line.correction).toBeCloseTo(0.6 / mean - 1, 12)
    expect(kernel.line.crestCurrent / ((crest * 0.6) / mean)).toBeCloseTo(1, 12)
    expect(kernel.delivers).toBe(true)
  })

  it('a round at no current has nothing to scale and gives up', () => {
    const kernel = kernelOf(stages.both, carbide())
    kernel.line.crestCurrent = 0
    evaluateRound(kernel)
    expect(kernel.delivers).toBe(false)
  })
})
