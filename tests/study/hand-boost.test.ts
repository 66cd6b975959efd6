import { describe, expect, it } from 'vitest'
import { calibrate } from '../../src/evidence/calibrate.ts'
import { place } from '../evidence/records.ts'
import { bisect, capacitive, hardEvent, leakage, lifetimes, type Part, storedCharge } from '../stage/by-hand.ts'
import { kelvin, silicon, stage } from '../stage/samples.ts'
import { alone } from './settings.ts'

/** 250 V to 400 V, 1 kW, 100 kHz on a fixed case of 70 °C, one part; the switch's junction is not solved: 100 °C. */
const at = stage({
  cooling: { kind: 'case', caseTemperature: kelvin(70) },
  switch: { thermal: null },
  snubberCapacitance: 100e-12,
})
const record = silicon({
  forward: [],
  forwardLine: {
    place: place('forward line'),
    threshold: 0.95,
    resistance: 0.035,
    thresholdPerKelvin: -1.8e-3,
    resistancePerKelvin: 2e-5,
    junction: kelvin(125),
    grade: 'typical',
    spread: null,
    source: null,
  },
  forwardRecovery: { peak: 4, time: 60e-9, slope: 200e6 },
})
const { rectifier } = calibrate({ record, blockingVoltage: 400 })
const part: Part = {
  coefficients: Float64Array.of(
    ...rectifier.recovery!.posterior.mean,
    ...rectifier.forward.posterior.mean,
    ...rectifier.leakage!.posterior.mean,
  ),
  rated: 8,
  ratedVoltage: 600,
  line: true,
  stores: true,
  leaks: true,
}

const capacitance = capacitive(150e-12, 0.8, 0.45, 400)
/** The line through 0.9 and 0.25 I_RM meets zero this many tail times after the peak. */
const k = Math.log(1 / 0.25) + (Math.log(0.9 / 0.25) * 0.25) / (0.9 - 0.25)

/** The stage of PHYSICS 4 worked through at a junction temperature. */
function byHand(junction: number) {
  const [vin, vo, io, f, l, rl] = [250, 400, 2.5, 100e3, 500e-6, 0.05]
  const ron = 0.03 * (1 + 0.006 * 75)
  // The given line is the characteristic itself.
  const vf = (i: number): number =>
    0.95 - 1.8e-3 * (junction - kelvin(125)) + (0.035 + 2e-5 * (junction - kelvin(125))) * i
  const dutyAt = (i: number): number => (vo + vf(i) + i * rl - vin) / (vo + vf(i) - i * ron)
  const mean = bisect((i) => io - i * (1 - dutyAt(i)), 2, 8)
  const duty = dutyAt(mean)
  const ripple = ((vin - mean * (ron + rl)) * duty) / (l * f)
  const [valley, peak] = [mean - ripple / 2, mean + ripple / 2]
  const { tau, tail } = lifetimes(part, valley, 200e6, junction)
  const charge = storedCharge(peak, valley, (1 - duty) / f, tau)
  const event = hardEvent({ current: valley, slope: 200e6, tau, tail, charge }, vo, 15e-9)
  const square = (valley * valley + valley * peak + peak * peak) / 3
  const [threshold, resistance] = [vf(0), vf(1) - vf(0)]
  const conduction = (1 - duty) * (threshold * mean + resistance * square)
  const leaking = vo * leakage(part, vo, junction) * duty
  const overshoot = 4 * Math.sqrt(peak / 10e-9 / 200e6) - vf(peak)
  const forwardRecovery = ((overshoot * peak * 60e-9) / 2) * f
  const heat = conduction + event.rectifier * f + leaking + forwardRecovery
  return {
    mean,
    duty,
    ripple,
    valley,
    peak,
    tau,
    tail,
    charge,
    event,
    conduction,
    leaking,
    forwardRecovery,
    heat,
    square,
    ron,
    capacitive: capacitance.cost * Math.max(0, 1 - event.charge / capacitance.charge) * f,
    base: ((vo * valley) / 2) * (valley / 200e6 + 15e-9),
  }
}

