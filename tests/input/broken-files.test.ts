import { describe, expect, it } from 'vitest'
import { readRecords } from '../../src/input/read-records.ts'
import { readStage } from '../../src/input/read-stage.ts'
import { fullStage, smallStage } from './samples.ts'
import { told } from './told.ts'

/** The small stage with one line replaced. */
function smallWith(line: string): string {
  const key = line.split(':')[0]
  return smallStage.replace(new RegExp(`^${key}:.*$`, 'm'), line)
}
const record = (more: string) => `id: first
class: ultrafast
ratings: {reverse_voltage: 200 V, average_current: 8 A, junction: 175 degC}
${more}
`

describe('a broken stage file is told in full', () => {
  it('with everything that is wrong in it at once', () => {
    const text = `stage: boost
titel: x
input: {voltage: 48, mains: 3 V}
output: {voltage: 12 V, current: 5 A, power: 3 W}
frequency: 100 khz
inductor: {inductance: 10 H, resistance: 0,5 ohm}
switch: {slope: 0 A/us, gate: {drive: 3 V}, voltage_fall: 18 V, turn_off: {voltage_rise: 1 ns}}
cooling: {ambient: -300 degC, case: 3 degC, shared: yes}
candidates: a
parallel: {parts: 2.5, imbalance: 300 %}
duty_profile: [{load: 1}]
`
    expect(told(readStage, text)).toMatchInlineSnapshot(`
      "
      file.yaml:2:1  key-unknown  "titel" is no key here (did you mean "title"?)
          titel: x
          ^^^^^
      file.yaml:3:18  unit-missing  input.voltage: "48" has no unit; wanted is a voltage such as "48 V"
          input: {voltage: 48, mains: 3 V}
                           ^^
      file.yaml:3:22  key-not-here  input.mains: cannot stand here: only a mains-boost stage takes it
          input: {voltage: 48, mains: 3 V}
                               ^^^^^
      file.yaml:4:39  key-not-here  output.power: cannot stand here: "current" stands beside it; keep one of them
          output: {voltage: 12 V, current: 5 A, power: 3 W}
                                                ^^^^^
      file.yaml:5:12  unit-unknown  frequency: "100 khz": "khz" is no unit here (did you mean "kHz"?)
          frequency: 100 khz
                     ^^^^^^^
      file.yaml:6:42  number-decimal-comma  inductor.resistance: "0,5 ohm" has a comma in its number, which is never guessed at (write the decimals after a point and leave out thousands separators)
          inductor: {inductance: 10 H, resistance: 0,5 ohm}
                                                   ^^^^^^^
      file.yaml:7:17  number-zero  switch.slope: "0 A/us" is zero; wanted is a slope of current such as "200 A/us"
          switch: {slope: 0 A/us, gate: {drive: 3 V}, voltage_fall: 18 V, turn_off: {voltage_rise: 1 ns}}
                          ^^^^^^
      file.yaml:7:25  key-missing  switch.gate.input_capacitance: is missing; wanted is a capacitance such as "470 uF"
          switch: {slope: 0 A/us, gate: {drive: 3 V}, voltage_fall: 18 V, turn_off: {voltage_rise: 1 ns}}
                                  ^
      file.yaml:7:25  key-missing  switch.gate.resistance: is missing; wanted is a resistance such as "22 mohm"
          switch: {slope: 0 A/us, gate: {drive: 3 V}, voltage_fall: 18 V, turn_off: {voltage_rise: 1 ns}}
                                  ^
      file.yaml:7:25  key-missing  switch.gate.threshold: is missing; wanted is a voltage such as "48 V"
          switch: {slope: 0 A/us, gate: {drive: 3 V}, voltage_fall: 18 V, turn_off: {voltage_rise: 1 ns}}
                                  ^
      file.yaml:7:25  key-missing  switch.gate.transconductance: is missing; wanted is a transconductance such as "20 A/V"
          switch: {slope: 0 A/us, gate: {drive: 3 V}, voltage_fall: 18 V, turn_off: {voltage_rise: 1 ns}}
                                  ^
      file.yaml:7:25  key-not-here  switch.gate: cannot stand here: "slope" stands beside it; keep one of them
          switch: {slope: 0 A/us, gate: {drive: 3 V}, voltage_fall: 18 V, turn_off: {voltage_rise: 1 ns}}
                                  ^^^^
      file.yaml:7:59  unit-dimension  switch.voltage_fall: "18 V": "V" makes it a voltage; wanted is a time such as "35 ns"
          switch: {slope: 0 A/us, gate: {drive: 3 V}, voltage_fall: 18 V, turn_off: {voltage_rise: 1 ns}}
                                                                    ^^^^
      file.yaml:7:65  key-missing  switch.turn_off.current_fall: is missing; wanted is a time such as "35 ns"; "voltage_rise" needs it
          switch: {slope: 0 A/us, gate: {drive: 3 V}, voltage_fall: 18 V, turn_off: {voltage_rise: 1 ns}}
                                                                          ^
      file.yaml:8:1  key-missing  cooling.sink_to_ambient: is missing; wanted is a thermal resistance such as "0.9 K/W"; "shared" needs it
          cooling: {ambient: -300 degC, case: 3 degC, shared: yes}
          ^
      file.yaml:8:20  number-out-of-range  cooling.ambient: "-300 degC" is outside what can be used: a temperature above absolute zero, -273.15 degC
          cooling: {ambient: -300 degC, case: 3 degC, shared: yes}
                             ^^^^^^^^^
      file.yaml:8:45  key-not-here  cooling.shared: cannot stand here: "case" stands beside it; keep one of them
          cooling: {ambient: -300 degC, case: 3 degC, shared: yes}
                                                      ^^^^^^
      file.yaml:8:53  value-kind  cooling.shared: "yes" stands where true or false is wanted
          cooling: {ambient: -300 degC, case: 3 degC, shared: yes}
                                                              ^^^
      file.yaml:9:13  value-kind  candidates: "a" stands where a list is wanted (write [one, two])
          candidates: a
                      ^
      file.yaml:10:19  value-kind  parallel.parts: "2.5" stands where a whole number is wanted
          parallel: {parts: 2.5, imbalance: 300 %}
                            ^^^
      file.yaml:11:16  key-missing  duty_profile[1].hours: is missing; wanted is a duration such as "1200 h"
          duty_profile: [{load: 1}]
                         ^
      file.yaml:11:23  unit-missing  duty_profile[1].load: "1" has no unit; wanted is a percentage such as "80 %"
          duty_profile: [{load: 1}]
                                ^
      warning: file.yaml:6:24  value-implausible  inductor.inductance: "10 H" is unusual; values from 10 nH to 1 H are usual (check the unit)
          inductor: {inductance: 10 H, resistance: 0,5 ohm}
                                 ^^^^
      "
    `)
  })

  it('when several keys are unknown in one place', () => {
    expect(told(readStage, `${smallStage}titel: x\nkooling: 3\n`)).toMatchInlineSnapshot(`
      "
      file.yaml:7:1  key-unknown  "titel" is no key here (did you mean "title"?)
          titel: x
          ^^^^^
      file.yaml:8:1  key-unknown  "kooling" is no key here (did you mean "cooling"?)
          kooling: 3
          ^^^^^^^
      "
    `)
  })

  it('when keys are missing', () => {
    expect(told(readStage, 'title: x\n')).toMatchInlineSnapshot(`
      "
      file.yaml:1:1  key-missing  cooling: is missing; wanted is {ambient, sink_to_ambient, shared}, or {case}, or {ambient} alone with junction_to_ambient in the record
          title: x
          ^
      file.yaml:1:1  key-missing  frequency: is missing; wanted is a frequency such as "100 kHz"
          title: x
          ^
      file.yaml:1:1  key-missing  inductor: is missing; wanted is the inductor: {inductance: 150 uH}
          title: x
          ^
      file.yaml:1:1  key-missing  input: is missing; wanted is where the power comes from: {voltage: 48 V}, or {mains: 230 V} for mains-boost
          title: x
          ^
      file.yaml:1:1  key-missing  output: is missing; wanted is what the stage delivers: {voltage: 120 V, current: 5 A}
          title: x
          ^
      file.yaml:1:1  key-missing  stage: is missing; wanted is one of buck, boost, inverting, mains-boost
          title: x
          ^
      "
    `)
  })

  it('when it has the wrong case in a unit', () => {
    expect(told(readStage, smallWith('frequency: 100 khz'), 'catalogs-demo/stages/pump.yaml')).toMatchInlineSnapshot(`
      "
      catalogs-demo/stages/pump.yaml:4:12  unit-unknown  frequency: "100 khz": "khz" is no unit here (did you mean "kHz"?)
          frequency: 100 khz
                     ^^^^^^^
      "
    `)
  })

  it('when a decimal comma stands in a number', () => {
    expect(told(readStage, smallWith('frequency: "0,1 MHz"'))).toMatchInlineSnapshot(`
      "
      file.yaml:4:12  number-decimal-comma  frequency: "0,1 MHz" has a comma in its number, which is never guessed at (write the decimals after a point and leave out thousands separators)
          frequency: "0,1 MHz"
                     ^^^^^^^^^
      "
    `)
  })

  it('when the output does not fit the kind of stage', () => {
    expect(told(readStage, smallWith('output: {voltage: 60 V, current: 2 A}'))).toMatchInlineSnapshot(`
      "
      file.yaml:3:19  values-contradict  output.voltage: "60 V" cannot be: a buck delivers less than its input, 48 V; a boost delivers more
          output: {voltage: 60 V, current: 2 A}
                            ^^^^
      "
    `)
    expect(told(readStage, fullStage.replace('120 V, current', '40 V, current'))).toMatchInlineSnapshot(`
      "
      file.yaml:4:19  values-contradict  output.voltage: "40 V" cannot be: a boost delivers more than its input, 48 V; a buck delivers less
          output: {voltage: 40 V, current: 5 A, capacitance: 470 uF, bleeder: 10 kohm}
                            ^^^^
      file.yaml:24:58  values-contradict  duty_profile[2].input: "44 V" cannot be: a boost needs less than its output, 40 V
            - {load: 30 %, hours: 5000 h, ambient: 20 degC, input: 44 V}
                                                                   ^^^^
      "
    `)
    const mains = smallWith('stage: mains-boost').replace('{voltage: 48 V}', '{mains: 230 V}')
    expect(told(readStage, mains.replace('12 V', '350 V'))).toMatchInlineSnapshot(`
      "
      file.yaml:3:19  values-contradict  output.voltage: "350 V" cannot be: it must exceed the crest of the highest mains, 358 V; raise it, or lower the mains or its tolerance
          output: {voltage: 350 V, power: 60 W}
                            ^^^^^
      "
    `)
  })

  it('when the input does not fit the kind of stage', () => {
    expect(told(readStage, smallWith('input: {mains: 230 V, line: 60 Hz}'))).toMatchInlineSnapshot(`
      "
      file.yaml:2:1  key-missing  input.voltage: is missing; wanted is a voltage such as "48 V"
          input: {mains: 230 V, line: 60 Hz}
          ^
      file.yaml:2:9  key-not-here  input.mains: cannot stand here: only a mains-boost stage takes it
          input: {mains: 230 V, line: 60 Hz}
                  ^^^^^
      file.yaml:2:23  key-not-here  input.line: cannot stand here: only a mains-boost stage takes it
          input: {mains: 230 V, line: 60 Hz}
                                ^^^^
      "
    `)
    expect(told(readStage, smallWith('stage: mains-boost'))).toMatchInlineSnapshot(`
      "
      file.yaml:2:1  key-missing  input.mains: is missing; wanted is a voltage such as "230 V"
          input: {voltage: 48 V}
          ^
      file.yaml:2:9  key-not-here  input.voltage: cannot stand here: a mains-boost stage takes "mains", not "voltage"
          input: {voltage: 48 V}
                  ^^^^^^^
      "
    `)
  })

  it('when the gate cannot drive the switch', () => {
    const gate =
      'switch: {gate: {drive: 3 V, resistance: 0 ohm, input_capacitance: 1 nF, transconductance: 0 A/V, threshold: 3.5 V, plateau: 2 V}}'
    expect(told(readStage, `${smallStage}${gate}\n`)).toMatchInlineSnapshot(`
      "
      file.yaml:7:24  values-contradict  switch.gate.drive: "3 V" cannot be: it must exceed the threshold, 3.5 V
          switch: {gate: {drive: 3 V, resistance: 0 ohm, input_capacitance: 1 nF, transconductance: 0 A/V, threshold: 3.5 V, plate
                                 ^^^
      file.yaml:7:41  values-contradict  switch.gate.resistance: "0 ohm" cannot be: nothing would limit the slope; give the gate resistance and the input capacitance
          switch: {gate: {drive: 3 V, resistance: 0 ohm, input_capacitance: 1 nF, transconductance: 0 A/V, threshold: 3.5 V, plate
                                                  ^^^^^
      file.yaml:7:91  values-contradict  switch.gate.transconductance: "0 A/V" cannot be: without it the current would not rise
          switch: {gate: {drive: 3 V, resistance: 0 ohm, input_capacitance: 1 nF, transconductance: 0 A/V, threshold: 3.5 V, plate
                                                                                                    ^^^^^
      file.yaml:7:125  values-contradict  switch.gate.plateau: "2 V" cannot be: it cannot lie below the threshold, 3.5 V
          V, threshold: 3.5 V, plateau: 2 V}}
                                        ^^^
      "
    `)
  })

  it('when one part would carry everything', () => {
    expect(told(readStage, `${smallStage}parallel: {parts: 2, imbalance: 100 %}\n`)).toMatchInlineSnapshot(`
      "
      file.yaml:7:33  values-contradict  parallel.imbalance: "100 %" cannot be: one of 2 parts would carry all of the current; stay below 100 %
          parallel: {parts: 2, imbalance: 100 %}
                                          ^^^^^
      "
    `)
  })

  it('when the loads of the year cannot be', () => {
    const duty = 'duty_profile: [{load: 50 %, hours: 0 h, input: 10 V}, {load: 0.5, hours: 100, ambient: 20 degC}]'
    expect(told(readStage, `${smallStage}${duty}\n`)).toMatchInlineSnapshot(`
      "
      file.yaml:7:48  values-contradict  duty_profile[1].input: "10 V" cannot be: a buck needs more than its output, 12 V
          duty_profile: [{load: 50 %, hours: 0 h, input: 10 V}, {load: 0.5, hours: 100, ambient: 20 degC}]
                                                         ^^^^
      file.yaml:7:62  unit-missing  duty_profile[2].load: "0.5" has no unit; wanted is a percentage such as "80 %"
          duty_profile: [{load: 50 %, hours: 0 h, input: 10 V}, {load: 0.5, hours: 100, ambient: 20 degC}]
                                                                       ^^^
      file.yaml:7:74  unit-missing  duty_profile[2].hours: "100" has no unit; wanted is a duration such as "1200 h"
          duty_profile: [{load: 50 %, hours: 0 h, input: 10 V}, {load: 0.5, hours: 100, ambient: 20 degC}]
                                                                                   ^^^
      warning: file.yaml:7:88  value-unused  duty_profile[2].ambient: "20 degC" is not used: cooling gives the case temperature
          duty_profile: [{load: 50 %, hours: 0 h, input: 10 V}, {load: 0.5, hours: 100, ambient: 20 degC}]
                                                                                                 ^^^^^^^
      "
    `)
  })

  it('when a year without hours is given', () => {
    expect(told(readStage, `${smallStage}duty_profile: [{load: 50 %, hours: 0 h}]\n`)).toMatchInlineSnapshot(`
      "
      file.yaml:7:15  values-contradict  duty_profile: "0 h" cannot be: its hours add up to nothing
          duty_profile: [{load: 50 %, hours: 0 h}]
                        ^
      "
    `)
  })

  it('when it is not YAML that is taken here', () => {
    const texts = [
      '',
      'a: [1',
      'a: b: c',
      '\ta: 1',
      '%YAML 1.1\n---\nstage: buck',
      'stage: &x buck\ntitle: *x',
      'stage: !!js/function x',
      'stage: buck\nstage: boost\n__proto__: {a: 1}',
      'stage: buck\n---\nstage: boost',
      '['.repeat(40),
      'stage: bu\u0000ck',
      'just words',
    ]
    const all = texts.map((text) =>
      told(readStage, text)
        .split('\n')
        .filter((line) => line.startsWith('file.yaml:') && !line.includes('key-missing')),
    )
    expect(all).toMatchInlineSnapshot(`
      [
        [
          "file.yaml:1:1  file-empty  holds nothing; wanted is a stage",
        ],
        [
          "file.yaml:1:6  yaml-syntax  the indentation does not fit what stands above, or a bracket is not closed",
        ],
        [
          "file.yaml:1:4  yaml-syntax  a second ": " stands in this line (put text that contains ": " in quotes)",
        ],
        [
          "file.yaml:1:1  yaml-syntax  a tab stands where only spaces may indent (use spaces)",
        ],
        [
          "file.yaml:1:1  yaml-forbidden  a directive cannot be used here; leave lines that begin with % out",
        ],
        [
          "file.yaml:1:11  yaml-forbidden  stage: an anchor cannot be used here; leave the &name out",
          "file.yaml:2:8  yaml-forbidden  title: an alias cannot be used here; write the value out",
        ],
        [
          "file.yaml:1:8  yaml-forbidden  a tag cannot be used here; write plain text, numbers and lists",
        ],
        [
          "file.yaml:2:1  yaml-duplicate-key  "stage" stands here twice; keep one",
          "file.yaml:3:1  yaml-forbidden  the key "__proto__" cannot be used here; it is a name of the language itself",
        ],
        [
          "file.yaml:2:1  yaml-forbidden  a second document cannot be used here; keep one document in a file, records as a list",
        ],
        [
          "file.yaml:1:33  yaml-too-deep  is nested deeper than 32 levels",
        ],
        [
          "file.yaml:1:10  file-not-text  is not text in UTF-8: it holds a NUL character; save it as UTF-8 text",
        ],
        [
          "file.yaml:1:1  value-kind  "just words" stands where a group of keys is wanted",
        ],
      ]
    `)
  })
})

