/** A stage with every key, after the interface; invented. */
export const fullStage = `stage: boost
title: Orchard pump drive, input stage
input: {voltage: 48 V}
output: {voltage: 120 V, current: 5 A, capacitance: 470 uF, bleeder: 10 kohm}
frequency: 100 kHz
inductor: {inductance: 150 uH, resistance: 25 mohm, core_loss: 1.2 W}
switch:
  on_resistance: 22 mohm
  on_resistance_per_kelvin: 0.6 %/K
  slope: 350 A/us
  voltage_fall: 18 ns
  turn_off: {voltage_rise: 15 ns, current_fall: 12 ns}
  stored_energy: 4 uJ
  turn_on: {energy: 60 uJ, current: 10 A, voltage: 120 V, includes_rectifier: no, rectifier: first}
  thermal: {junction_to_sink: 0.9 K/W, junction_limit: 150 degC}
loop_inductance: 12 nH
snubber: {capacitance: 100 pF}
cooling: {ambient: 45 degC, sink_to_ambient: 4 K/W, shared: true}
limits: {junction: 125 degC, voltage_use: 80 %}
spread: {slope: 25 %, voltage_fall: 25 %, thermal: 10 %}
fixed_losses: 3 W
duty_profile:
  - {load: 100 %, hours: 1200 h}
  - {load: 30 %, hours: 5000 h, ambient: 20 degC, input: 44 V}
records: [../rectifiers]
candidates: [first, second]
incumbent: first
parallel: {parts: 2, imbalance: 10 %}
`

/** What the interface requires, and nothing more. */
export const smallStage = `stage: buck
input: {voltage: 48 V}
output: {voltage: 12 V, power: 60 W}
frequency: 200 kHz
inductor: {inductance: 22 uH}
cooling: {case: 80 degC}
`

/** Two records with every key between them; invented. */
export const fullRecords = `- id: larch-600v-8a-soft
  class: soft-ultrafast
  title: Larch 8 A 600 V soft recovery
  origin: invented for the tests
  ratings: {reverse_voltage: 600 V, average_current: 8 A, junction: 175 degC}
  thermal: {junction_to_case: 1.9 K/W, case_to_sink: 0.5 K/W}
  price: 0.62
  forward:
    - {current: 8 A, drop: 1.55 V, junction: 25 degC, grade: typical}
    - {current: 8 A, drop: 1.28 V, junction: 125 degC, grade: maximum, spread: 1 %, source: table 4}
  recovery:
    - {fixture: ramp, current: 8 A, slope: 200 A/us, voltage: 390 V, junction: 125 degC, trr: 62 ns, trr_by: line-90-25, qrr: 190 nC, irrm: 6.1 A, grade: measured}
    - {fixture: ramp, trr: 80 ns, trr_by: level, until: 0.5 A, softness: 0.8, softness_by: slopes}
    - {fixture: step, current: 0.5 A, reverse: 1 A, until: 0.25 A, junction: 25 degC, trr: 28 ns, storage: 12 ns, grade: maximum}
  leakage:
    - {voltage: 600 V, junction: 125 degC, current: 40 uA}
  capacitance: {zero_bias: 400 pF, built_in: 1.2 V, grading: 0.46}
  forward_recovery: {peak: 4 V, time: 60 ns, slope: 200 A/us}
- id: moth-100v-30a
  class: body-diode
  ratings: {reverse_voltage: 100 V, average_current: 30 A, junction: 150 degC}
  thermal: {junction_to_ambient: 55 K/W, mounting: "on 6 cm2 of copper"}
  forward_line: {threshold: 0.7 V, resistance: 8 mohm, junction: 125 degC, threshold_per_kelvin: -1.8 mV/K, resistance_per_kelvin: 0.02 mohm/K, grade: estimated}
  capacitance: {points: [{voltage: 10 V, capacitance: 400 pF}, {voltage: 50 V, capacitance: 200 pF}]}
  dead_time: {before: 40 ns, after: 30 ns}
  channel: {on_resistance: 8 mohm, per_kelvin: 0.6 %/K}
`
