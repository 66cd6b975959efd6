import { describe, expect, it } from 'vitest'
import { readStage, type StageDocument } from '../../src/input/read-stage.ts'
import { fullStage, smallStage } from './samples.ts'
import { told } from './told.ts'

function read(text: string): StageDocument {
  const { value, problems } = readStage(text, 'stage.yaml')
  expect(problems).toEqual([])
  expect(value).not.toBeNull()
  return value!
}

describe('a stage file with every key', () => {
  it('is read in SI, with temperatures in kelvin and nothing assumed', () => {
    const { stage, records, dutyProfileFile, named } = read(fullStage)
    expect(stage).toEqual({
      kind: 'boost',
      title: 'Orchard pump drive, input stage',
      input: { kind: 'dc', voltage: 48 },
      output: { voltage: 120, current: 5, capacitance: 470e-6, bleeder: 10e3 },
      frequency: 100e3,
      inductor: { inductance: 150e-6, resistance: 25e-3, coreLoss: 1.2 },
      switch: {
        onResistance: 22e-3,
        onResistancePerKelvin: 0.006,
        slope: { kind: 'given', slope: 350e6 },
        voltageFall: 18e-9,
        turnOff: { kind: 'times', voltageRise: 15e-9, currentFall: 12e-9 },
        storedEnergy: 4e-6,
        turnOn: { energy: 60e-6, current: 10, voltage: 120, includesRectifier: 'no', rectifier: 'first' },
        thermal: { junctionToSink: 0.9, junctionLimit: 423.15 },
      },
      loopInductance: 12e-9,
      snubberCapacitance: 100e-12,
      cooling: { kind: 'sink', ambientTemperature: 318.15, sinkToAmbient: 4, shared: true },
      limits: { junction: 398.15, voltageUse: 0.8 },
      spread: { slope: 0.25, voltageFall: 0.25, thermal: 0.1 },
      fixedLosses: 3,
      dutyProfile: [
        { load: 1, hours: 1200, ambient: null, input: null },
        { load: 0.3, hours: 5000, ambient: 293.15, input: 44 },
      ],
      candidates: ['first', 'second'],
      incumbent: 'first',
      parallel: { parts: 2, imbalance: 0.1 },
      assumed: [],
    })
    expect(records).toEqual(['../rectifiers'])
    expect(dutyProfileFile).toBeNull()
    expect(named).toEqual([
      { id: 'first', path: 'candidates[1]', place: { line: 26, column: 14 } },
      { id: 'second', path: 'candidates[2]', place: { line: 26, column: 21 } },
      { id: 'first', path: 'incumbent', place: { line: 27, column: 12 } },
      { id: 'first', path: 'switch.turn_on.rectifier', place: { line: 14, column: 94 } },
    ])
  })

  it('reads the same with carriage returns and with a byte order mark', () => {
    expect(read(`\ufeff${fullStage.replaceAll('\n', '\r\n')}`)).toEqual(read(fullStage))
  })

  it('takes the other form of each alternative', () => {
    const text = fullStage
      .replace('current: 5 A', 'power: 600 W')
      .replace('{voltage_rise: 15 ns, current_fall: 12 ns}', '{energy: 20 uJ}')
      .replace(
        'slope: 350 A/us',
        'gate: {drive: 12 V, resistance: 4.7 ohm, input_capacitance: 1.8 nF, transconductance: 20 A/V, threshold: 3.5 V}',
      )
      .replace(/cooling: .*/, 'cooling: {ambient: 45 degC}')
      .replace(/duty_profile:\n.*\n.*/, 'duty_profile: {file: year.csv}')
    const { stage, dutyProfileFile } = read(text)
    expect(stage.output.current).toBe(5)
    expect(stage.switch.turnOff).toEqual({ kind: 'energy', energy: 20e-6 })
    expect(stage.switch.slope).toEqual({
      kind: 'gate',
      drive: 12,
      resistance: 4.7,
      inputCapacitance: 1.8e-9,
      transconductance: 20,
      threshold: 3.5,
      plateau: null,
      sourceInductance: 0,
    })
    expect(stage.cooling).toEqual({ kind: 'ambient', ambientTemperature: 318.15 })
    expect(stage.dutyProfile).toBeNull()
    expect(dutyProfileFile).toBe('year.csv')
    expect(stage.assumed).toEqual([{ path: 'switch.gate.source_inductance', value: '0 nH' }])
  })
})

