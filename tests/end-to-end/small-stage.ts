import { writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { scratchFolder } from '../commands/scratch.ts'

const records = `- id: plain
  class: ultrafast
  title: "=cmd|' /C calc'!A0"
  ratings: {reverse_voltage: 200 V, average_current: 16 A, junction: 175 degC}
  thermal: {junction_to_case: 1.4 K/W}
  forward: [{current: 16 A, drop: 0.9 V, junction: 125 degC}]
  recovery: [{fixture: ramp, current: 16 A, slope: 200 A/us, junction: 125 degC, trr: 52 ns, qrr: 190 nC}]
  leakage: [{voltage: 200 V, junction: 125 degC, current: 60 uA}]
- id: guessed
  class: soft-ultrafast
  ratings: {reverse_voltage: 200 V, average_current: 16 A, junction: 175 degC}
  thermal: {junction_to_case: 1.4 K/W}
- id: small
  class: ultrafast
  ratings: {reverse_voltage: 100 V, average_current: 16 A, junction: 175 degC}
  thermal: {junction_to_case: 1.4 K/W}
  recovery: [{fixture: ramp, current: 16 A, slope: 200 A/us, junction: 125 degC, trr: 30 ns, qrr: 60 nC}]
`

const stage = `stage: boost
title: Small
input: {voltage: 48 V}
output: {voltage: 120 V, current: 5 A}
frequency: 100 kHz
inductor: {inductance: 150 uH}
cooling: {case: 70 degC}
records: [parts]
incumbent: plain
`

/** The small stage with some text put before its records. */
export function smallStageWith(lines: string): string {
  const folder = smallStage()
  writeFileSync(join(folder, 'stage.yaml'), stage.replace('records:', `${lines}\nrecords:`))
  return folder
}

/** A folder with stage.yaml and three records: one good, one that is all class guess, one whose rating is too small. */
export function smallStage(): string {
  const folder = scratchFolder()
  writeFileSync(join(folder, 'parts'), records)
  writeFileSync(join(folder, 'stage.yaml'), stage)
  return folder
}
