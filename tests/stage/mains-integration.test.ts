import { describe, expect, it } from 'vitest'
import { row } from '../../src/stage/kernel.ts'
import { solveLineInstant } from '../../src/stage/line-cycle.ts'
import { partOf } from './by-hand.ts'
import { angleAt, crestOf, type LineInput, lineRows, type RowName } from './line-by-hand.ts'
import { carbide, kernelOf, ledgerAt, mainsStage, silicon } from './samples.ts'

const junction = 370

/**
 * 24 nodes stand for the line: 1e-4 where a row is smooth between the panels; recovery dies out within the layer below
 * the mode border (2e-4), and the capacitive row of a part that stores charge only lives in it (of its full height).
 */
function allowed(key: string, value: number, charging: number): number {
  if (key === 'capacitive') return 5e-3 * charging
  return (key.startsWith('recovery') ? 2e-4 : 1e-4) * value + 1e-12
}
const fixtures = [
  ['1 kW at 230 V', mainsStage({ inductor: { coreLoss: 0 } })],
  ['1 kW at 90 V', mainsStage({ input: { voltage: 90 }, inductor: { coreLoss: 0 } })],
  [
    '100 W at 230 V, discontinuous over most of the line',
    mainsStage({ output: { current: 0.25 }, inductor: { coreLoss: 0 } }),
  ],
  [
    '200 W at 253 V, crest near the output',
    mainsStage({ input: { voltage: 253 }, output: { voltage: 385, current: 0.52 }, inductor: { coreLoss: 0 } }),
  ],
] as const

describe('a mains boost is the sum of its dc form over 20 000 angles', () => {
  it.each(fixtures.flatMap(([name, at]) => [silicon(), carbide()].map((part) => [name, part.id, at, part] as const)))(
    '%s, %s',
    (_, __, at, record) => {
      const kernel = ledgerAt(kernelOf(at, record), junction)!
      const input: LineInput = { at, part: partOf(kernel), junction, onResistance: kernel.onResistance, angles: 20_000 }
      const expected = lineRows(input, at.input.voltage, kernel)
      for (const [key, value] of Object.entries(expected)) {
        const found = kernel.rows[row[key as RowName]]!
        expect(Math.abs(found - value), `row ${key}: ${found} W against ${value} W`).toBeLessThan(
          allowed(key, value, kernel.part.chargingCost * at.frequency),
        )
      }
    },
  )
})

describe('the angles of the line', () => {
  it.each(fixtures)('%s: mode, currents and duty at each angle are those of the dc form', (_, at) => {
    const kernel = ledgerAt(kernelOf(at, silicon()), junction)!
    const input: LineInput = { at, part: partOf(kernel), junction, onResistance: kernel.onResistance, angles: 0 }
    const crest = crestOf(input, at.input.voltage)
    expect(Math.abs(kernel.line.crestCurrent / crest - 1), 'crest of the line current').toBeLessThan(1e-5)
    let discontinuous = 0
    for (let degrees = 1; degrees <= 90; degrees++) {
      const angle = (degrees * Math.PI) / 180
      const here = angleAt(input, at.input.voltage, kernel.line.crestCurrent, angle)
      expect(solveLineInstant(kernel, Math.sin(angle)), `${degrees} degrees carries power`).toBe(true)
      expect(kernel.instant.discontinuous, `mode at ${degrees} degrees`).toBe(here.discontinuous)
      expect(kernel.instant.valley, `valley at ${degrees} degrees`).toBeCloseTo(here.valley, 9)
      expect(kernel.instant.peak, `peak at ${degrees} degrees`).toBeCloseTo(here.peak, 9)
      expect(kernel.instant.duty, `duty at ${degrees} degrees`).toBeCloseTo(here.duty, 9)
      if (here.discontinuous) discontinuous++
    }
    expect(Math.abs(1 - discontinuous / 90 - kernel.line.continuousShare), 'share of the line').toBeLessThan(0.02)
  })

  it.each([
    [1200, 85, 400, 3.0, 7.1303],
    [1200, 230, 400, 3.0, 4.3347],
    [300, 90, 390, 0.76923, 1.75442],
  ])('%d W at %d V to %d V, ripple-free and drop-free: mean %d A, rms %d A', (power, mains, output, mean, rms) => {
    const at = mainsStage({
      input: { voltage: mains },
      output: { voltage: output, current: power / output },
      inductor: { inductance: 10, resistance: 0 },
      switch: { onResistance: 0 },
    })
    const line = carbide().forwardLine!
    const resistance = 1e-9
    const none = { threshold: 0, resistance, thresholdPerKelvin: 0, resistancePerKelvin: 0 }
    const kernel = ledgerAt(kernelOf(at, carbide({ forwardLine: { ...line, ...none } })), 298.15)!
    const { rows } = kernel
    expect(rows[row.meanRectifierCurrent]!.toPrecision(mean < 1 ? 5 : 4)).toBe(mean.toPrecision(mean < 1 ? 5 : 4))
    // Conduction in a resistance alone tells the rms current.
    expect(Math.sqrt(rows[row.conduction]! / resistance)).toBeCloseTo(rms, 4)
  })
})
