/** The files of `ebbwatt start`: an invented stage and two invented parts that rank as they are. */

export const starterStage = `# A converter stage. Every value is a number with its unit; "ebbwatt check stage.yaml" finds what is wrong.
# These lines are enough for a first estimate; each line below that begins with "#" is optional and sharpens it.
stage: boost                       # buck | boost | inverting | mains-boost
title: My first stage
input: {voltage: 48 V}             # mains-boost: {mains: 230 V, line: 50 Hz, tolerance: 10 %}
output: {voltage: 120 V, current: 5 A}             # or power:; and capacitance:, bleeder: for the discharge caution
frequency: 100 kHz
inductor: {inductance: 150 uH}     # and resistance: 25 mohm, core_loss: 1.2 W
cooling: {ambient: 45 degC, sink_to_ambient: 4 K/W, shared: true}   # or {case: 80 degC}

# switch:
#   on_resistance: 22 mohm         # at 25 degC
#   on_resistance_per_kelvin: 0.6 %/K
#   slope: 350 A/us                # turn-on di/dt, the most important line here; measure it
#   voltage_fall: 18 ns
#   turn_off: {voltage_rise: 15 ns, current_fall: 12 ns}    # or energy:
#   stored_energy: 4 uJ            # output capacitance, at the blocking voltage
#   turn_on: {energy: 60 uJ, current: 10 A, voltage: 120 V, includes_rectifier: no}    # yes | no | unknown
#   thermal: {junction_to_sink: 0.9 K/W, junction_limit: 150 degC}
# loop_inductance: 12 nH           # without it no overshoot is counted
# limits: {junction: 125 degC, voltage_use: 80 %}
# spread: {slope: 25 %, voltage_fall: 25 %, thermal: 10 %}  # what the bench will really show, one standard deviation
# fixed_losses: 3 W                # control, bridge, fan
# duty_profile:
#   - {load: 100 %, hours: 1200 h}
#   - {load: 30 %, hours: 5000 h}

records: [rectifiers]              # files or folders
# candidates: [starter-200v-16a, starter-200v-20a-schottky]         # all records where left out
# incumbent: starter-200v-16a      # the part in use today, for "ebbwatt swap"
`

export const starterRecords = `# Two invented rectifiers. A file holds one record or a list of them; copy the figures of your own parts from their sheets.
- id: starter-200v-16a
  class: ultrafast                 # standard | fast | ultrafast | soft-ultrafast | body-diode | schottky | sic-schottky
  title: First part, 16 A 200 V
  origin: invented to begin with
  ratings: {reverse_voltage: 200 V, average_current: 16 A, junction: 175 degC}
  thermal: {junction_to_case: 1.4 K/W, case_to_sink: 0.5 K/W}
  forward:
    - {current: 16 A, drop: 1.02 V, junction: 25 degC, grade: typical}
    - {current: 16 A, drop: 0.88 V, junction: 125 degC, grade: typical}
  recovery:                        # give the test's own conditions: they are converted to the stage
    - {fixture: ramp, current: 16 A, slope: 200 A/us, voltage: 160 V, junction: 25 degC, trr: 34 ns, trr_by: line-90-25, qrr: 75 nC, grade: typical}
    - {fixture: ramp, current: 16 A, slope: 200 A/us, voltage: 160 V, junction: 125 degC, trr: 52 ns, trr_by: line-90-25, qrr: 190 nC, grade: typical}
  leakage:
    - {voltage: 200 V, junction: 125 degC, current: 60 uA, grade: typical}

- id: starter-200v-20a-schottky
  class: schottky
  title: Second part, 20 A 200 V, no stored charge
  origin: invented to begin with
  ratings: {reverse_voltage: 200 V, average_current: 20 A, junction: 175 degC}
  thermal: {junction_to_case: 1.6 K/W, case_to_sink: 0.5 K/W}
  forward:
    - {current: 10 A, drop: 0.83 V, junction: 25 degC, grade: typical}
    - {current: 10 A, drop: 0.68 V, junction: 125 degC, grade: typical}
  capacitance: {zero_bias: 900 pF, built_in: 0.8 V, grading: 0.47}
  leakage:
    - {voltage: 200 V, junction: 125 degC, current: 1.2 mA, grade: typical}
`
