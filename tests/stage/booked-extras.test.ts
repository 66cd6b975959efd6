import { describe, expect, it } from 'vitest'
import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import type { Stage } from '../../src/domain/stage.ts'
import { slopeAt, statedSlopeAt } from '../../src/stage/book-instant.ts'
import { evaluate } from '../../src/stage/evaluate.ts'
import { type Kernel, row, switchPower } from '../../src/stage/kernel.ts'
import { drop, leakage, partOf } from './by-hand.ts'
import { partRows } from './rows-by-hand.ts'
import { carbide, gateDrive, kernelOf, ledgerAt, silicon, stage } from './samples.ts'

const junction = 380
const f = 100e3
const at = (fields: Parameters<typeof stage>[0] = {}, part: RectifierRecord = silicon()): Kernel =>
  ledgerAt(kernelOf(stage(fields), part), junction)!

describe('the turn-on slope', () => {
  it('of a gate drive is gm (V - V_th - I/2gm) over its delay, at the current taken over', () => {
    const kernel = at({ switch: { slope: gateDrive } })
    const { valley } = kernel.instant
    expect(valley).toBeGreaterThan(1)
    const byHand = (15 * (12 - 3.5 - valley / 30)) / (20 * 2e-9 + 15e-9)
    expect(kernel.turnOnSlope / byHand).toBeCloseTo(1, 12)
    expect(kernel.hotEvent.slope).toBe(kernel.turnOnSlope)
    const plateau = at({ switch: { slope: { ...gateDrive, plateau: 6 } } }).turnOnSlope
    expect(plateau / ((15 * (12 - 4.75)) / 55e-9)).toBeCloseTo(1, 12)
  })

  it('takes no negative current: without a valley it is that of an unloaded switch', () => {
    const kernel = at({ switch: { slope: gateDrive }, inductor: { inductance: 20e-6 } })
    expect(kernel.turnOnSlope / ((15 * 8.5) / 55e-9)).toBeCloseTo(1, 12)
  })

  it('is nothing that a drive below its threshold can deliver', () => {
    expect(ledgerAt(kernelOf(stage({ switch: { slope: { ...gateDrive, drive: 3 } } }), silicon()), junction)).toBeNull()
    // Exactly at the threshold of an unloaded switch nothing moves either.
    const idle = { switch: { slope: { ...gateDrive, drive: 3.5 } }, inductor: { inductance: 20e-6 } }
    expect(ledgerAt(kernelOf(stage(idle), silicon()), junction)).toBeNull()
  })

  it('is limited by the loop to V/L, after the factor of the draw', () => {
    const kernel = at({ loopInductance: 4e-6 })
    expect(slopeAt(kernel, 5)).toBeCloseTo(400 / 4e-6, 3)
    kernel.slopeFactor = 0.25
    expect(slopeAt(kernel, 5)).toBeCloseTo(0.25 * 200e6, 3)
    expect(statedSlopeAt(kernel, 5)).toBe(200e6)
    const free = at({ loopInductance: null })
    free.slopeFactor = 1.3
    expect(slopeAt(free, 5)).toBeCloseTo(1.3 * 200e6, 3)
  })
})

