import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { reduceCapture } from '../../src/capture/reduce-capture.ts'
import { runReduce } from '../../src/commands/reduce.ts'
import type { CaptureDocument, CaptureSettings } from '../../src/domain/capture.ts'
import { readCapture } from '../../src/input/capture-settings.ts'
import { captureTable } from '../../src/input/capture-table.ts'
import { readStage } from '../../src/input/read-stage.ts'
import { parseQuantity } from '../../src/input/units/parse-quantity.ts'
import { rampDefectList, stepDefectList } from '../capture/defects.ts'
import { settingsFor } from '../capture/synthetic.ts'
import { recordingSession } from '../commands/session-double.ts'
import { typedStage } from './workbench.ts'

async function reduced(name: string) {
  const session = recordingSession()
  await runReduce(`catalogs-demo/captures/${name}.yaml`, { json: true }, session)
  return { document: JSON.parse(session.printed.join('')) as CaptureDocument, told: session.told.join('') }
}

/** A table of two columns, ns and A, read as the settings say. */
function table(text: string, change: Partial<CaptureSettings> = {}) {
  const time = { column: 1, factor: 1e-9, unit: 'ns', shunt: null }
  const read = captureTable(settingsFor('ramp', { time, voltage: null, ...change }), 'scope.csv')
  read.push(text)
  return read.end()
}

const wanted = Array.from({ length: 24 }, (_, k) => k / 8)
const lines = (row: (k: number) => string): string => `${wanted.map((_, k) => row(k)).join('\n')}\n`

describe('captures and numbers', () => {
  it('18: a capture is reduced by rules that are stated: zero from the ramp’s line, trr by its definition, Qrr to a printed end', async () => {
    const { document } = await reduced('clean')
    const { row, charge_by_end, understood } = document
    const { slope_a_per_s: slope, ta_s, tb_s, trr_s, qrr_c, peak_reverse_a: peak } = row as Record<string, number>
    expect([row.trr_by, understood.charge_until]).toEqual(['line-90-25', 0.02])
    // Exponential tail behind a straight ramp: tb = 1.87896 tau_rr, and to 2 % of the peak 0.98 of the tail's charge.
    const tail = tb_s! / 1.87896
    expect(trr_s).toBeCloseTo(ta_s! + tb_s!, 15)
    expect(peak! / (slope! * ta_s!)).toBeCloseTo(1, 1)
    expect(qrr_c! / (peak! * (ta_s! / 2 + 0.98 * tail))).toBeCloseTo(1, 1)
    const ends = charge_by_end.map((each) => each.qrr_c)
    expect(ends.length, 'the stated end and two others').toBe(3)
    expect(ends.every((charge) => charge > 0.9 * qrr_c! && charge < 1.1 * qrr_c!)).toBe(true)
    const { row: pulse } = (await reduced('step')).document
    // The lumped model's storage time: tau ln((I_F + I_R)/(I_R (1 + TM/tau))), with 1/TM = 1/tau_rr − 1/tau.
    const { current_a, reverse_a, storage_s, tau_s, tau_rr_s } = pulse as Record<string, number>
    const transit = 1 / (1 / tau_rr_s! - 1 / tau_s!)
    const storage = tau_s! * Math.log((current_a! + reverse_a!) / (reverse_a! * (1 + transit / tau_s!)))
    expect(storage_s! / storage).toBeCloseTo(1, 1)
  })

  it.each([...rampDefectList, ...stepDefectList].map((defect) => [defect.name, defect] as const))(
    '19: a bad capture is warned about, defect by defect: %s',
    (_name, { make, code }) => {
      const found = reduceCapture({ ...make(7), reference: null, uniform: () => 0.5, refits: 0 })!
      expect(found.caveats.map((caveat) => caveat.code)).toEqual([code])
    },
  )

  it('20: an oscilloscope’s file is read as it comes, and what was understood is printed', async () => {
    const shapes: readonly (readonly [string, string, Partial<CaptureSettings>])[] = [
      ['a header block and a row of units', `Scope 3\nrecord,7\n\nt,i\nns,A\n${lines((k) => `${k},${k / 8}`)}`, {}],
      ['semicolons and decimal commas', lines((k) => `${k},0;${String(k / 8).replace('.', ',')}`), {}],
      ['tabs', lines((k) => `${k}\t${k / 8}`), {}],
      ['pairs of lowest and highest', lines((k) => `${k},${k / 8 - 0.5}\n${k},${k / 8 + 0.5}`), {}],
      [
        'no column of time',
        lines((k) => `${k / 8}`),
        { time: null, interval: 1e-9, current: { column: 1, factor: 1, unit: 'A', shunt: null } },
      ],
      [
        'two sweeps, one over the other',
        `${lines((k) => `${k},${k / 8 - 1}`)}${lines((k) => `${k},${k / 8 + 1}`)}`,
        { segment: 'average' },
      ],
    ]
    for (const [name, text, change] of shapes) {
      const { waveform } = table(text, change).value!
      expect([...waveform.current], name).toEqual(wanted)
      expect(waveform.interval, name).toBeCloseTo(1e-9, 15)
    }
    const { document, told } = await reduced('noisy')
    expect(told).toMatch(
      /^understood noisy\.csv: delimiter ";", decimal comma, 2 header rows; time = column 1 "Zeit" in us/,
    )
    expect(document.understood).toMatchObject({ delimiter: ';', decimal: 'comma', header_rows: 2 })
    expect((await reduced('stacked')).document.understood).toMatchObject({ segments: 3, segment: 'average' })
    const settings = readCapture(readFileSync('catalogs-demo/captures/clean.yaml', 'utf8'), 'clean.yaml').value!
    expect(settings.current.factor, 'a shunt of 50 mohm read in mV').toBeCloseTo(1e-3 / 50e-3, 15)
  })

  it('21: no number is misread in silence: a decimal comma is refused with its remedy, U+2212 is a minus', () => {
    const stage = (ambient: string) => `stage: boost
input: {voltage: 48 V}
output: {voltage: 120 V, current: 5 A}
frequency: 100 kHz
inductor: {inductance: 150 uH}
cooling: {ambient: ${ambient}, sink_to_ambient: 2 K/W}
`
    const [refused] = readStage(stage('"4,5 degC"'), 'pump.yaml').problems
    expect(refused).toMatchObject({
      code: 'number-decimal-comma',
      line: 6,
      hint: expect.stringContaining('after a point'),
    })
    expect(typedStage(stage('"\u22125 degC"')).cooling).toMatchObject({ ambientTemperature: 268.15 })
    for (const text of ['1 000 V', '1,000 V', '1.5.2 V', '0x10 V', 'about 5 V'])
      expect(parseQuantity(text, { kind: 'voltage', sign: 'any' }), text).toMatchObject({ refused: true })
    const both = table(lines((k) => `${k},0,${Math.floor(k / 8)},${125 * (k % 8)}`))
    expect(both.value, 'whole numbers or decimal commas: both would do').toBeNull()
    expect(both.problems[0]!.hint).toContain('decimal: comma')
    expect([...table(lines((k) => `${k},\u2212${k / 8}`)).value!.waveform.current]).toEqual(
      wanted.map((value) => -value),
    )
  })
})
