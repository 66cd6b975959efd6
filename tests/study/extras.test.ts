import { describe, expect, it } from 'vitest'
import type { Stage } from '../../src/domain/stage.ts'
import { calibrate } from '../../src/evidence/calibrate.ts'
import { recoveryAt } from '../../src/evidence/recovery-at.ts'
import { ringingPeakVoltage } from '../../src/models/peak-reverse-voltage.ts'
import { rank } from '../../src/study/rank.ts'
import { record } from '../evidence/records.ts'
import { capacitive, hardEvent, storedCharge } from '../stage/by-hand.ts'
import { carbide, kelvin, silicon, stage } from '../stage/samples.ts'
import { alone, ranked, settings, warningCodes } from './settings.ts'

const cold = { kind: 'case', caseTemperature: kelvin(60) } as const

describe('measured turn-on energy and what it may contain', () => {
  const turnOn = (includesRectifier: 'yes' | 'no' | 'unknown', rectifier: string | null) => ({
    energy: 400e-6,
    current: 6,
    voltage: 380,
    includesRectifier,
    rectifier,
  })
  const at = (given: Stage['switch']['turnOn']): Stage =>
    stage({ cooling: cold, loopInductance: 0, switch: { turnOn: given } })
  const base = (current: number, voltage: number): number => ((voltage * current) / 2) * (current / 200e6 + 15e-9)
  const scaled = (energy: number, valley: number): number => (energy * base(valley, 400)) / base(6, 380)

  /** What the test rectifier adds to the switch at 6 A, 380 V, 25 °C from a steady current. */
  function contained(): number {
    const { rectifier } = calibrate({ record: silicon(), blockingVoltage: 380 })
    const { lifetime: tau, tailTime: tail } = recoveryAt({ rectifier, current: 6, slope: 200e6, junction: 298.15 })!
    const event = hardEvent({ current: 6, slope: 200e6, tau, tail, charge: 6 * tau }, 380, 15e-9)
    const { charge, cost } = capacitive(150e-12, 0.8, 0.45, 380)
    return event.switchAdded + cost * Math.max(0, 1 - event.charge / charge)
  }

  it('no: the energy is the base, moved to the point by the overlap; the rectifier is added', () => {
    const found = alone(at(turnOn('no', null)), silicon())
    expect(found.switch.turn_on_base_w).toBeCloseTo(scaled(400e-6, found.point!.valley_a) * 100e3, 6)
    expect(found.losses_w.recovery_switch).toBeGreaterThan(0)
  })

  it('yes with the test rectifier: its share is taken off first', () => {
    const found = alone(at(turnOn('yes', 'silicon')), silicon())
    const energy = 400e-6 - contained()
    expect(found.switch.turn_on_base_w).toBeCloseTo(scaled(energy, found.point!.valley_a) * 100e3, 5)
    expect(found.losses_w.recovery_switch).toBeGreaterThan(0)
  })

  it('yes with the test rectifier, and less than it: floor 0, warned', () => {
    const result = ranked(at({ ...turnOn('yes', 'silicon'), energy: 1e-6 }), silicon())
    expect(result.candidates[0]!.switch.turn_on_base_w).toBe(0)
    expect(warningCodes(result)).toContain('turn-on-floor')
  })

  it('yes without it: nothing is added to the switch, all look alike there, and that is said', () => {
    const result = ranked(at(turnOn('yes', null)), silicon(), carbide())
    for (const { losses_w } of result.candidates)
      expect([losses_w.recovery_switch, losses_w.capacitive]).toEqual([0, 0])
    expect(result.candidates.find(({ id }) => id === 'silicon')!.losses_w.recovery_rectifier).toBeGreaterThan(0)
    expect(warningCodes(result)).toContain('turn-on-contains-recovery')
  })

  it('yes with a rectifier that no record describes: as without, and both are said', () => {
    const codes = warningCodes(ranked(at(turnOn('yes', 'lost')), silicon()))
    expect(codes).toEqual(expect.arrayContaining(['turn-on-contains-recovery', 'turn-on-rectifier-missing']))
  })

  it('unknown: nominal is the higher reading, draws lie between both, warned', () => {
    const loss = (meaning: 'yes' | 'no' | 'unknown') => alone(at(turnOn(meaning, 'silicon')), silicon()).stage_loss_w!
    expect(loss('unknown')).toBe(Math.max(loss('yes'), loss('no')))
    expect(warningCodes(ranked(at(turnOn('unknown', 'silicon')), silicon()))).toContain('turn-on-unknown')
    const { verdict } = rank(at(turnOn('unknown', null)), [silicon(), carbide()], settings(200))
    expect(verdict.sensitivity!.map(({ input }) => input)).toContain('turn_on')
  })
})