describe('what a stage file leaves out', () => {
  it('takes the printed defaults, and the wide band of a first estimate', () => {
    const { stage } = read(smallStage)
    expect(stage.assumed).toEqual([
      { path: 'inductor.resistance', value: '0 ohm' },
      { path: 'switch.on_resistance', value: '50 mohm' },
      { path: 'switch.on_resistance_per_kelvin', value: '0.6 %/K' },
      { path: 'switch.slope', value: '300 A/us' },
      { path: 'switch.voltage_fall', value: '20 ns' },
      { path: 'limits.voltage_use', value: '80 %' },
      { path: 'spread.slope', value: '50 %' },
      { path: 'spread.voltage_fall', value: '50 %' },
      { path: 'spread.thermal', value: '10 %' },
    ])
    expect(stage.switch).toMatchObject({ onResistance: 0.05, voltageFall: 20e-9, slope: { kind: 'given', slope: 3e8 } })
    expect(stage).toMatchObject({
      spread: { slope: 0.5, voltageFall: 0.5, thermal: 0.1 },
      limits: { junction: null, voltageUse: 0.8 },
      switch: { turnOff: null, turnOn: null, thermal: null, storedEnergy: 0 },
      loopInductance: null,
      snubberCapacitance: 0,
      fixedLosses: 0,
      dutyProfile: null,
      candidates: null,
      incumbent: null,
      parallel: { parts: 1, imbalance: 0 },
      cooling: { kind: 'case', caseTemperature: 353.15 },
    })
  })

  it.each(['slope: 300 A/us', 'voltage_fall: 20 ns', 'on_resistance: 50 mohm'])(
    'narrows the band once "%s" is known',
    (known) => {
      expect(read(`${smallStage}switch: {${known}}\n`).stage.spread).toEqual({
        slope: 0.25,
        voltageFall: 0.25,
        thermal: 0.1,
      })
    },
  )

  it('takes line and tolerance of the mains, and a shared sink where the switch is known to sit on one', () => {
    const mains = smallStage
      .replace('stage: buck', 'stage: mains-boost')
      .replace('{voltage: 48 V}', '{mains: 230 V}')
      .replace('12 V', '400 V')
      .replace('{case: 80 degC}', '{ambient: 40 degC, sink_to_ambient: 2 K/W}')
    const { stage } = read(`${mains}switch: {thermal: {junction_to_sink: 1 K/W}}\n`)
    expect(stage.input).toEqual({ kind: 'mains', voltage: 230, lineFrequency: 50, tolerance: 0.1 })
    expect(stage.cooling).toMatchObject({ kind: 'sink', shared: true })
    expect(stage.assumed).toEqual(
      expect.arrayContaining([
        { path: 'input.line', value: '50 Hz' },
        { path: 'input.tolerance', value: '10 %' },
        { path: 'cooling.shared', value: 'true' },
      ]),
    )
    expect(read(mains).stage.cooling).toMatchObject({ kind: 'sink', shared: false })
  })

  it('takes a turn-on energy as one that may contain a rectifier, and parts as sharing unevenly', () => {
    const more = 'switch: {turn_on: {energy: 60 uJ, current: 10 A, voltage: 48 V}}\nparallel: {parts: 2}\n'
    const { stage } = read(smallStage + more)
    expect(stage.switch.turnOn).toMatchObject({ includesRectifier: 'unknown', rectifier: null })
    expect(stage.parallel).toEqual({ parts: 2, imbalance: 0.1 })
    expect(stage.assumed).toContainEqual({ path: 'parallel.imbalance', value: '10 %' })
    expect(stage.assumed).toContainEqual({ path: 'switch.turn_on.includes_rectifier', value: 'unknown' })
  })
})

describe('zero', () => {
  const allowed = [
    'inductor: {inductance: 22 uH, resistance: 0 ohm, core_loss: 0 W}',
    'switch: {on_resistance: 0 ohm, on_resistance_per_kelvin: 0 %/K, voltage_fall: 0 ns, stored_energy: 0 J, turn_off: {energy: 0 J}}',
    'loop_inductance: 0 nH',
    'snubber: {capacitance: 0 F}',
    'limits: {voltage_use: 0 %}',
    'spread: {slope: 0 %, voltage_fall: 0 %, thermal: 0 %}',
    'fixed_losses: 0 W',
    'parallel: {parts: 2, imbalance: 0 %}',
    'duty_profile: [{load: 0 %, hours: 10 h}]',
    'cooling: {ambient: 0 degC}',
  ]
  it.each(allowed)('is allowed in "%s"', (line) => {
    const key = line.split(':')[0]
    const text = smallStage.replace(new RegExp(`^${key}:.*\n`, 'm'), '')
    expect(told(readStage, `${text}${line}\n`)).toBe('\n\n')
  })

  const refused = [
    'input: {voltage: 0 V}',
    'output: {voltage: 0 V, current: 1 A}',
    'output: {voltage: 12 V, current: 0 A}',
    'output: {voltage: 12 V, power: 0 W}',
    'frequency: 0 Hz',
    'inductor: {inductance: 0 H}',
    'switch: {slope: 0 A/us}',
    'switch: {thermal: {junction_to_sink: 0 K/W}}',
    'cooling: {ambient: 20 degC, sink_to_ambient: 0 K/W}',
  ]
  it.each(refused)('is refused in "%s"', (line) => {
    const key = line.split(':')[0]
    const text = smallStage.replace(new RegExp(`^${key}:.*\n`, 'm'), '')
    const codes = readStage(`${text}${line}\n`, 'stage.yaml').problems.map(({ code }) => code)
    expect(codes).toEqual(['number-zero'])
  })
})

it('warns of a 10 H inductor and of a candidate named twice, and still reads the stage', () => {
  const text = `${smallStage.replace('22 uH', '10 H')}candidates: [first, second, first]\n`
  expect(read(text).stage.candidates).toEqual(['first', 'second'])
  expect(told(readStage, text)).toBe(`
warning: file.yaml:5:24  value-implausible  inductor.inductance: "10 H" is unusual; values from 10 nH to 1 H are usual (check the unit)
    inductor: {inductance: 10 H}
                           ^^^^
warning: file.yaml:7:29  value-unused  candidates[3]: "first" is not used: it stands in this list already
    candidates: [first, second, first]
                                ^^^^^
`)
})

it('never reads a text as something else, whatever it looks like', () => {
  const { stage } = read(`${smallStage}title: 012\ncandidates: [12, 1e3, yes, 0x10]\nincumbent: 1_000\n`)
  expect(stage).toMatchObject({ title: '012', candidates: ['12', '1e3', 'yes', '0x10'], incumbent: '1_000' })
})
