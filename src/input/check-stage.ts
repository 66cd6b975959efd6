import type { Stage } from '../domain/stage.ts'
import { addProblem, addWarning, group, plainNumber, rows, type Section, text, texts } from './section.ts'

/** What the values of a stage say about each other. A comparison with a value that is missing (NaN) is never told. */
export function checkStage(root: Section, stage: Stage): void {
  checkVoltages(root, stage)
  checkGate(group(group(root, 'switch'), 'gate'), stage)
  checkDuty(root, stage)
  checkParallel(group(root, 'parallel'), stage)
  checkRepeated(root)
}

/** One contradiction: told at a key, with what cannot be about it. */
function contradict(section: Section, key: string, expected: string, hint = ''): void {
  const found = text(section, key) ?? String(plainNumber(section, key) ?? '')
  addProblem(section.reader, { code: 'values-contradict', path: [...section.path, key], found, expected, hint })
}

function checkVoltages(root: Section, { kind, input, output }: Stage): void {
  const [from, to] = [group(root, 'input'), group(root, 'output')]
  if (input.kind === 'mains') {
    if (input.tolerance >= 1) contradict(from, 'tolerance', 'it must be below 100 %')
    const crest = Math.SQRT2 * input.voltage * (1 + input.tolerance)
    const hint = 'raise it, or lower the mains or its tolerance'
    if (output.voltage <= crest) {
      contradict(to, 'voltage', `it must exceed the crest of the highest mains, ${Math.ceil(crest)} V`, hint)
    }
    return
  }
  if (kind === 'buck' && output.voltage >= input.voltage) {
    contradict(to, 'voltage', `a buck delivers less than its input, ${text(from, 'voltage')}`, 'a boost delivers more')
  }
  if (kind === 'boost' && output.voltage <= input.voltage) {
    contradict(to, 'voltage', `a boost delivers more than its input, ${text(from, 'voltage')}`, 'a buck delivers less')
  }
}

function checkGate(gate: Section, { switch: { slope } }: Stage): void {
  if (slope.kind !== 'gate') return
  if (slope.drive <= slope.threshold)
    contradict(gate, 'drive', `it must exceed the threshold, ${text(gate, 'threshold')}`)
  if (slope.plateau !== null && slope.plateau < slope.threshold) {
    contradict(gate, 'plateau', `it cannot lie below the threshold, ${text(gate, 'threshold')}`)
  }
  if (slope.plateau !== null && slope.drive <= slope.plateau) {
    contradict(gate, 'drive', `it must exceed the plateau, ${text(gate, 'plateau')}`)
  }
  if (slope.transconductance === 0) contradict(gate, 'transconductance', 'without it the current would not rise')
  if (slope.resistance * slope.inputCapacitance + slope.transconductance * slope.sourceInductance === 0) {
    contradict(
      gate,
      'resistance',
      'nothing would limit the slope',
      'give the gate resistance and the input capacitance',
    )
  }
}

function checkDuty(root: Section, stage: Stage): void {
  const points = stage.dutyProfile
  if (points === null) return
  const hours = points.reduce((sum, point) => sum + point.hours, 0)
  const complaint = { path: ['duty_profile'], found: `${Number(hours.toPrecision(6))} h`, hint: '' } as const
  if (hours === 0)
    addProblem(root.reader, { ...complaint, code: 'values-contradict', expected: 'its hours add up to nothing' })
  if (hours > 8784.001)
    addWarning(root.reader, { ...complaint, code: 'value-implausible', expected: 'a year has 8760 h' })
  for (const [index, row] of rows(root, 'duty_profile').entries())
    checkDutyInput(row, stage, points[index]?.input ?? null)
  if (stage.cooling.kind !== 'case') return
  for (const row of rows(root, 'duty_profile')) {
    const found = text(row, 'ambient')
    const expected = 'cooling gives the case temperature'
    if (found !== null)
      addWarning(row.reader, { code: 'value-unused', path: [...row.path, 'ambient'], found, expected, hint: '' })
  }
}

/** Why a stage cannot run from this input voltage, or null; also for the rows of a profile file. */
export function inputRefusal({ kind, output }: Stage, input: number): string | null {
  if (kind === 'buck' && output.voltage >= input) return 'a buck needs more than its output'
  if (kind === 'boost' && output.voltage <= input) return 'a boost needs less than its output'
  if (kind === 'mains-boost' && output.voltage <= Math.SQRT2 * input) return 'its crest must stay below the output'
  return null
}

function checkDutyInput(row: Section, stage: Stage, input: number | null): void {
  const refusal = input === null ? null : inputRefusal(stage, input)
  if (refusal !== null) contradict(row, 'input', `${refusal}, ${stage.output.voltage} V`)
}

/** One part carries (1 + imbalance)/parts of the current; it cannot carry all of it or more while others share. */
function checkParallel(parallel: Section, { parallel: { parts, imbalance } }: Stage): void {
  if (Number.isInteger(parts) && parts > 1 && (1 + imbalance) / parts >= 1) {
    contradict(
      parallel,
      'imbalance',
      `one of ${parts} parts would carry all of the current`,
      `stay below ${(parts - 1) * 100} %`,
    )
  }
}

function checkRepeated(root: Section): void {
  const seen = new Set<string>()
  for (const { text: id, path } of texts(root, 'candidates')) {
    const complaint = {
      code: 'value-unused',
      path,
      found: id,
      expected: 'it stands in this list already',
      hint: '',
    } as const
    if (seen.has(id)) addWarning(root.reader, complaint)
    seen.add(id)
  }
}