describe('the rest of the ledger', () => {
  it('a measured turn-off counts as it is, whatever the current', () => {
    const measured: Stage['switch']['turnOff'] = { kind: 'energy', energy: 30e-6 }
    const { rows } = at({ switch: { turnOff: measured } })
    expect(rows[row.turnOff]).toBeCloseTo(30e-6 * f, 12)
    expect(rows[row.stored]).toBe(0)
    expect(at({ switch: { turnOff: null } }).rows[row.turnOff]).toBe(0)
  })

  it('a measured turn-on is carried over by the overlap energies of both conditions', () => {
    const kernel = kernelOf(stage(), silicon())
    kernel.turnOn = { current: 10, voltage: 300, energy: 120e-6, addedShare: 0.5 }
    const { rows, instant } = ledgerAt(kernel, junction)!
    const overlap = (voltage: number, current: number): number => 0.5 * voltage * current * (current / 200e6 + 15e-9)
    const scale = overlap(400, instant.valley) / overlap(300, 10)
    expect(rows[row.turnOnBase]).toBeCloseTo(120e-6 * scale * f, 10)
    const plain = at().rows
    expect(rows[row.recoverySwitch]).toBeCloseTo(plain[row.recoverySwitch]! / 2, 12)
    expect(rows[row.capacitive]).toBeCloseTo(plain[row.capacitive]! / 2, 12)
  })

  it('charging is added by its share too where a part stores no charge', () => {
    const kernel = kernelOf(stage(), carbide())
    kernel.turnOn.addedShare = 0.25
    const { rows } = ledgerAt(kernel, junction)!
    expect(rows[row.capacitive]).toBeCloseTo(0.25 * kernel.part.chargingCost * f, 12)
  })

  it('without a valley the switch turns on into nothing', () => {
    const { rows } = at({ inductor: { inductance: 20e-6 } })
    expect(rows[row.turnOnBase]).toBe(0)
  })

  it.each([
    ['at its turn-off times', 10e-9, (peak: number): number => peak / 10e-9],
    ['else at the slope of the turn-on', 0, (): number => 200e6 * 0.55],
  ] as const)(
    'forward recovery costs (V_FP - V_F) I t/2, V_FP by the square root of the slope %s',
    (_, currentFall, slope) => {
      const record = silicon({ forwardRecovery: { peak: 9, time: 150e-9, slope: 1e8 } })
      const turnOff = { kind: 'times', voltageRise: 12e-9, currentFall } as const
      const kernel = at({ switch: { turnOff }, parallel: { parts: 2, imbalance: 0.1 } }, record)
      const { peak } = kernel.instant
      const each = (share: number): number => {
        const own = peak * share
        const steep = currentFall > 0 ? slope(own) : slope(own) * (share / 0.55)
        return ((9 * Math.sqrt(steep / 1e8) - drop(partOf(kernel), own, junction)) * own * 150e-9 * f) / 2
      }
      expect(kernel.rows[row.forwardRecovery]! / (each(0.55) + each(0.45))).toBeCloseTo(1, 10)
      const plain = at({ switch: { turnOff }, parallel: { parts: 2, imbalance: 0.1 } }).rows
      expect(kernel.rows[row.hotPart]! - plain[row.hotPart]!).toBeCloseTo(each(0.55), 9)
    },
  )

  it('an overshoot below the drop itself costs nothing', () => {
    const record = silicon({ forwardRecovery: { peak: 0.01, time: 150e-9, slope: 1e12 } })
    expect(at({}, record).rows[row.forwardRecovery]).toBe(0)
  })

  it('a part without leakage data books none, and one without capacitance no charging', () => {
    const body = silicon({ class: 'body-diode', capacitance: null })
    const { rows } = at({}, body)
    expect([rows[row.leakage], rows[row.capacitive]]).toEqual([0, 0])
    expect(at({}, carbide({ capacitance: null })).rows[row.capacitive]).toBe(0)
  })

  it('the heat of the switch is its own rows and what the rectifier adds to it', () => {
    const rows = Float64Array.from({ length: 14 }, (_, k) => 2 ** k)
    // Rows 6 to 9 are the switch's own, 2 and 3 the rectifier's recovery and charging in it.
    expect(switchPower(rows)).toBe(2 ** 6 + 2 ** 7 + 2 ** 8 + 2 ** 9 + 2 ** 2 + 2 ** 3)
  })
})

describe('a forward characteristic outside its usable range', () => {
  it('is replaced by the straight line between the drops at both ends of the period', () => {
    const kernel = kernelOf(stage(), silicon())
    kernel.coefficients.set([1.5, -0.4, 0.1, 0, 0, 0], 8)
    const { hot, instant, rows } = ledgerAt(kernel, junction)!
    expect(hot.chord).toBe(true)
    const { valley, peak, conductionShare } = instant
    const at = (current: number): number => 1.5 - 0.4 * Math.log(current / 8) + 0.1 * (current / 8)
    const low = at(valley)
    const high = Math.max(at(peak), low)
    // Mean of v i with both linear in time.
    const mean = (low * (2 * valley + peak) + high * (valley + 2 * peak)) / 6
    expect(rows[row.conduction]).toBeCloseTo(mean * conductionShare, 10)
  })
})

