import { describe, expect, it } from 'vitest'
import { gateDrivenSlope } from '../../src/models/gate-slope.ts'

const gate = {
  drive: 12,
  resistance: 10,
  inputCapacitance: 2e-9,
  transconductance: 20,
  threshold: 3,
  plateau: 5,
  sourceInductance: 0,
  current: 8,
}

describe('slope from the gate drive', () => {
  it('is gm times the gate current over its capacitance without source inductance', () => {
    // (12 − 4) V over 10 Ω charges 2 nF at 0.4 V/ns
    expect(gateDrivenSlope(gate)).toBeCloseTo(20 * 0.4e9, 0)
  })

  it('is held by the source inductance alone where there is no resistance', () => {
    expect(gateDrivenSlope({ ...gate, resistance: 0, sourceInductance: 10e-9 })).toBeCloseTo(8 / 10e-9, 0)
  })

  it('takes the plateau that the current asks for when none is stated', () => {
    expect(gateDrivenSlope({ ...gate, plateau: null })).toBeCloseTo((20 * (12 - 3.2)) / 20e-9, 0)
    // the plateau at 8 A and 20 A/V is 3.4 V
    expect(gateDrivenSlope({ ...gate, plateau: null })).toBeCloseTo(gateDrivenSlope({ ...gate, plateau: 3.4 }), 0)
  })

  it('is not positive when the drive stays below the gate voltage the current needs', () => {
    expect(gateDrivenSlope({ ...gate, drive: 4 })).toBe(0)
    expect(gateDrivenSlope({ ...gate, drive: 3 })).toBeLessThan(0)
  })

  it('has no meaning where nothing limits it', () => {
    expect(() => gateDrivenSlope({ ...gate, resistance: 0 })).toThrow('gateDrivenSlope: resistance = 0 has no meaning')
  })
})