describe('one boost candidate, worked by hand', () => {
  const found = alone(at, record)
  const junction = bisect((t) => kelvin(70) + 1.8 * byHand(t).heat - t, kelvin(70), kelvin(170))
  const hand = byHand(junction)
  const f = 100e3
  const total =
    hand.conduction +
    (hand.event.rectifier + hand.event.switchAdded) * f +
    hand.capacitive +
    hand.leaking +
    hand.forwardRecovery
  const switchLoss = hand.square * hand.duty * hand.ron + hand.base * f + 0.5 * 400 * hand.peak * 22e-9 * f + 2e-6 * f
  const snubber = 100e-12 * 400 * 400 * f
  const stageLoss = total + switchLoss + hand.square * 0.05 + 2 + snubber + 3

  it.each([
    ['junction', found.junction_c! + 273.15, junction],
    ['duty', found.point!.duty, hand.duty],
    ['mean inductor current', found.point!.mean_a, hand.mean],
    ['ripple', found.point!.ripple_a, hand.ripple],
    ['valley', found.point!.valley_a, hand.valley],
    ['peak', found.point!.peak_a, hand.peak],
    ['current of the event: the valley', found.event!.current_a, hand.valley],
    ['lifetime', found.event!.tau_s!, hand.tau],
    ['tail time', found.event!.tau_rr_s!, hand.tail],
    ['stored charge', found.event!.stored_c, hand.charge],
    ['I_RM', found.event!.peak_reverse_a, hand.event.peak],
    ['ta', found.event!.ta_s, hand.event.toPeak],
    ['trr', found.event!.trr_s, hand.event.toPeak + k * hand.tail],
    ['Qrr', found.event!.qrr_c, hand.event.charge],
    ['softness', found.event!.softness!, (k * hand.tail) / hand.event.toPeak],
    ['E rectifier', found.event!.rectifier_j, hand.event.rectifier],
    ['E switch added', found.event!.switch_added_j, hand.event.switchAdded],
    ['E base', found.event!.base_j, hand.base],
    ['conduction', found.losses_w.conduction!, hand.conduction],
    ['recovery in the rectifier', found.losses_w.recovery_rectifier!, hand.event.rectifier * f],
    ['recovery in the switch', found.losses_w.recovery_switch!, hand.event.switchAdded * f],
    ['capacitive', found.losses_w.capacitive!, hand.capacitive],
    ['leakage', found.losses_w.leakage!, hand.leaking],
    ['forward recovery', found.losses_w.forward_recovery!, hand.forwardRecovery],
    ['total', found.losses_w.total!, total],
    ['switch conduction', found.switch.conduction_w!, hand.square * hand.duty * hand.ron],
    ['turn-on base', found.switch.turn_on_base_w!, hand.base * f],
    ['turn-off', found.switch.turn_off_w!, 0.5 * 400 * hand.peak * 22e-9 * f],
    ['stored', found.switch.stored_w!, 2e-6 * f],
    ['inductor', found.inductor_w!, hand.square * 0.05 + 2],
    ['snubber', found.snubber_w, snubber],
    ['stage loss', found.stage_loss_w!, stageLoss],
    ['efficiency', found.efficiency!, 1000 / (1000 + stageLoss)],
    ['mode', Number(found.point!.mode === 'continuous'), 1],
  ])('%s', (_, ours, theirs) => {
    // The junction settles to 1e-6 K; through lifetimes and leakage that is 1e-7 of a row.
    expect(Math.abs(ours - theirs)).toBeLessThanOrEqual(1e-6 * Math.abs(theirs))
  })

  it('ambient margin: the highest case temperature at which the lowest root is within the limit, by a dense scan', () => {
    let highest = Number.NEGATIVE_INFINITY
    for (let step = 0; step <= 300; step++) {
      const t = kelvin(150 - step / 2)
      highest = Math.max(highest, t - 1.8 * byHand(t).heat)
    }
    expect(found.ambient_margin_k).toBeCloseTo(highest - kelvin(70), 3)
  })
})
