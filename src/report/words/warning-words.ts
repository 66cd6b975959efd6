import type { CaveatCode } from '../../domain/caveat.ts'

/**
 * One sentence pattern per caveat: what is the matter, the numbers, what to do next (pattern language: sentence.ts).
 * The compiler refuses a code without wording. Every number is optional, so that a caveat raised with less still reads.
 */
export const warningWords: Readonly<Record<CaveatCode, string>> = {
  // evidence: the record against itself
  'row-impossible':
    'The figures of [{row}|a row] cannot all be right[: {found} against a bound of {bound}]. ' +
    'The row is used without the culprit; look it up again in its source.',
  'row-inconsistent':
    'In [{row}|a recovery row] one of trr, Qrr and I_RM is off by [{difference:%}|more than 15 %] from what the other two give; which one, the row cannot tell. ' +
    'All are used with more doubt; check the definition of trr and the conditions of the row.',
  'rows-contradict':
    '[{row} and {other}|Two rows] contradict each other[: they lie {distance:x} standard deviations apart]. ' +
    'The result is a compromise between them; find out which row is for this part and this condition.',
  'hot-below-cold':
    'Recovery at the higher junction temperature is below that at the lower one[ ({hot:C} at {hotAt:degC}, {cold:C} at {coldAt:degC})]. ' +
    'Stored charge grows with temperature: check whether the rows were swapped.',
  'maximum-below-typical':
    'A maximum figure is below the typical one[ of the same property ({property})][: {maximum} against {typical}]. Check the grades of the rows.',
  'charge-computed':
    'Qrr in [{row}|a recovery row] is trr times I_RM over 2 within rounding, so it was most likely computed and not measured. It is not counted as a third reading.',
  'implausible-for-class':
    '[{property}|A figure][ at {condition}][ in {row}] is far from what its class shows[ ({value} against {expected})]. ' +
    'Check the value, its unit and the class; the figure is used as it stands.',
  'row-condition-assumed':
    '[{row}|A recovery row] does not state its [{condition}|current or slope]: the rated current and 100 A/µs are assumed with 50 % error. ' +
    'Add the condition from the source.',
  'row-junction-assumed':
    '[{row}|A row] does not state its junction temperature: 25 °C is assumed. Add the temperature from the source.',
  'trr-definition-unknown':
    '[{row}|A recovery row] does not say how the end of trr was defined: the line through 90 % and 25 % is assumed with 15 % more doubt. ' +
    'Set trr_by from the source.',
  'typical-only':
    'Of [{property}|its main property] the record holds typical figures only, so the high figure rests on the assumed spread between parts. ' +
    'Ask the maker for a guaranteed maximum or measure several parts.',
  'maximum-only':
    'Of [{property}|a property] the record holds a guaranteed maximum only: the nominal figure is an estimated typical one[ ({factors} of the maximum)]. ' +
    'Measure one part before the difference to another is relied upon.',
  'recovery-guess':
    'The record says nothing about recovery: it is a guess from the class, and its interval is wide. ' +
    'Measure recovery[ near {current:A}, {slope:A/us}] or add a row from the data sheet.',
  'forward-guess':
    'The record says nothing about forward voltage: it is a guess from the class. Add a reading at the operating current, hot.',
  'leakage-assumed':
    'The record says nothing about leakage: the middle of its class is assumed[ ({leakage:A} at the point)], and runaway is judged by it. ' +
    'Add the maximum leakage, hot.',
  'capacitance-missing':
    'The record states no junction capacitance: the capacitive loss is counted as 0, which favours this part. Add a capacitance or its charge.',
  'capacitance-share':
    'The capacitive charge is [{share:%} of|a large part of] the recovery charge stated in [{row}|a row]. ' +
    'A charge that includes it moves less with current and temperature than assumed here.',
  'evidence-falls':
    'The rows make the charge fall with rising [{quantity}|current, slope or temperature], which stored charge does not do. ' +
    'Check the rows against each other; extrapolation beyond them is not to be trusted.',
  'softness-unknown':
    'Nothing in the record says how softly this part recovers. Look at its waveform for ringing before it is chosen.',
  snappy:
    'The part recovers abruptly[ (softness {softness})][ at {current:A}]: expect more overshoot and ringing than the model shows. ' +
    'Look at the waveform, at small current too, and plan room for a snubber.',
  'extrapolated-far':
    '[{figure}|The recovery] is read [{factor:x} times|far] beyond the nearest row[ ({row})]. ' +
    'Its interval carries that; a measurement near the operating point would narrow it.',
  'thermal-assumed':
    '[{what}|A thermal resistance] is not given and [{value:K/W} is assumed|a usual value is assumed]. Add it from the data sheet or the mounting.',
  // stage: the operating point
  'overshoot-not-included':
    'Loop inductance or capacitance of the part is not known, so the peak reverse voltage holds no overshoot: it is the blocking voltage alone. ' +
    'State loop_inductance and capacitance, or measure the peak, before the voltage margin is trusted.',
  'slope-limited':
    'The stated slope[ of {stated:A/us}] cannot be reached: voltage over loop inductance allows [{allowed:A/us}|less], which is used. ' +
    'Check the loop inductance or the slope.',
  'switch-saturates':
    'Load and reverse current together[ ({needed:A})] are more than the switch carries at its gate drive[ ({available:A})]: ' +
    'it saturates and turn-on lasts longer than computed. Raise the drive or lower the slope.',
  'peak-current-unchecked':
    'The reverse current peak[ of {peak:A}] is large against the current switched off[ ({current:A})]. Without gate data nobody checked ' +
    'whether the switch can carry it: state switch.gate or check its transfer curve.',
  'loop-energy':
    '[Energy in the loop inductance ({energy:J}) is not small against the recovery energy ({recovery:J})|' +
    'The loop inductance takes a good part of the voltage while the current rises]: the split between rectifier and ' +
    'switch shifts and rings. Take the sum of both as the firmer figure and shorten the loop.',
  'idle-too-short':
    'The idle time[ of {idle:s}] is shorter than the recovery needs[ ({needed:s})]: charge is left when the switch turns on, and its loss is counted. ' +
    'A faster part or a lower frequency ends it.',
  'mode-boundary':
    'The stage runs at the boundary of continuous conduction[ (valley {valley:A} of a mean {mean:A})]: a small change of load or inductance ' +
    'changes the current at turn-off. Check the neighbouring loads with a trend over load.',
  'recovery-share-of-interval':
    'Recovery takes [{share:%} of|a large part of] the [{interval}|switching interval][ ({time:s} of {available:s})]. ' +
    'Duty and ripple are affected beyond what is modelled; use a faster part or a lower frequency.',
  'forward-chord':
    'The forward rows do not give a curve that rises with current over the range used; a straight line is used instead. ' +
    'Add readings near the operating current.',
  'switch-temperature-assumed':
    "The switch's thermal path is not given: its on-resistance is taken at 100 °C. State switch.thermal to have it solved.",
  'switch-over-limit':
    'The switch reaches [{junction:degC}|a junction temperature above its limit][, above its limit of {limit:degC}]. ' +
    'Improve its cooling or choose another switch; the ranking of the rectifiers stands for this temperature only.',
  'turn-on-contains-recovery':
    'The measured turn-on energy holds the recovery of a rectifier that is not recorded: nothing is added to the switch, so all candidates ' +
    'look alike there. Name the rectifier of that measurement (turn_on.rectifier).',
  'turn-on-unknown':
    'It is not known whether the measured turn-on energy holds a recovery: the reading with the higher loss is used and both are drawn. ' +
    'Find out from the test circuit and set includes_rectifier.',
  'turn-on-floor':
    'Taking the test rectifier out of the measured turn-on energy leaves less than nothing[ ({given:J} less {contained:J})]; 0 is used. ' +
    "Check the energy, its condition and the test rectifier's record.",
  'turn-on-rectifier-missing':
    'The rectifier of the measured turn-on energy[ ({rectifier})] is not among the records, so its recovery stays inside. Add its record.',
  'incumbent-missing':
    '[The incumbent {excluded} is not among the candidates compared. Take it in to compare against the part in use.|' +
    'The incumbent {incumbent} has no record. Add its record to compare against the part in use.|' +
    'The incumbent is not among the candidates. Add its record to compare against the part in use.]',
  'negative-valley':
    'The inductor current is negative when the switch turns on[ ({valley:A})]: there is no hard recovery of this part in that interval. ' +
    'Check the ripple if that was not intended.',
  'implausible-stage':
    '[{path}|A value of the stage][ = {value}] is unusual[ (usual: {usual})]. It is used as it stands; check the number and its unit.',
  // decision
  'order-by-total-differs':
    "Ordered by the rectifier's own losses alone the ranking would be different[ ({order})]. It is ranked by what the choice costs the stage; " +
    'do not choose by the total column.',
  'order-differs-at-mains':
    'The order is different at [{mains:V}|another] mains[ ({order})]. The ranking is for nominal mains; decide for the mains that matters.',
  'order-differs-at-load':
    'The order is different at [{load:%}|another] load[ ({order})]. Compare the yearly energy before deciding by full load.',
  'thermal-lost':
    'In [{share:%}|some] of the draws the part has no stable temperature. Improve its cooling or treat it as unsafe at this point.',
  'table-rows-left-out':
    '[{leftOut} of {rows}|Some] rows of [{table}|a table] have cells that cannot be read and are left out[; {used} are used]. ' +
    'stderr names each cell; --strict refuses such a table.',
  'odds-beyond-list':
    'Odds are those against the [{drawn}|cheapest] cheapest acceptable parts; [{others:%}|some] of the draws go to parts beyond the list, ' +
    '[{last:%}|few] to the last [{batch}|ones] looked at. Costlier parts were not drawn.',
  'profile-unsettled':
    'At a load of the duty profile the part has no stable temperature, so no yearly energy is stated. Improve its cooling or take another part.',
}
