/** Why a part is rejected: the codes of `reasons`, each with the unit of its `value` and `limit` and its sentence. */
export const reasonCodes = [
  'voltage-margin',
  'average-current',
  'junction-over-limit',
  'no-stable-temperature',
  'runaway-at-maximum-leakage',
  'recovery-too-slow',
  'thermal-path-missing',
  'cannot-deliver',
] as const

export type ReasonCode = (typeof reasonCodes)[number]

export const reasonWords: Readonly<Record<ReasonCode, string>> = {
  'voltage-margin':
    'Peak reverse voltage [{value:V}|with overshoot] is above what the voltage rule allows[ ({limit:V})]: ' +
    'take a part with a higher rating, or shorten the loop.',
  'average-current':
    'The mean current[ of {value:A}] is above the rating[ of {limit:A}]: take a larger part or put parts in parallel.',
  'junction-over-limit':
    'The junction reaches [{value:C_}|more than its limit][, above the limit of {limit:C_}]: improve the cooling or take a part with less loss.',
  'no-stable-temperature':
    'No stable junction temperature exists[ at {value:V} input]: loss rises faster with temperature than heat leaves. ' +
    'Improve the cooling or take another part; no loss is stated because none would hold.',
  'runaway-at-maximum-leakage':
    'A part at the upper end of leakage runs away[: the surroundings are at {value:C_}, and {limit:C_} is the edge]. ' +
    'Improve the cooling, or take a higher voltage rating or another class.',
  'recovery-too-slow':
    'Recovery needs [at least {value:s}|longer] and does not fit its interval[ of {limit:s}]: its loss is a lower bound. ' +
    'Take a faster part or a lower frequency.',
  'thermal-path-missing':
    'The record gives no thermal resistance that this cooling can be reckoned with: add junction_to_case or junction_to_ambient.',
  'cannot-deliver':
    'The stage cannot deliver its power with this part[ at {value:V} input]: check the output, the resistances and the input. ' +
    'No loss is stated because no operating point exists.',
}

/** The same in a few words, for counts of many parts. */
export const shortReasons: Readonly<Record<ReasonCode, string>> = {
  'voltage-margin': 'too little voltage margin',
  'average-current': 'mean current above the rating',
  'junction-over-limit': 'junction above its limit',
  'no-stable-temperature': 'no stable junction temperature',
  'runaway-at-maximum-leakage': 'runs away at the upper end of leakage',
  'recovery-too-slow': 'recovery does not fit its interval',
  'thermal-path-missing': 'no thermal path for this cooling',
  'cannot-deliver': 'the stage cannot deliver its power',
}
