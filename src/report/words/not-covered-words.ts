/** What no figure here contains, by code; a sentence that is no code of this list is printed as it stands. */
export const notCoveredWords: Readonly<Record<string, string>> = {
  'loss-feedback':
    'Switching, recovery, leakage and core losses are booked but do not raise the currents of the stage.',
  'electromagnetic-noise':
    'Electromagnetic noise: no level is computed; only current slope and peak voltage are shown.',
  'ringing-loss': 'Loss and stress of ringing after the event, beyond the first overshoot.',
  'snappy-overshoot': 'Overshoot of an abrupt recovery beyond the exponential tail of the model.',
  'gate-loss': 'Gate drive losses of the switch and of a synchronous part.',
  'core-loss-assumed-zero': 'Core loss of the inductor: not given, counted as 0.',
  'core-loss-held':
    'Core loss of the inductor is held at its stated value along the axis; really it moves with frequency and ripple.',
  'stored-energy-assumed-zero': 'Output capacitance of the switch: not given, its energy is counted as 0.',
  'turn-off-assumed-zero': 'Turn-off loss of the switch: not given, counted as 0.',
  'snubber-assumed-zero': 'Snubber: none given, its loss is counted as 0.',
  'fixed-losses-assumed-zero': 'Control, bridge, fan and other fixed losses: not given, counted as 0.',
  'capacitor-losses': 'Losses of input and output capacitors, filters and wiring.',
  'line-bridge': 'The mains bridge, unless it stands in fixed_losses.',
  'transient-temperature': 'Temperatures during start-up, overload and surge; every temperature is a steady state.',
  'line-ripple-temperature': 'Temperature swing within a half cycle of the mains; the junction is taken at its mean.',
  'ac-resistance': 'Skin and proximity effect in the inductor; its resistance is taken as given.',
  lifetime: 'Wear, ageing and reliability of the parts.',
  price: 'Price is shown, never ranked by.',
}