describe('the slope', () => {
  const gate = {
    kind: 'gate',
    drive: 12,
    resistance: 20,
    inputCapacitance: 2e-9,
    transconductance: 20,
    threshold: 3.5,
    plateau: 5.5,
    sourceInductance: 3e-9,
  } as const
  const gated = (fields: Partial<Record<keyof typeof gate, number | null>>, rest: Partial<Stage> = {}): Stage =>
    stage({ ...rest, switch: { slope: { ...gate, ...fields } as Stage['switch']['slope'] } })

  it('comes from the gate drive: gm (V_drive − V_mid)/(R_g C_iss + gm L_source)', () => {
    const slope = (20 * (12 - 4.5)) / (20 * 2e-9 + 20 * 3e-9)
    expect(alone(gated({}), silicon()).event!.slope_a_per_s).toBeCloseTo(slope, 0)
  })

  it('without a plateau the middle is threshold + I/(2 gm) at the valley', () => {
    const { event, point } = alone(gated({ plateau: null }), silicon())
    const slope = (20 * (12 - 3.5 - point!.valley_a / 40)) / (20 * 2e-9 + 20 * 3e-9)
    expect(event!.slope_a_per_s / slope).toBeCloseTo(1, 12)
  })

  it('is at most V/L_loop, and that is said', () => {
    const fast = stage({ loopInductance: 20e-9, switch: { slope: { kind: 'given', slope: 40e9 } } })
    const result = ranked(fast, silicon())
    expect(result.candidates[0]!.event!.slope_a_per_s).toBeCloseTo(400 / 20e-9, 0)
    expect(result.stage.slope_a_per_s).toBeCloseTo(20e9, 0)
    expect(warningCodes(result)).toContain('slope-limited')
    expect(warningCodes(ranked(stage(), silicon()))).not.toContain('slope-limited')
  })

  it('I + I_RM above what the gate allows is said', () => {
    expect(warningCodes(ranked(gated({ transconductance: 0.3 }), silicon()), 'silicon')).toContain('switch-saturates')
    expect(warningCodes(ranked(gated({}), silicon()), 'silicon')).not.toContain('switch-saturates')
  })

  it('a gate drive that cannot reach the current is refused, not reckoned with', () => {
    const weak = gated({ drive: 4, plateau: null, transconductance: 2 })
    expect(() => ranked(weak, silicon())).toThrow('cannot-deliver')
  })

  it('without a gate, I_RM above 3 I + 5 A is said', () => {
    const slow = silicon({ class: 'standard', recovery: [] })
    const light = stage({
      cooling: cold,
      frequency: 50e3,
      input: { voltage: 24 },
      output: { voltage: 48, current: 1 },
      switch: { slope: { kind: 'given', slope: 3e9 } },
    })
    const { candidates, ...result } = ranked(light, slow)
    const { peak_reverse_a, current_a } = candidates[0]!.event!
    expect(peak_reverse_a).toBeGreaterThan(3 * current_a + 5)
    expect(result.warnings.map(({ code }) => code)).toContain('peak-current-unchecked')
  })
})

describe('rows that only some inputs make', () => {
  it('snubber: C V² f in the stage loss, and in no row of the rectifier', () => {
    const [plain, snubbed] = [0, 220e-12].map((snubberCapacitance) =>
      alone(stage({ cooling: cold, snubberCapacitance }), silicon()),
    )
    expect(snubbed!.snubber_w).toBeCloseTo(220e-12 * 400 * 400 * 100e3, 12)
    expect(snubbed!.stage_loss_w! - plain!.stage_loss_w!).toBeCloseTo(snubbed!.snubber_w, 9)
    expect(snubbed!.losses_w).toEqual(plain!.losses_w)
  })

  it('measured turn-off: taken as it stands, and the stored row is 0', () => {
    const { switch: part } = alone(
      stage({ switch: { turnOff: { kind: 'energy', energy: 33e-6 }, storedEnergy: 5e-6 } }),
      silicon(),
    )
    expect(part.turn_off_w).toBeCloseTo(3.3, 12)
    expect(part.stored_w).toBe(0)
  })

  it('the two parts of the overshoot: the larger counts', () => {
    const at = stage({ loopInductance: 15e-9 })
    const { event } = alone(at, silicon())
    const stored = 400 + (15e-9 * event!.peak_reverse_a) / event!.tau_rr_s!
    const ringing = ringingPeakVoltage({
      voltage: 400,
      voltageFall: 15e-9,
      loopInductance: 15e-9,
      capacitance: { kind: 'law', zeroBias: 150e-12, builtIn: 0.8, grading: 0.45 },
      parts: 1,
    })
    expect(event!.peak_reverse_v).toBeCloseTo(Math.max(stored, ringing), 9)
  })

  it('the maximum event has its own overshoot and more charge', () => {
    const rows = silicon().recovery
    const part = silicon({
      capacitance: null,
      recovery: [...rows, { ...rows[1]!, charge: 400e-9, peakReverseCurrent: 9, grade: 'maximum' } as (typeof rows)[0]],
    })
    const { event, event_maximum } = alone(stage(), part)
    expect(event_maximum!.qrr_c).toBeGreaterThan(1.3 * event!.qrr_c)
    expect(event_maximum!.peak_reverse_v).toBeCloseTo(
      400 + (8e-9 * event_maximum!.peak_reverse_a) / event_maximum!.tau_rr_s!,
      9,
    )
    expect(alone(stage(), silicon()).event_maximum).toBeNull()
  })
})

