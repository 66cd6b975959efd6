import { describe, expect, it } from 'vitest'
import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import type { Stage } from '../../src/domain/stage.ts'
import type { Kernel } from '../../src/stage/kernel.ts'
import { drop, partOf } from './by-hand.ts'
import { carbide, kernelOf, ledgerAt, silicon, stage } from './samples.ts'

const junction = 380

/** The drop of one of the parts in the balance; a synchronous one conducts through its diode in the dead times. [V] */
function forward(kernel: Kernel, mean: number): number {
  const { part, hotShare, kind, inputVoltage: vin, outputVoltage: vo } = kernel
  const diode = Math.max(drop(partOf(kernel), mean * hotShare, junction), 0)
  if (!part.synchronous) return diode
  const share = { buck: 1 - vo / vin, boost: vin / vo, inverting: vin / (vin + vo), 'mains-boost': 0 }[kind]
  const dead = Math.min(1, ((part.deadBefore + part.deadAfter) * kernel.frequency) / share)
  return dead * diode + (1 - dead) * mean * hotShare * kernel.hot.channelResistance
}

/** Voltages across the inductor with the drops at a mean current (PHYSICS 4). [V] */
function voltages(kernel: Kernel, mean: number): { readonly on: number; readonly off: number } {
  const { kind, inputVoltage: vin, outputVoltage: vo, inductorResistance: coil, onResistance } = kernel
  return {
    on: (kind === 'buck' ? vin - vo : vin) - mean * (onResistance + coil),
    off: vo + forward(kernel, mean) + mean * coil - (kind === 'boost' ? vin : 0),
  }
}

const relative = (found: number, wanted: number): number => Math.abs(found / wanted - 1)

/** Volt-second and charge balance of a continuous period, to rounding. */
function checkContinuous(kernel: Kernel): void {
  const { instant, outputCurrent, inductance, frequency } = kernel
  const { duty, meanCurrent, ripple } = instant
  const { on, off } = voltages(kernel, meanCurrent)
  expect(relative(on * duty, off * (1 - duty)), 'volt-seconds').toBeLessThan(2e-13)
  const delivered = kernel.kind === 'buck' ? meanCurrent : meanCurrent * (1 - duty)
  expect(relative(delivered, outputCurrent), 'charge').toBeLessThan(2e-13)
  expect(instant.conductionShare).toBeCloseTo(1 - duty, 15)
  expect(relative(ripple, (on * duty) / (inductance * frequency)), 'ripple').toBeLessThan(1e-13)
  expect([instant.valley, instant.peak]).toEqual([meanCurrent - ripple / 2, meanCurrent + ripple / 2])
  expect([instant.continuousValley, instant.discontinuous]).toEqual([instant.valley, false])
}

/** The same of a discontinuous period, with the drops at half the peak. */
function checkDiscontinuous(kernel: Kernel): void {
  const { instant, outputCurrent, inductance, frequency } = kernel
  const { duty, conductionShare, peak } = instant
  const { on, off } = voltages(kernel, peak / 2)
  expect(relative((on * duty) / (inductance * frequency), peak), 'rise').toBeLessThan(2e-13)
  expect(relative((off * conductionShare) / (inductance * frequency), peak), 'fall').toBeLessThan(2e-13)
  const carrying = kernel.kind === 'buck' ? duty + conductionShare : conductionShare
  expect(relative((peak / 2) * carrying, outputCurrent), 'charge').toBeLessThan(2e-13)
  expect(duty + conductionShare).toBeLessThan(0.99)
  expect(instant).toMatchObject({ valley: 0, ripple: peak, discontinuous: true })
  expect(instant.meanCurrent).toBeCloseTo((peak / 2) * (duty + conductionShare), 14)
  expect(instant.continuousValley).toBeLessThan(0)
}

const body = silicon({
  class: 'body-diode',
  channel: { onResistance: 0.06, perKelvin: 0.004 },
  deadTime: { before: 150e-9, after: 250e-9 },
})

/** Low voltages: the drop is a large part of the balance, and a search that stops early shows. */
const low = {
  boost: {
    kind: 'boost',
    input: { voltage: 5 },
    output: { voltage: 12, current: 1.5 },
    inductor: { inductance: 60e-6 },
  },
  inverting: {
    kind: 'inverting',
    input: { voltage: 6 },
    output: { voltage: 9, current: 1.5 },
    inductor: { inductance: 60e-6 },
  },
  buck: { kind: 'buck', input: { voltage: 9 }, output: { voltage: 4, current: 3 }, inductor: { inductance: 60e-6 } },
} as const

const cases = Object.values(low).flatMap((fields) =>
  [silicon(), carbide(), body].flatMap((part) =>
    [1, 3].map(
      (parts) =>
        [fields.kind, part.class, parts, stage({ ...fields, parallel: { parts, imbalance: 0.2 } }), part] as const,
    ),
  ),
)

