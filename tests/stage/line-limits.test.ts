import { describe, expect, it } from 'vitest'
import { evaluate, evaluateRound } from '../../src/stage/evaluate.ts'
import { solveLineInstant } from '../../src/stage/line-cycle.ts'
import { drop, partOf } from './by-hand.ts'
import { kelvin, kernelOf, ledgerAt, mainsStage, silicon } from './samples.ts'

const junction = 370

describe('one angle of the line', () => {
  it('idles at the difference to the output, at nothing where the mains is above it', () => {
    const kernel = ledgerAt(kernelOf(mainsStage({ output: { current: 0.1 } }), silicon()), junction)!
    solveLineInstant(kernel, 0.5)
    expect(kernel.instant.discontinuous).toBe(true)
    expect(kernel.instant.idleVoltage).toBeCloseTo(400 - 0.5 * 230 * Math.SQRT2, 10)
    const high = kernelOf(
      mainsStage({ input: { voltage: 283.1 }, output: { current: 0.1 }, inductor: { inductance: 20e-6 } }),
      silicon(),
    )
    expect(solveLineInstant(high, 1)).toBe(true)
    expect([high.instant.discontinuous, high.instant.idleVoltage]).toEqual([true, 0])
  })

  it('carries no power where the resistances take the whole voltage', () => {
    const kernel = kernelOf(mainsStage(), silicon())
    kernel.line.crestCurrent = (230 * Math.SQRT2) / (0.05 + kernel.onResistance)
    expect(solveLineInstant(kernel, 1)).toBe(false)
    kernel.line.crestCurrent *= 0.9
    const forward = drop(partOf(kernel), kernel.line.crestCurrent, kelvin(40))
    expect(forward).toBeGreaterThan(0)
    expect(solveLineInstant(kernel, 1)).toBe(true)
  })
})

describe('a mains stage that cannot deliver', () => {
  it('has no angle of continuous conduction', () => {
    const { line } = kernelOf(mainsStage({ inductor: { resistance: 80 } }), silicon())
    expect(line.continuousShare).toBe(0)
  })

  it('says so though it has delivered before', () => {
    const kernel = ledgerAt(kernelOf(mainsStage(), silicon()), junction)!
    evaluateRound(kernel)
    expect(kernel.delivers).toBe(true)
    kernel.inductorResistance = 80
    evaluateRound(kernel)
    expect(kernel.delivers).toBe(false)
  })

  it.each([
    ['its resistances', mainsStage({ inductor: { resistance: 40 } })],
    [
      'its gate drive',
      mainsStage({
        switch: {
          slope: {
            kind: 'gate',
            drive: 4,
            resistance: 10,
            inputCapacitance: 2e-9,
            transconductance: 1,
            threshold: 3.5,
            plateau: null,
            sourceInductance: 0,
          },
        },
      }),
    ],
  ] as const)('because of %s', (_, at) => {
    const kernel = kernelOf(at, silicon())
    evaluate(kernel)
    expect(kernel.delivers).toBe(false)
    evaluateRound(kernel)
    expect(kernel.delivers).toBe(false)
  })
})