describe('a body diode with a channel', () => {
  const transistor = record({
    id: 'transistor',
    class: 'body-diode',
    ratings: { reverseVoltage: 60, averageCurrent: 20, junction: kelvin(150) },
    thermal: { kind: 'case', junctionToCase: 1, caseToSink: 0.5 },
    forward: [],
    deadTime: { before: 40e-9, after: 30e-9 },
    channel: { onResistance: 0.008, perKelvin: 0.006 },
  })
  const buck = (inductance: number, current = 8) =>
    stage({
      kind: 'buck',
      frequency: 250e3,
      cooling: cold,
      input: { voltage: 24 },
      output: { voltage: 5, current },
      inductor: { inductance },
    })

  it('conducts by its diode in both dead times and by its channel in between', () => {
    const { point, losses_w, junction_c } = alone(buck(10e-6), transistor)
    const { rectifier } = calibrate({ record: transistor, blockingVoltage: 24 })
    const c = rectifier.forward.posterior.mean
    const rise = junction_c! - 25
    const drop = (i: number): number => {
      const x = i / 20
      return c[0]! + rise * c[3]! + (c[1]! + rise * c[4]!) * Math.log(x) + (c[2]! + rise * c[5]!) * x
    }
    const { valley_a: low, peak_a: high, duty } = point!
    const square = (low * low + low * high + high * high) / 3
    const channel = square * 0.008 * (1 + 0.006 * rise) * (1 - duty - 70e-9 * 250e3)
    const diode = (drop(low) * low * 40e-9 + drop(high) * high * 30e-9) * 250e3
    expect(losses_w.conduction).toBeCloseTo(channel + diode, 6)
  })

  it('recovers the charge of the dead time before turn-on alone, at the valley current', () => {
    const { event } = alone(buck(10e-6), transistor)
    expect(event!.stored_c / storedCharge(event!.current_a, event!.current_a, 40e-9, event!.tau_s!)).toBeCloseTo(1, 9)
    expect(event!.stored_c, 'far less than steady state').toBeLessThan(0.5 * event!.current_a * event!.tau_s!)
  })

  it('with a negative valley: no hard recovery, with its reason', () => {
    const result = ranked(buck(1e-6, 2), transistor)
    const { point, event, losses_w, switch: part } = result.candidates[0]!
    expect(point!.valley_a).toBeLessThan(0)
    expect([losses_w.recovery_rectifier, losses_w.recovery_switch, part.turn_on_base_w]).toEqual([0, 0, 0])
    expect(event!.none).toContain('negative')
    expect(warningCodes(result, 'transistor')).toContain('negative-valley')
  })
})

describe('warnings about the point', () => {
  it('boundary conduction is told apart', () => {
    const modes = [0.05, 0.3, 1].map((load) => alone(stage({ output: { current: 2.5 * load } }), silicon()).point!.mode)
    expect(modes[2]).toBe('continuous')
    expect(modes[0]).toBe('discontinuous')
    const { point } = alone(stage({ output: { current: 2.5 } }), silicon())
    const load = point!.ripple_a / 2 / point!.mean_a
    const edge = ranked(stage({ output: { current: 2.5 * load } }), silicon())
    expect(edge.candidates[0]!.point!.mode).toBe('boundary')
    expect(warningCodes(edge)).toContain('mode-boundary')
  })

  it('a recovery time that takes a tenth of an interval is flagged with its share', () => {
    const warned = ranked(
      stage({
        frequency: 900e3,
        cooling: { kind: 'case', caseTemperature: kelvin(0) },
        inductor: { inductance: 100e-6 },
      }),
      silicon(),
    )
    const flag = warned.warnings.find(({ code }) => code === 'recovery-share-of-interval')!
    expect(flag.data.share).toBeGreaterThan(0.1)
    expect(warningCodes(ranked(stage({ frequency: 20e3 }), silicon()))).not.toContain('recovery-share-of-interval')
  })

  it('an unknown softness is null and said, never 1', () => {
    const part = silicon({
      recovery: [
        { ...silicon().recovery[0]!, peakReverseCurrent: null, recoveryTime: null } as ReturnType<
          typeof silicon
        >['recovery'][0],
      ],
    })
    const result = ranked(stage(), part)
    expect(result.candidates[0]!.event!.softness).toBeNull()
    expect(warningCodes(result, 'silicon')).toContain('softness-unknown')
  })

  it('without switch.thermal the on-resistance is taken at 100 °C, and said', () => {
    const result = ranked(stage({ switch: { thermal: null } }), silicon())
    const { point, switch: part } = result.candidates[0]!
    const { valley_a: low, peak_a: high, duty } = point!
    expect(part.conduction_w).toBeCloseTo(
      ((low * low + low * high + high * high) / 3) * duty * 0.03 * (1 + 0.006 * 75),
      9,
    )
    expect(warningCodes(result)).toContain('switch-temperature-assumed')
  })
})