describe('a continuous period balances volt-seconds and charge to rounding', () => {
  it.each(cases)('%s, %s, %d in parallel', (_, __, ___, at, part) => {
    checkContinuous(ledgerAt(kernelOf(at, part), junction)!)
  })

  it.each(cases)('%s, %s, %d in parallel: also from a start far off', (_, __, ___, at, part) => {
    for (const start of [1e-3, 40]) {
      const kernel = kernelOf(at, part)
      kernel.startCurrent = start
      checkContinuous(ledgerAt(kernel, junction)!)
    }
  })

  it('is found though the tangent at the start has no root: the drop is held from there on', () => {
    const at = stage({ ...low.boost, input: { voltage: 3 }, switch: { onResistance: 0.03 } })
    for (const start of [0.05, 0.1, 0.2, 0.3, 0.5]) {
      const kernel = kernelOf(at, silicon())
      kernel.startCurrent = start
      checkContinuous(ledgerAt(kernel, junction)!)
    }
  })

  it.each(['boost', 'inverting'] as const)(
    '%s: the lower of the two currents that balance, near the loss-free one',
    (kind) => {
      const {
        instant,
        outputCurrent: io,
        inputVoltage: vin,
        outputVoltage: vo,
      } = ledgerAt(kernelOf(stage(low[kind]), silicon()), junction)!
      const lossFree = (io * (kind === 'boost' ? vo : vo + vin)) / vin
      expect(instant.meanCurrent).toBeGreaterThan(lossFree)
      expect(instant.meanCurrent).toBeLessThan(1.5 * lossFree)
    },
  )

  it('a synchronous part stays continuous with a negative valley', () => {
    for (const fields of Object.values(low)) {
      const kernel = ledgerAt(kernelOf(stage({ ...fields, inductor: { inductance: 2e-6 } }), body), junction)!
      checkContinuous(kernel)
      expect(kernel.instant.valley).toBeLessThan(0)
    }
  })

  it('a boost fed above its output does not switch', () => {
    const { instant } = ledgerAt(kernelOf(stage({ input: { voltage: 405 } }), silicon()), junction)!
    expect(instant).toMatchObject({ duty: 0, conductionShare: 1, ripple: 0 })
  })
})

describe('a discontinuous period carries the output with the drops at half its peak', () => {
  const idle = { boost: 12 - 5, inverting: 9, buck: 4 } as const
  it.each(
    Object.values(low).flatMap((fields) =>
      [silicon(), carbide()].map((part) => [fields.kind, part.id, fields, part] as const),
    ),
  )('%s, %s', (kind, _, fields, part) => {
    const kernel = ledgerAt(kernelOf(stage({ ...fields, inductor: { inductance: 2.5e-6 } }), part), junction)!
    checkDiscontinuous(kernel)
    expect(kernel.instant.idleVoltage).toBe(idle[kind])
  })

  it('above its output a boost has no idle voltage', () => {
    // Half a volt above, the drop alone resets the inductor.
    const at = stage({ input: { voltage: 400.5 }, output: { current: 0.4 }, inductor: { inductance: 1e-6 } })
    const { instant } = ledgerAt(kernelOf(at, silicon()), junction)!
    expect([instant.discontinuous, instant.idleVoltage]).toEqual([true, 0])
  })
})

describe('a stage that cannot deliver', () => {
  const never = (fields: Parameters<typeof stage>[0], part: RectifierRecord = silicon()): void => {
    expect(ledgerAt(kernelOf(stage(fields) as Stage, part), junction)).toBeNull()
  }

  it('has a resistance that no current overcomes', () => {
    never({ ...low.boost, switch: { onResistance: 2 } })
    // At its loss-free current this one would still have 2.6 V to raise the current with.
    never({ ...low.boost, switch: { onResistance: 0.6, onResistancePerKelvin: 0 } })
    never({ ...low.inverting, inductor: { ...low.inverting.inductor, resistance: 4 } })
  })

  it('is a buck below its output, or one whose switch would have to drop more than the input', () => {
    never({ ...low.buck, input: { voltage: 3.9 } })
    never({ ...low.buck, switch: { onResistance: 5 } })
  })

  it('is one whose current could not rise to the peak that its discontinuous period needs', () => {
    // 0.01 A at 12 V from a nanohenry asks for some 25 A; one ohm lets no more than 10 A through.
    never({
      kind: 'boost',
      input: { voltage: 10 },
      output: { voltage: 12, current: 0.01 },
      inductor: { inductance: 0.9e-9, resistance: 0 },
      switch: { onResistance: 1, onResistancePerKelvin: 0 },
    })
  })
})