describe('a synchronous part', () => {
  const body = silicon({
    class: 'body-diode',
    channel: { onResistance: 0.06, perKelvin: 0.004 },
    deadTime: { before: 150e-9, after: 250e-9 },
  })
  const resistance = 0.06 * (1 + 0.004 * (junction - 298.15))

  it.each([
    ['positive', 500e-6, 1],
    ['negative', 80e-6, 1],
    ['positive, two parts', 500e-6, 2],
  ] as const)(
    'conducts by its diode in the dead times and by its channel in between: %s valley',
    (_, inductance, parts) => {
      const kernel = at({ inductor: { inductance }, parallel: { parts, imbalance: 0 } }, body)
      const { valley: low, peak: high, conductionShare } = kernel.instant
      const [valley, peak] = [low / parts, high / parts]
      expect(low > 0).toBe(inductance > 100e-6)
      const part = partOf(kernel)
      const before = valley > 0 ? drop(part, valley, junction) * valley * 150e-9 * f : 0
      const after = drop(part, peak, junction) * peak * 250e-9 * f
      const square = (valley * valley + valley * peak + peak * peak) / 3
      const channel = square * resistance * (conductionShare - 400e-9 * f)
      expect(kernel.rows[row.conduction]! / (parts * (before + after + channel))).toBeCloseTo(1, 12)
    },
  )

  it('recovers from what its diode stored in the dead time before the turn-on alone', () => {
    const kernel = at({}, body)
    const { event, recoverySwitch } = partRows(kernel, kernel.hot, junction, 200e6)
    expect(kernel.hotEvent.charge / event.charge).toBeCloseTo(1, 9)
    expect(kernel.rows[row.recoverySwitch]! / recoverySwitch).toBeCloseTo(1, 9)
  })

  it('has nothing to recover from where the current has turned round', () => {
    const kernel = at({ inductor: { inductance: 80e-6 } }, body)
    expect(kernel.hotEvent).toMatchObject({ outcome: 'negative-valley', charge: 0, rectifierEnergy: 0, current: 0 })
    expect(kernel.hotEvent.lifetime).toBeGreaterThan(1e-9)
    expect(kernel.rows[row.turnOnBase]).toBe(0)
  })

  it('with a given line loses nothing in its diode where the current has turned round', () => {
    const part = carbide({ channel: { onResistance: 0.06, perKelvin: 0 }, deadTime: { before: 150e-9, after: 250e-9 } })
    const kernel = at({ inductor: { inductance: 105e-6 } }, part)
    const { valley, peak, conductionShare } = kernel.instant
    expect(valley).toBeLessThan(-0.05)
    const square = (valley * valley + valley * peak + peak * peak) / 3
    const after = drop(partOf(kernel), peak, junction) * peak * 250e-9 * f
    expect(kernel.rows[row.conduction]).toBeCloseTo(after + square * 0.06 * (conductionShare - 400e-9 * f), 10)
    expect(kernel.hot.chord).toBe(false)
  })

  it('whose dead times fill the whole period has no time left for its channel', () => {
    const all = { ...body, deadTime: { before: 5e-6, after: 5e-6 } }
    const kernel = at({}, all)
    const { valley, peak } = kernel.instant
    const part = partOf(kernel)
    const lost = (drop(part, valley, junction) * valley + drop(part, peak, junction) * peak) * 5e-6 * f
    expect(kernel.rows[row.conduction]! / lost).toBeCloseTo(1, 12)
  })
})

describe('temperatures of an evaluation', () => {
  it('the switch grows linearly and never falls below a tenth of its 25 °C resistance', () => {
    const kernel = kernelOf(stage(), silicon())
    for (const [temperature, growth] of [
      [398.15, 1.6],
      [298.15, 1],
      [100, 0.1],
    ] as const) {
      kernel.temperatures[1] = temperature
      evaluate(kernel)
      expect(kernel.onResistance / (0.03 * growth)).toBeCloseTo(1, 12)
    }
  })

  it('the other parts leak at their own', () => {
    const kernel = kernelOf(stage({ parallel: { parts: 2, imbalance: 0 } }), silicon())
    kernel.temperatures.set([400, 380, 350])
    evaluate(kernel)
    const part = partOf(kernel)
    expect(kernel.hot.leakage / leakage(part, 400, 400)).toBeCloseTo(1, 12)
    expect(kernel.other.leakage / leakage(part, 400, 350)).toBeCloseTo(1, 12)
  })
})