describe('a broken record file is told in full', () => {
  it('with everything that is wrong in it at once', () => {
    const text = `- id: a
  class: shottky
  ratings: {reverse_voltage: 0 V, average_current: -8 A}
  recovery:
    - {fixture: step, slope: 3 A/us, trr: 5 ns}
    - {fixture: ramp, until: 3 A}
    - {fixture: rampe}
    - {fixture: step, current: 1 A, reverse: 1 A, until: 2 A, trr: 5 ns, storage: 9 ns}
  forward: []
  forward_line: {threshold: 1 mV}
  capacitance: {points: [], grading: 1.2}
- 3
`
    expect(told(readRecords, text)).toMatchInlineSnapshot(`
      "
      file.yaml:2:10  word-unknown  [1].class: "shottky" is not one of standard, fast, ultrafast, soft-ultrafast, body-diode, schottky, sic-schottky (did you mean "schottky"?)
            class: shottky
                   ^^^^^^^
      file.yaml:3:3  key-missing  [1].ratings.junction: is missing; wanted is a temperature such as "25 degC"
            ratings: {reverse_voltage: 0 V, average_current: -8 A}
            ^
      file.yaml:3:30  number-zero  [1].ratings.reverse_voltage: "0 V" is zero; wanted is a voltage such as "48 V"
            ratings: {reverse_voltage: 0 V, average_current: -8 A}
                                       ^^^
      file.yaml:3:52  number-negative  [1].ratings.average_current: "-8 A" is negative; wanted is a current such as "8 A"
            ratings: {reverse_voltage: 0 V, average_current: -8 A}
                                                             ^^^^
      file.yaml:5:7  key-missing  [1].recovery[1].current: is missing; wanted is a current such as "0.5 A"
              - {fixture: step, slope: 3 A/us, trr: 5 ns}
                ^
      file.yaml:5:7  key-missing  [1].recovery[1].reverse: is missing; wanted is a current such as "1 A"
              - {fixture: step, slope: 3 A/us, trr: 5 ns}
                ^
      file.yaml:5:7  key-missing  [1].recovery[1].until: is missing; wanted is a current such as "0.25 A", at which trr ends; "trr" needs it
              - {fixture: step, slope: 3 A/us, trr: 5 ns}
                ^
      file.yaml:5:23  key-not-here  [1].recovery[1].slope: cannot stand here: it belongs to fixture: ramp
              - {fixture: step, slope: 3 A/us, trr: 5 ns}
                                ^^^^^
      file.yaml:6:7  key-missing  [1].recovery[2].trr: is missing; wanted is one of trr, qrr, irrm, softness
              - {fixture: ramp, until: 3 A}
                ^
      file.yaml:6:7  key-missing  [1].recovery[2].trr_by: is missing; wanted is the word "level"; "until" needs it
              - {fixture: ramp, until: 3 A}
                ^
      file.yaml:7:17  word-unknown  [1].recovery[3].fixture: "rampe" is not one of ramp, step (did you mean "ramp"?)
              - {fixture: rampe}
                          ^^^^^
      file.yaml:8:58  values-contradict  [1].recovery[4].until: "2 A" cannot be: it must be below reverse, 1 A; the current of the fixture, which trr waits to fall, is "reverse"
              - {fixture: step, current: 1 A, reverse: 1 A, until: 2 A, trr: 5 ns, storage: 9 ns}
                                                                   ^^^
      file.yaml:8:83  values-contradict  [1].recovery[4].storage: "9 ns" cannot be: the storage time is a part of trr, 5 ns
              - {fixture: step, current: 1 A, reverse: 1 A, until: 2 A, trr: 5 ns, storage: 9 ns}
                                                                                            ^^^^
      file.yaml:10:3  key-missing  [1].forward_line.resistance: is missing; wanted is a resistance such as "22 mohm"
            forward_line: {threshold: 1 mV}
            ^
      file.yaml:10:3  key-not-here  [1].forward_line: cannot stand here: "forward" stands beside it; keep one of them
            forward_line: {threshold: 1 mV}
            ^^^^^^^^^^^^
      file.yaml:11:3  key-missing  [1].capacitance.zero_bias: is missing; wanted is a capacitance such as "470 uF"; "grading" needs it
            capacitance: {points: [], grading: 1.2}
            ^
      file.yaml:11:25  list-length  [1].capacitance.points: 0 entries; wanted is at least 1
            capacitance: {points: [], grading: 1.2}
                                  ^
      file.yaml:11:29  key-not-here  [1].capacitance.grading: cannot stand here: "points" stands beside it; keep one of them
            capacitance: {points: [], grading: 1.2}
                                      ^^^^^^^
      file.yaml:11:38  number-out-of-range  [1].capacitance.grading: "1.2" is outside what can be used: less than 1
            capacitance: {points: [], grading: 1.2}
                                               ^^^
      file.yaml:12:3  value-kind  [2]: "3" stands where a group of keys is wanted
          - 3
            ^
      warning: file.yaml:10:29  value-implausible  [1].forward_line.threshold: "1 mV" is unusual; values from 50 mV to 20 V are usual (check the unit)
            forward_line: {threshold: 1 mV}
                                      ^^^^
      "
    `)
  })

  it('when both forms of the forward characteristic are given', () => {
    const both = 'forward_line: {threshold: 0.9 V, resistance: 30 mohm}\nforward: [{current: 8 A, drop: 1 V}]'
    expect(told(readRecords, record(both))).toMatchInlineSnapshot(`
      "
      file.yaml:5:1  key-not-here  forward: cannot stand here: "forward_line" stands beside it; keep one of them
          forward: [{current: 8 A, drop: 1 V}]
          ^^^^^^^
      "
    `)
  })

  it('when a row says nothing', () => {
    expect(told(readRecords, record('recovery: [{fixture: ramp, current: 8 A}]'))).toMatchInlineSnapshot(`
      "
      file.yaml:4:12  key-missing  recovery[1].trr: is missing; wanted is one of trr, qrr, irrm, softness
          recovery: [{fixture: ramp, current: 8 A}]
                     ^
      "
    `)
  })

  it('when a definition has neither a time nor a softness that it defines', () => {
    const row = (rest: string) => record(`recovery: [{fixture: ramp, qrr: 90 nC, ${rest}trr_by: line-90-25}]`)
    expect(told(readRecords, row('softness: 0.6, ')).trim()).toBe('')
    expect(told(readRecords, row('trr: 30 ns, ')).trim()).toBe('')
    expect(told(readRecords, row(''))).toContain('recovery[1].trr: is missing; wanted is one of trr, softness')
  })

  it('when a level has no current', () => {
    expect(told(readRecords, record('recovery: [{fixture: ramp, trr: 30 ns, trr_by: level}]'))).toMatchInlineSnapshot(`
      "
      file.yaml:4:12  key-missing  recovery[1].until: is missing; wanted is a current such as "0.25 A", at which trr ends
          recovery: [{fixture: ramp, trr: 30 ns, trr_by: level}]
                     ^
      "
    `)
    expect(
      told(readRecords, record('recovery: [{fixture: ramp, trr: 30 ns, trr_by: level-25, until: 1 A}]')),
    ).toMatchInlineSnapshot(`
      "
      file.yaml:4:58  key-not-here  recovery[1].until: cannot stand here: it belongs to trr_by: level
          recovery: [{fixture: ramp, trr: 30 ns, trr_by: level-25, until: 1 A}]
                                                                   ^^^^^
      "
    `)
  })

  it('when a thermal path mixes its two forms', () => {
    const thermal = 'thermal: {junction_to_case: 1 K/W, junction_to_ambient: 50 K/W}'
    expect(told(readRecords, record(thermal))).toMatchInlineSnapshot(`
      "
      file.yaml:4:36  key-not-here  thermal.junction_to_ambient: cannot stand here: "junction_to_case" stands beside it; keep one of them
          thermal: {junction_to_case: 1 K/W, junction_to_ambient: 50 K/W}
                                             ^^^^^^^^^^^^^^^^^^^
      "
    `)
  })

  it('and warns about what is unusual without refusing it', () => {
    const more = `forward: [{current: 8 A, drop: 1 mV, junction: 200 degC}]
recovery: [{fixture: ramp, voltage: 0 V, trr: 30 ns}]
leakage: [{voltage: 0 V, current: 1 uA}]
dead_time: {before: 4 ns, after: 4 ns}`
    expect(readRecords(record(more), 'file.yaml').value).not.toBeNull()
    expect(told(readRecords, record(more))).toMatchInlineSnapshot(`
      "
      warning: file.yaml:4:32  value-implausible  forward[1].drop: "1 mV" is unusual; values from 50 mV to 20 V are usual (check the unit)
          forward: [{current: 8 A, drop: 1 mV, junction: 200 degC}]
                                         ^^^^
      warning: file.yaml:4:48  value-implausible  forward[1].junction: "200 degC" is unusual; the rating is 175 degC
          forward: [{current: 8 A, drop: 1 mV, junction: 200 degC}]
                                                         ^^^^^^^^
      warning: file.yaml:5:37  value-unused  recovery[1].voltage: "0 V" is not used: the row counts as one without a voltage
          recovery: [{fixture: ramp, voltage: 0 V, trr: 30 ns}]
                                              ^^^
      warning: file.yaml:6:21  value-unused  leakage[1].voltage: "0 V" is not used: at 0 V there is no leakage
          leakage: [{voltage: 0 V, current: 1 uA}]
                              ^^^
      warning: file.yaml:7:1  value-unused  dead_time: "dead_time" is not used: only class body-diode has it, not ultrafast
          dead_time: {before: 4 ns, after: 4 ns}
          ^^^^^^^^^
      "
    `)
  })
})
