/** Safety and handling: raised by the study, never suppressed. Codes of `cautions`, each with its sentences. */
export const cautionCodes = [
  'lethal-voltage',
  'mains-fed',
  'qualified-persons',
  'bulk-capacitor',
  'isolated-probing',
  'fuse-and-insulation',
  'estimate-only',
  'surge-silicon-carbide',
  'leakage-and-voltage-of-schottky',
  'faster-edges',
  'gate-drive-retune',
] as const

export type CautionCode = (typeof cautionCodes)[number]

export const cautionWords: Readonly<Record<CautionCode, string>> = {
  'lethal-voltage':
    'Lethal voltage: this stage carries [{voltage:V}|a hazardous voltage][; its {side} stands at {dc:V} dc, above 60 V dc]' +
    '[; its switching node swings to {swing:V} peak, above 42.4 V peak][; with overshoot the rectifier sees {overshoot:V} peak, above 42.4 V peak]. ' +
    'Above 60 V dc or 42.4 V peak, touching live parts can kill.',
  'mains-fed':
    'This stage is fed from the mains[ ({mains:V}, up to {peak:V} peak)]: every part of it, ground of the control included, is to be taken as live, ' +
    'also when it does not switch.',
  'qualified-persons':
    'Work on it is for qualified persons who are licensed where the law asks for it, under the local code and with a second person present.',
  'bulk-capacitor':
    'Every bulk capacitor stays charged after switching off. ' +
    '[The input capacitor stays charged at {input:V}; its capacitance is not given, so neither its time nor its energy can be stated. ]' +
    '[The output capacitor of {capacitance:F} at {voltage:V} holds {energy:J}|The output capacitor at {output:V}: its capacitance is not given, so neither time nor energy can be stated|Its capacitance is not given, so neither time nor energy can be stated]' +
    '[. At the output the voltage stays below {below:V}, yet a short circuit burns and welds|. Its bleeder of {bleeder:ohm} takes {time:s} to bring it down to {until:V}|. No bleeder is given: take it to stay charged for hours]. ' +
    'Isolate, discharge and measure each before touching; a bleeder can have failed.',
  'isolated-probing':
    'Probe with differential or isolated probes rated for the voltage. A grounded probe on the switching node or on a mains-fed ground destroys it and endangers people.',
  'fuse-and-insulation':
    'Fuse, creepage, clearance and insulation follow the local code and the standard of the product; nothing here has checked them.',
  'estimate-only':
    'The figures are estimates from data sheets and models. Confirm losses, temperatures and peak voltage on the bench before release.',
  'surge-silicon-carbide':
    'At mains start-up the bulk capacitor charges through the rectifier: silicon-carbide Schottky parts[ ({parts})] bear less surge current than silicon. ' +
    'Check the surge rating and consider a bypass rectifier or an inrush limit.',
  'leakage-and-voltage-of-schottky':
    'A silicon Schottky part leaks much more when hot and has little voltage reserve: check runaway at maximum leakage and the peak reverse voltage with ringing.',
  'faster-edges':
    'A part with less recovery makes faster edges and can ring more: check overshoot, ringing and conducted noise on the bench.',
  'gate-drive-retune':
    'The gate drive was set for the part in use: after the swap, set the turn-on resistance again and check the slope it really gives.',
}

/** Whether more is to be feared than a wrong estimate. */
export function isHazardous(cautions: readonly { readonly code: string }[]): boolean {
  return cautions.some(({ code }) => code === 'lethal-voltage' || code === 'mains-fed')
}
