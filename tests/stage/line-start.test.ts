import { describe, expect, it } from 'vitest'
import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import { forwardDrop } from '../../src/models/forward-drop.ts'
import { solveLineInstant } from '../../src/stage/line-cycle.ts'
import { kernelOf, ledgerAt, mainsStage, silicon } from './samples.ts'

describe('a mains boost that is continuous practically from the zero crossing on', () => {
  it('has its mode border exactly there and spends half the nodes', () => {
    const kernel = ledgerAt(kernelOf(mainsStage(), silicon()), 370)!
    expect(kernel.line.continuousShare).toBe(1)
    expect(kernel.line.count).toBe(12)
    const light = ledgerAt(kernelOf(mainsStage({ output: { current: 0.25 } }), silicon()), 370)!
    expect(light.line.continuousShare).toBeLessThan(1)
  })
})

describe('the dead times of a synchronous part at an angle of the line', () => {
  it('are a share of the conduction time there: v_in(angle)/V_o of the period', () => {
    const part: RectifierRecord = silicon({
      channel: { onResistance: 0.05, perKelvin: 0 },
      deadTime: { before: 100e-9, after: 100e-9 },
    })
    const at = mainsStage()
    const kernel = ledgerAt(kernelOf(at, part), 370)!
    for (const sine of [0.1, 0.5, 1]) {
      expect(solveLineInstant(kernel, sine)).toBe(true)
      const { duty, meanCurrent: current, inputVoltage: input } = kernel.instant
      const { constant, logarithmic, linear } = kernel.hot
      const { ratedCurrent } = kernel.part
      const diode = forwardDrop({ constant, logarithmic, linear, ratedCurrent, current, line: false })
      const share = (200e-9 * at.frequency * 400) / input
      const drop = share * diode + (1 - share) * current * 0.05
      const resistive = current * kernel.onResistance
      const balance = (400 + drop + current * 0.05 - input) / (400 + drop - resistive)
      expect(duty, `at a sine of ${sine}`).toBeCloseTo(balance, 12)
    }
  })
})
