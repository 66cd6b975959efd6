import { describe, expect, it } from 'vitest'
import { exitCodeOf } from '../../src/commands/exit-code.ts'
import type { CandidateResult, RankResult } from '../../src/domain/result.ts'
import { renderCsv } from '../../src/report/render-csv.ts'
import { renderTable } from '../../src/report/render-table.ts'
import { words } from '../../src/report/words/words.ts'
import { candidateOf, reasonsOf, recordOf, warnedAbout } from '../demo/orchard.ts'
import { carbide, kelvin, silicon, stage } from '../stage/samples.ts'
import { alone } from '../study/settings.ts'
import { demoStage, hotStage, idealCooling, placed, rankShelf, sixRows, sum } from './workbench.ts'

const table = (result: RankResult): string => renderTable(words(result), { width: 160, colour: false })
const spoken = (text: string): string => text.replace(/\s+/g, ' ')

describe('wrong answer or unsafe advice without it', () => {
  it('1: trr, Qrr and I_RM are moved from the test condition to the operating point, and the factor is shown', () => {
    const watts = (charge: number): number => 400 * charge * 100e3
    const known = alone(hotStage, { ...recordOf('rowan-600v-8a'), thermal: idealCooling })
    const headline = alone(hotStage, { ...recordOf('rowan-600v-8a-headline'), thermal: idealCooling })
    // The first page: 18 ns from 1 A at 100 A/us; its triangle holds a trr²/2.
    expect(watts((100e6 * 18e-9 ** 2) / 2), 'the headline, taken as it stands').toBeCloseTo(0.65, 2)
    expect(known.event!.current_a, 'the current of the hot rows').toBeCloseTo(8, 0)
    // Within 5 %: the fit weighs the headline of the same part against the hot row.
    expect(watts(known.event!.qrr_c) / 5, 'hot typical').toBeCloseTo(1, 1)
    expect(watts(known.event_maximum!.qrr_c) / 14.4, 'hot maximum').toBeCloseTo(1, 1)
    const factor = (part: CandidateResult, figure: string) => part.provenance.find((each) => each.figure === figure)!
    const moved = factor(headline, 'event.trr_s')
    expect(moved).toMatchObject({ how: 'extrapolated', from: 'recovery row 1' })
    expect(moved.factor! * 18e-9, 'the factor leads from the printed time to ours').toBeCloseTo(
      headline.event!.trr_s,
      15,
    )
    for (const figure of ['event.qrr_c', 'event.peak_reverse_a'])
      expect(factor(headline, figure).factor, figure).toBeGreaterThan(4)
  })

  it('2: every loss stands in one row, the shares of rectifier and switch add up to the event, and its model is named', () => {
    const result = rankShelf(demoStage('pump-boost'))
    for (const part of placed(result)) {
      const { losses_w, switch: own, event } = part
      expect(sum(sixRows(part)) / losses_w.total!, part.id).toBeCloseTo(1, 12)
      const stageRows = [own.conduction_w, own.turn_on_base_w, own.turn_off_w, own.stored_w, part.inductor_w]
      const whole = sum([losses_w.total, ...stageRows, part.snubber_w, part.fixed_w])
      expect(whole / part.stage_loss_w!, part.id).toBeCloseTo(1, 12)
      if (event!.none !== null) continue
      const { blocking_v, qrr_c, current_a, ta_s } = event!
      const shares = losses_w.recovery_rectifier! + losses_w.recovery_switch!
      expect(shares / (100e3 * blocking_v * (qrr_c + current_a * ta_s)), part.id).toBeCloseTo(1, 9)
    }
    expect(result.stage.loss_model).toContain('charge control')
    expect(spoken(table(result))).toContain(result.stage.loss_model)
  })

  it('3: a measured turn-on energy is used as told to hold a recovery, to hold none, or as not known', () => {
    const dryer = (meaning: string, rectifier = ', rectifier: rowan-600v-8a') =>
      rankShelf(
        demoStage('kiln-boost', (text) =>
          text.replace(
            'includes_rectifier: yes, rectifier: rowan-600v-8a',
            `includes_rectifier: ${meaning}${rectifier}`,
          ),
        ),
      )
    const base = (result: RankResult): number => candidateOf(result, 'larch-600v-8a-soft').switch.turn_on_base_w!
    const added = (result: RankResult): number => candidateOf(result, 'larch-600v-8a-soft').losses_w.recovery_switch!
    const [without, inside, unknown, hidden] = [dryer('no'), dryer('yes'), dryer('unknown'), dryer('yes', '')]
    // 250 uJ were read at 8 A and 400 V; the overlap V I (I/a + t_fv)/2 moves them to the point.
    const { current_a: current, slope_a_per_s: slope } = candidateOf(without, 'larch-600v-8a-soft').event!
    const overlap = (amperes: number): number => 200 * amperes * (amperes / slope + 22e-9)
    expect(base(without) / (250e-6 * 100e3)).toBeCloseTo(overlap(current) / overlap(8), 6)
    expect(base(inside), "the test rectifier's share is taken off").toBeLessThan(0.8 * base(without))
    expect(added(inside)).toBeGreaterThan(1)
    expect(base(unknown), 'the higher reading counts').toBeCloseTo(base(without), 1)
    expect(warnedAbout(unknown, '')).toContain('turn-on-unknown')
    expect(placed(hidden).map(({ losses_w }) => losses_w.recovery_switch)).toEqual([0, 0, 0, 0])
    expect(warnedAbout(hidden, '')).toContain('turn-on-contains-recovery')
  })

  it('4: stored, capacitive and the switch’s own charge stay apart, and an empty junction is not scaled', () => {
    // 400 pF, 1.2 V, 0.46 at 400 V: V Qc − Ec = 4.98625 uJ by integration.
    const cases = [
      stage(),
      stage({ output: { current: 1 } }),
      hotStage,
      stage({ switch: { slope: { kind: 'given', slope: 2e9 } } }),
    ]
    for (const { losses_w } of cases.map((at) => alone(at, carbide()))) {
      expect(losses_w.capacitive).toBeCloseTo(4.98625e-6 * 100e3, 5)
      expect([losses_w.recovery_rectifier, losses_w.recovery_switch]).toEqual([0, 0])
    }
    const stores = [cases[0]!, cases[3]!].map((at) => alone(at, silicon()))
    expect(stores[1]!.event!.qrr_c).toBeGreaterThan(1.2 * stores[0]!.event!.qrr_c)
    expect(stores[0]!.losses_w.capacitive, 'contained in Qrr already').toBe(0)
    for (const { switch: own } of stores) expect(own.stored_w).toBeCloseTo(2e-6 * 100e3, 12)
  })

  it('5: junction temperature and loss are solved together, and having no stable temperature is an answer', () => {
    const cooled = stage({ cooling: { kind: 'case', caseTemperature: kelvin(70) } })
    const found = alone(cooled, silicon())
    const { conduction, recovery_rectifier, leakage, forward_recovery } = found.losses_w
    const heat = sum([conduction, recovery_rectifier, leakage, forward_recovery])
    expect(found.junction_c).toBeCloseTo(70 + 1.8 * heat, 4)
    const unheated = alone(cooled, silicon({ thermal: idealCooling }))
    expect(found.event!.qrr_c, 'the charge is that of the heated junction').toBeGreaterThan(
      1.05 * unheated.event!.qrr_c,
    )
    const pump = rankShelf(demoStage('pump-boost'))
    const lost = candidateOf(pump, 'juniper-200v-10a-fast')
    expect([lost.thermal, lost.rank, lost.junction_c, lost.stage_loss_w]).toEqual(['none', null, null, null])
    expect(sixRows(lost)).toEqual([null, null, null, null, null, null])
    expect(spoken(table(pump))).toMatch(/juniper-200v-10a-fast.{0,20}\[no-stable-temperature\]/)
  })

  it('6: leakage of a hot Schottky is counted, and its runaway edge is judged at maximum leakage', () => {
    const sun = (ambient: number) => demoStage('hot-schottky', (text) => text.replace('80 degC,', `${ambient} degC,`))
    const acacia = recordOf('acacia-100v-20a')
    const at = (ambient: number, leakage = acacia.leakage) =>
      rankShelf(sun(ambient), 0, [{ ...acacia, leakage }, recordOf('maple-100v-20a')])
    const edge = at(70).candidates.find(({ id }) => id === acacia.id)!.reasons[0]!
    expect([edge.code, edge.value]).toEqual(['runaway-at-maximum-leakage', expect.closeTo(70, 6)])
    expect(reasonsOf(at(edge.limit! + 0.1), acacia.id)).toEqual(['runaway-at-maximum-leakage'])
    expect(reasonsOf(at(edge.limit! - 0.1), acacia.id)).toEqual([])
    const warm = candidateOf(at(70), acacia.id)
    expect(warm.thermal, 'with its typical leakage it would settle').toBe('settled')
    expect(warm.losses_w.leakage!).toBeGreaterThan(10 * candidateOf(at(25), acacia.id).losses_w.leakage!)
    const tame = acacia.leakage.map((row) => (row.grade === 'maximum' ? { ...row, current: 0.08 } : row))
    expect(reasonsOf(at(70, tame), acacia.id), 'a lower guarantee moves the edge').toEqual([])
  })

  it('7: the current that the rectifier is turned off from is the valley in the inductor, not the output current', () => {
    const { point, event, switch: own } = candidateOf(rankShelf(demoStage('pump-boost')), 'alder-200v-16a')
    const { duty } = point!
    const mean = 5 / (1 - duty)
    const onResistance = 0.022 * (1 + 0.006 * (own.junction_c! - 25))
    const ripple = ((48 - mean * (onResistance + 0.025)) * duty) / (150e-6 * 100e3)
    expect(duty, '48 V to 120 V').toBeCloseTo(1 - 48 / 120, 1)
    expect(event!.current_a).toBeCloseTo(mean - ripple / 2, 4)
    expect(event!.current_a / 5).toBeGreaterThan(2)
  })

  it('8: a current that dies away is found, only what charge is left recovers, and the reason for a 0 is printed', () => {
    const loop = rankShelf(demoStage('frost-sensor-boost'))
    const [quick, slow] = ['clover-100v-6a', 'teasel-100v-3a'].map((id) => candidateOf(loop, id))
    expect([quick!.point!.mode, slow!.point!.mode, slow!.event!.current_a]).toEqual([
      'discontinuous',
      'discontinuous',
      0,
    ])
    expect([quick!.losses_w.recovery_rectifier, quick!.losses_w.recovery_switch]).toEqual([0, 0])
    expect(spoken(table(loop))).toContain(quick!.event!.none)
    expect(slow!.event!.qrr_c).toBeGreaterThan(0)
    expect(slow!.event!.qrr_c, 'some was lost while idle').toBeLessThan(slow!.event!.stored_c)
    const carrying = (amperes: number) =>
      rankShelf(demoStage('frost-sensor-boost', (text) => text.replace('0.22 A', `${amperes} A`)))
    const full = candidateOf(carrying(1), 'clover-100v-6a').point!
    expect(full.mode).toBe('continuous')
    const edge = carrying((full.ripple_a / 2) * (1 - full.duty))
    expect(candidateOf(edge, 'clover-100v-6a').point!.mode).toBe('boundary')
    expect(warnedAbout(edge, '')).toContain('mode-boundary')
  })

  it('9: typical and high stand side by side, and a record with typical data only is warned about', () => {
    const dryer = rankShelf(demoStage('kiln-boost'), 200)
    for (const { id, interval_w, losses_w, junction_c, junction_high_c } of placed(dryer)) {
      expect(interval_w!.level, 'from the 5th to the 95th percentile').toBeCloseTo(0.95 - 0.05, 12)
      expect(interval_w!.high, id).toBeGreaterThan(1.01 * losses_w.total!)
      expect(junction_high_c!, id).toBeGreaterThan(junction_c!)
    }
    expect(renderCsv(dryer)).toContain(',total (W),total low (W),total high (W),Tj (°C),Tj high (°C),')
    expect(warnedAbout(dryer, 'garnet-650v-10a-sic')).toContain('typical-only')
    expect(warnedAbout(dryer, 'larch-600v-8a-soft'), 'it holds guaranteed figures').not.toContain('typical-only')
  })

  it('10: every figure is tagged given, converted, extrapolated with how far, or class guess, and --strict refuses guesses', () => {
    const dryer = rankShelf(demoStage('kiln-boost'))
    const tags = (id: string) => candidateOf(dryer, id).provenance.map(({ figure, how }) => `${figure} ${how}`)
    const figures = ['event.qrr_c', 'event.peak_reverse_a', 'event.trr_s', 'forward_v', 'losses_w.leakage']
    for (const { provenance } of placed(dryer))
      expect(provenance.map(({ figure }) => figure)).toEqual(expect.arrayContaining(figures))
    expect(tags('garnet-650v-10a-sic')).toContain('event.qrr_c given')
    expect(tags('larch-600v-8a-soft')).toContain('event.qrr_c converted')
    expect(tags('rowan-600v-8a-headline')).toEqual(
      expect.arrayContaining(['event.qrr_c extrapolated', 'losses_w.leakage class-guess']),
    )
    const far = words(dryer).warnings.find(({ code }) => code === 'extrapolated-far')!
    const { current_a } = candidateOf(dryer, 'rowan-600v-8a-headline').event!
    expect(far.data.factor, 'from the 1 A of its only row').toBeCloseTo(current_a, 9)
    expect(far.text).toMatch(/ is read \d[\d.]* times beyond the nearest row/)
    const strict = (id: string, asked: boolean) => exitCodeOf([candidateOf(dryer, id)], [], asked)
    const ids = ['larch-600v-8a-soft', 'rowan-600v-8a-headline']
    expect(ids.map((id) => strict(id, true))).toEqual([0, 4])
    expect(ids.map((id) => strict(id, false))).toEqual([0, 0])
  })

  it('11: a part whose voltage with overshoot is above the stated rule is rejected with its number, never ranked', () => {
    const pump = rankShelf(demoStage('pump-boost'))
    const elm = candidateOf(pump, 'elm-150v-20a')
    const peak = elm.event!.peak_reverse_v
    expect(peak, 'overshoot over the 120 V it blocks').toBeGreaterThan(120)
    expect(elm.reasons).toMatchObject([{ code: 'voltage-margin', value: peak, limit: 0.8 * 150 }])
    expect(elm.voltage_margin).toBeCloseTo(1 - peak / 150, 12)
    expect([elm.accepted, elm.rank, pump.verdict.best]).toEqual([false, null, 'cedar-200v-20a'])
    expect(elm.stage_loss_w, 'although it would cost least').toBeLessThan(
      candidateOf(pump, 'cedar-200v-20a').stage_loss_w!,
    )
    const still = rankShelf(
      demoStage('pump-boost', (text) => text.replace('loop_inductance: 10 nH', 'loop_inductance: 0 nH')),
    )
    expect(candidateOf(still, 'elm-150v-20a').rank, 'without overshoot it stays at the rule').toBe(1)
  })
})
