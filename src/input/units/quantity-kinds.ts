/** One kind of quantity as people write it. */
export interface QuantityKind {
  /** With its article, as it stands in sentences. */
  readonly name: string
  /** The unit of the number inside, in the notation of mathjs; "" for a plain ratio. */
  readonly target: string
  readonly example: string
  /** What is proposed when a unit is not known; the first is the usual one. */
  readonly units: readonly string[]
}

const kinds = {
  voltage: { name: 'a voltage', target: 'V', example: '48 V', units: ['V', 'mV', 'kV', 'uV'] },
  current: { name: 'a current', target: 'A', example: '8 A', units: ['A', 'mA', 'uA', 'nA', 'kA'] },
  power: { name: 'a power', target: 'W', example: '600 W', units: ['W', 'mW', 'kW', 'uW'] },
  energy: { name: 'an energy', target: 'J', example: '60 uJ', units: ['uJ', 'nJ', 'mJ', 'J', 'pJ'] },
  time: { name: 'a time', target: 's', example: '35 ns', units: ['ns', 'us', 'ms', 's', 'ps'] },
  frequency: { name: 'a frequency', target: 'Hz', example: '100 kHz', units: ['kHz', 'MHz', 'Hz', 'GHz'] },
  slope: {
    name: 'a slope of current',
    target: 'A/s',
    example: '200 A/us',
    units: ['A/us', 'A/ns', 'mA/ns', 'A/ms', 'A/s', 'kA/us', 'kA/s', 'mA/us'],
  },
  inductance: { name: 'an inductance', target: 'H', example: '150 uH', units: ['uH', 'nH', 'mH', 'H', 'pH'] },
  capacitance: { name: 'a capacitance', target: 'F', example: '470 uF', units: ['pF', 'nF', 'uF', 'mF', 'F'] },
  resistance: {
    name: 'a resistance',
    target: 'ohm',
    example: '22 mohm',
    units: ['mohm', 'ohm', 'kohm', 'Mohm', 'uohm'],
  },
  thermal_resistance: {
    name: 'a thermal resistance',
    target: 'K/W',
    example: '0.9 K/W',
    units: ['K/W', 'degC/W', 'K/mW'],
  },
  charge: { name: 'a charge', target: 'C', example: '190 nC', units: ['nC', 'uC', 'pC', 'mC', 'C'] },
  temperature: { name: 'a temperature', target: 'K', example: '25 degC', units: ['degC', 'K'] },
  share: { name: 'a percentage', target: '', example: '80 %', units: ['%'] },
  per_kelvin: {
    name: 'a relative change per kelvin',
    target: 'K^-1',
    example: '0.6 %/K',
    units: ['%/K', '/K', '%/degC'],
  },
  voltage_per_kelvin: {
    name: 'a change of voltage per kelvin',
    target: 'V/K',
    example: '-1.8 mV/K',
    units: ['mV/K', 'V/K', 'mV/degC', 'uV/K'],
  },
  resistance_per_kelvin: {
    name: 'a change of resistance per kelvin',
    target: 'ohm/K',
    example: '0.02 mohm/K',
    units: ['mohm/K', 'ohm/K', 'uohm/K', 'mohm/degC'],
  },
  transconductance: { name: 'a transconductance', target: 'A/V', example: '20 A/V', units: ['A/V', 'S', 'mA/V', 'mS'] },
  hours: { name: 'a duration', target: 'h', example: '1200 h', units: ['h', 'min', 's', 'day'] },
} as const satisfies Readonly<Record<string, QuantityKind>>

export type QuantityKindName = keyof typeof kinds

/** Every kind of quantity that an input file can hold. The `$defs` of the schemas bear the same names. */
export const quantityKinds: Readonly<Record<QuantityKindName, QuantityKind>> = kinds

/** Which numbers make sense. */
export type QuantitySign = 'positive' | 'not-negative' | 'any'

/** What is wanted in one place. */
export interface QuantityRule {
  readonly kind: QuantityKindName
  readonly sign: QuantitySign
}

/** "a frequency, such as "100 kHz"". */
export function wantedQuantity(kind: QuantityKindName): string {
  return `${quantityKinds[kind].name} such as "${quantityKinds[kind].example}"`
}
