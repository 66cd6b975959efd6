import type { Stage } from '../domain/stage.ts'

/** Codes of what no figure contains (worded in report/words); the ones of the second list depend on the inputs. */
export function notCovered(stage: Stage): string[] {
  const always = [
    'loss-feedback',
    'electromagnetic-noise',
    'ringing-loss',
    'snappy-overshoot',
    'gate-loss',
    'capacitor-losses',
    'transient-temperature',
    'ac-resistance',
    'lifetime',
    'price',
  ]
  const when: readonly (readonly [boolean, string])[] = [
    [stage.inductor.coreLoss === 0, 'core-loss-assumed-zero'],
    [stage.switch.storedEnergy === 0, 'stored-energy-assumed-zero'],
    [stage.switch.turnOff === null, 'turn-off-assumed-zero'],
    [stage.snubberCapacitance === 0, 'snubber-assumed-zero'],
    [stage.fixedLosses === 0, 'fixed-losses-assumed-zero'],
    [stage.kind === 'mains-boost', 'line-bridge'],
    [stage.kind === 'mains-boost', 'line-ripple-temperature'],
  ]
  return [...always, ...when.filter(([applies]) => applies).map(([, code]) => code)]
}
