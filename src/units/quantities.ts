/** One name, one meaning, one unit. */
export interface QuantityEntry {
  readonly name: string
  readonly symbol: string
  /** Unit of the number inside the engine. */
  readonly unit: string
  readonly sentence: string
}

const entry = (name: string, symbol: string, unit: string, sentence: string): QuantityEntry => ({
  name,
  symbol,
  unit,
  sentence,
})

/**
 * The nomenclature: glossaries, schema descriptions and documentation speak of these quantities by these names.
 * Symbols follow IEC 60747-2 where it has one.
 */
export const quantities = {
  inputVoltage: entry(
    'input voltage',
    'Vin',
    'V',
    'Voltage from which the stage draws its power; root mean square for mains.',
  ),
  outputVoltage: entry('output voltage', 'Vo', 'V', 'Voltage that the stage delivers, as a magnitude.'),
  blockingVoltage: entry('blocking voltage', 'V', 'V', 'Voltage that the rectifier blocks while the switch conducts.'),
  peakReverseVoltage: entry(
    'peak reverse voltage',
    'V_RP',
    'V',
    'Highest reverse voltage at the rectifier, overshoot included.',
  ),
  reverseVoltageRating: entry(
    'reverse voltage rating',
    'V_RRM',
    'V',
    'Repetitive peak reverse voltage that the record allows.',
  ),
  voltageMargin: entry('voltage margin', 'm_V', '1', 'Share of the reverse voltage rating that the peak leaves free.'),
  forwardVoltage: entry('forward voltage', 'V_F', 'V', 'Voltage across the conducting rectifier.'),
  switchingFrequency: entry('switching frequency', 'f', 'Hz', 'How often in a second the switch turns on.'),
  duty: entry('duty', 'D', '1', 'Share of the period in which the switch conducts.'),
  inductance: entry('inductance', 'L', 'H', 'Inductance of the main inductor at its working current.'),
  loopInductance: entry('loop inductance', 'L_loop', 'H', 'Inductance of the loop of switch, rectifier and capacitor.'),
  meanCurrent: entry('mean inductor current', 'I', 'A', 'Inductor current averaged over the switching period.'),
  rippleCurrent: entry('ripple current', 'dI', 'A', 'Peak minus valley of the inductor current.'),
  valleyCurrent: entry(
    'valley current',
    'I_v',
    'A',
    'Inductor current when the switch turns on: what the rectifier carries at its turn-off.',
  ),
  peakCurrent: entry('peak current', 'I_pk', 'A', 'Inductor current when the switch turns off.'),
  ratedCurrent: entry('rated current', 'I_F(AV)', 'A', 'Mean forward current that the record allows.'),
  slope: entry('slope', 'a', 'A/s', 'Magnitude of di/dt with which the switch takes the current from the rectifier.'),
  voltageFallTime: entry(
    'voltage fall time',
    't_fv',
    's',
    'Time in which the switch voltage falls after the peak reverse current.',
  ),
  lifetime: entry('carrier lifetime', 'tau', 's', 'Time constant with which the stored charge recombines.'),
  recoveryTimeConstant: entry(
    'recovery time constant',
    'tau_rr',
    's',
    'Time constant of the tail of the reverse current.',
  ),
  storedCharge: entry('stored charge', 'q0', 'C', 'Charge in the rectifier when its current begins to fall.'),
  peakReverseCurrent: entry(
    'peak reverse current',
    'I_RM',
    'A',
    'Largest reverse current of the recovery, as a magnitude.',
  ),
  storagePhase: entry('rise of the reverse current', 'ta', 's', 'From the zero crossing to the peak reverse current.'),
  recoveryTime: entry(
    'reverse recovery time',
    'trr',
    's',
    'From the zero crossing to the end of recovery by a stated definition.',
  ),
  recoveryCharge: entry(
    'recovered charge',
    'Qrr',
    'C',
    'Charge that flows back through the rectifier during recovery.',
  ),
  softness: entry('softness', 'S', '1', 'Fall time of the reverse current divided by its rise time.'),
  capacitiveCharge: entry(
    'capacitive charge',
    'Qc',
    'C',
    'Charge of the junction capacitance at the blocking voltage.',
  ),
  rectifierEnergy: entry(
    'recovery energy in the rectifier',
    'E_rectifier',
    'J',
    'Energy per turn-on that heats the rectifier.',
  ),
  switchAddedEnergy: entry(
    'recovery energy in the switch',
    'E_switch_added',
    'J',
    'Energy per turn-on that the rectifier causes in the switch.',
  ),
  baseEnergy: entry('base turn-on energy', 'E_base', 'J', 'Energy per turn-on of the switch with an ideal rectifier.'),
  conductionLoss: entry('conduction loss', 'P_cond', 'W', 'Forward voltage times current, averaged over the period.'),
  leakageCurrent: entry('leakage current', 'I_R', 'A', 'Reverse current of the blocking rectifier.'),
  junctionTemperature: entry('junction temperature', 'T_j', 'K', 'Temperature of the rectifier junction.'),
  thermalResistance: entry('thermal resistance', 'R_th', 'K/W', 'Temperature difference per watt of heat.'),
  ambientMargin: entry(
    'ambient margin',
    'dT_a',
    'K',
    'How much hotter the surroundings may become before a limit is met.',
  ),
  stageLoss: entry(
    'stage loss',
    'P_stage',
    'W',
    'All losses of the stage that are covered; candidates are ranked by it.',
  ),
  efficiency: entry('efficiency', 'eta', '1', 'Output power divided by output power plus stage loss.'),
  bulkCapacitance: entry(
    'bulk capacitance',
    'C_o',
    'F',
    'Capacitance at the output that stays charged after switch-off.',
  ),
  bleeder: entry('bleeder', 'R_b', 'ohm', 'Resistance that discharges the bulk capacitance.'),
} as const satisfies Readonly<Record<string, QuantityEntry>>
