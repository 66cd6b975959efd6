import type { DutyPoint, Stage } from '../domain/stage.ts'
import type { SwapLoad } from '../domain/study.ts'
import type { Candidate } from './candidate.ts'
import { runProfile } from './duty-profile.ts'

/** Loads shown where the stage has no duty profile. */
const usualLoads = [0.1, 0.25, 0.5, 0.75, 1]
/** Longer profiles are summed, not listed. */
const mostListed = 24

/** Efficiency with either part and the saving, at every load of the profile or at usual loads. */
export function swapLoads(stage: Stage, from: Candidate, to: Candidate): SwapLoad[] {
  const profile = stage.dutyProfile
  const listed = profile !== null && profile.length <= mostListed
  const loads: readonly DutyPoint[] = listed
    ? profile
    : usualLoads.map((load) => ({ load, hours: 0, ambient: null, input: null }))
  const before = runProfile(from, loads).losses
  const after = runProfile(to, loads).losses
  return loads.map(({ load, hours }, k) => {
    const output = stage.output.voltage * stage.output.current * load
    const efficiency = (loss: number | null): number | null =>
      loss === null || output === 0 ? null : output / (output + loss)
    const [old, fresh] = [before[k]!, after[k]!]
    return {
      load,
      hours: listed ? hours : null,
      from_efficiency: efficiency(old),
      to_efficiency: efficiency(fresh),
      saves_w: old === null || fresh === null ? null : old - fresh,
    }
  })
}
