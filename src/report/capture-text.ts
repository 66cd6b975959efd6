import type { CaptureDocument, CaptureTrace } from '../domain/capture.ts'
import { capturePlot } from './capture-plot.ts'
import { absent, celsius, quantity, significant } from './format.ts'
import { textWidth, wrapText } from './text-width.ts'
import { visible } from './visible.ts'

/** A reduced capture for the terminal: plot, figures with their doubt, charge by its end, warnings, cautions. */
export function captureText(document: CaptureDocument, trace: CaptureTrace, width: number): string {
  const lines = [
    ...wrapText(headOf(document), width),
    '',
    ...capturePlot(trace, width),
    '',
    ...figureLines(document, width),
    ...chargeLines(document),
    ...upperBoundLines(document, width),
    ...section('Warnings', document.warnings, width),
    ...section('Cautions', document.cautions, width),
  ]
  return `${lines.map((line) => line.trimEnd()).join('\n')}\n`
}

/** What was understood of the file, told before any of it is used. */
export function understoodText(understood: CaptureDocument['understood']): string {
  const { columns, delimiter, decimal, samples, interval_s, segments, segment, header_rows } = understood as {
    readonly columns: readonly {
      readonly role: string
      readonly column: number
      readonly header: string
      readonly unit: string
    }[]
    readonly [key: string]: unknown
  }
  const channels = columns.map(
    ({ role, column, header, unit }) => `${role} = column ${column}${header === '' ? '' : ` "${header}"`} in ${unit}`,
  )
  const notes = [
    understood.pairs_averaged === true ? 'lowest and highest of each interval averaged' : '',
    understood.time_evened === true ? 'times rounded in the file, evened' : '',
    understood.bandwidth_hz === null
      ? "bandwidth unknown: half of the rounding at the peak is taken as the instrument's"
      : `bandwidth ${quantity(understood.bandwidth_hz as number, 'Hz')} taken out`,
    understood.reference === null ? '' : `reference ${understood.reference}`,
  ].filter((note) => note !== '')
  return visible(
    [
      `understood ${understood.file}: delimiter ${delimiter === 'tab' ? 'tab' : `"${delimiter}"`}, decimal ${decimal}, ${header_rows} header rows`,
      ...channels,
      `${segments === 1 ? '1 segment' : `segment ${segment} of ${segments}`}, ${samples} samples every ${quantity(interval_s as number, 's')}`,
      ...notes,
    ].join('; '),
  )
}

function headOf({ fixture, device, recovery }: CaptureDocument): string {
  const what = fixture === 'ramp' ? 'Ramp capture' : 'Step capture'
  const part = device.id === null ? '' : ` of ${visible(device.id)}`
  const none = recovery === 'measured' ? '' : ': no recovery can be told from the response of the fixture'
  return `${what}${part} at ${celsius(device.junction_c)} junction${none}`
}

const rowsOf = {
  ramp: [
    ['current_a', 'forward current', 'A'],
    ['slope_a_per_s', 'slope', 'A/us'],
    ['peak_reverse_a', 'peak reverse current', 'A'],
    ['ta_s', 'zero crossing to peak (ta)', 's'],
    ['tb_s', 'peak to end (tb)', 's'],
    ['trr_s', 'recovery time (trr)', 's'],
    ['qrr_c', 'recovered charge (Qrr)', 'C'],
    ['softness', 'softness, tb/ta', ''],
    ['softness_slopes', 'softness, by slopes', ''],
    ['voltage_v', 'reverse voltage', 'V'],
    ['energy_j', 'energy from the peak on', 'J'],
  ],
  step: [
    ['current_a', 'forward current', 'A'],
    ['reverse_a', 'reverse current', 'A'],
    ['storage_s', 'storage time', 's'],
    ['trr_s', 'recovery time (trr)', 's'],
    ['until_a', 'to a reverse current of', 'A'],
    ['tau_s', 'lifetime, charge model', 's'],
    ['tau_rr_s', 'tail time', 's'],
    ['tau_diffusion_s', 'lifetime, diffusion form', 's'],
  ],
} as const

function figureLines({ fixture, row, spread }: CaptureDocument, width: number): readonly string[] {
  const rows = rowsOf[fixture].flatMap(([key, name, unit]) => {
    const value = row[key]
    if (typeof value !== 'number') return []
    const by = key === 'trr_s' && fixture === 'ramp' ? ` by ${row.trr_by}` : ''
    const doubt = spread[key]
    return [[`${name}${by}`, quantity(value, unit), doubt === undefined ? '' : `±${percent(doubt)}`] as const]
  })
  const widest = Math.max(...rows.map(([name]) => textWidth(name)))
  const note =
    spread.row === undefined
      ? []
      : [
          `± is one standard deviation. Spread of the row: ${percent(spread.row)}, gain of probe and oscilloscope included.`,
        ]
  return [
    ...rows.map(([name, value, doubt]) => `${name.padEnd(widest)}  ${value.padStart(10)}  ${doubt}`),
    ...note.flatMap((text) => wrapText(text, width)),
  ]
}

function percent(share: number): string {
  return `${significant(100 * share, 2)} %`
}

function chargeLines({ charge_by_end }: CaptureDocument): readonly string[] {
  if (charge_by_end.length === 0) return []
  const ends = charge_by_end.map(({ end, qrr_c }) => `${quantity(qrr_c, 'C')} to ${end}`)
  return ['', `Qrr by its end: ${ends.join(', ')}`]
}

function upperBoundLines({ upper_bound }: CaptureDocument, width: number): readonly string[] {
  if (upper_bound === null) return []
  const { qrr_c, time_s } = upper_bound
  const text =
    `None measurable: at most ${quantity(qrr_c, 'C') || absent} of charge flowed back, within ${quantity(time_s, 's')}. ` +
    'That is what the fixture and the capacitance of the part do by themselves; no stored charge is claimed.'
  return ['', ...wrapText(text, width)]
}

function section(
  heading: string,
  items: readonly { readonly code: string; readonly text: string }[],
  width: number,
): readonly string[] {
  if (items.length === 0) return []
  return ['', heading, ...items.flatMap(({ code, text }) => indented(`- ${code}: ${text}`, width))]
}

function indented(text: string, width: number): readonly string[] {
  return wrapText(text, width - 2).map((line, k) => (k === 0 ? line : `  ${line}`))
}
