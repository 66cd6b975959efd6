import type { CaptureDocument } from '../../src/domain/capture.ts'
import type { CandidateResult, RankResult } from '../../src/domain/result.ts'
import type { SwapResult, TrendResult } from '../../src/domain/study.ts'
import type { CommandName } from './fuzz-case.ts'

/** What must hold in any result of a legal stage. Each broken law is told with its figures. */
export function brokenLaws(command: CommandName, document: unknown): readonly string[] {
  switch (command) {
    case 'rank':
      return lawsOfRank(document as RankResult)
    case 'swap':
      return lawsOfSwap(document as SwapResult)
    case 'trend':
      return lawsOfTrend(document as TrendResult)
    case 'reduce':
      return lawsOfCapture(document as CaptureDocument)
    default:
      return []
  }
}

function lawsOfRank(result: RankResult): readonly string[] {
  const ranks = result.candidates.flatMap(({ rank }) => rank ?? [])
  return [
    ...result.candidates.flatMap(lawsOfCandidate),
    ...told(
      'ranks are not 1, 2, 3 ...',
      ranks.some((rank, index) => rank !== index + 1),
      ranks,
    ),
    ...told('a worse part stands before a better one', !ascending(result.candidates), ranks),
    ...lawsOfOdds(result),
    ...lawsOfCautions(result),
    ...lawsOfVerdict(result),
  ]
}

function ascending(candidates: readonly CandidateResult[]): boolean {
  const losses = candidates.flatMap(({ rank, stage_loss_w }) => (rank === null ? [] : [stage_loss_w ?? Number.NaN]))
  return losses.every((loss, index) => index === 0 || loss >= losses[index - 1]!)
}

function lawsOfOdds({ candidates }: RankResult): readonly string[] {
  const sum = candidates.reduce((total, { odds_best }) => total + (odds_best ?? 0), 0)
  return told('odds add up to more than 1', sum > 1 + 1e-9, sum)
}

function lawsOfVerdict({ verdict, candidates }: RankResult): readonly string[] {
  const accepted = candidates.filter((candidate) => candidate.accepted).map(({ id }) => id)
  const named = [verdict.best, verdict.runner_up, ...verdict.tied].filter((id) => id !== null)
  return told(
    'the verdict names a rejected part',
    named.some((id) => !accepted.includes(id)),
    named,
  )
}

/** Anything above 60 V, and anything from the mains, carries the usual cautions. */
function lawsOfCautions({ stage, cautions }: Pick<RankResult, 'stage' | 'cautions'>): readonly string[] {
  const hazardous = stage.kind === 'mains-boost' || stage.blocking_v > 60 || stage.output_v > 60 || stage.input_v > 60
  return told(
    'a hazardous stage without cautions',
    hazardous && !cautions.some(({ code }) => code === 'qualified-persons'),
    stage.output_v,
  )
}

function lawsOfSwap(result: SwapResult): readonly string[] {
  const { from, to, difference_w } = result
  const difference =
    to.losses_w.total === null || from.losses_w.total === null ? null : to.losses_w.total - from.losses_w.total
  const off =
    difference !== null &&
    difference_w.total !== null &&
    !close(difference, difference_w.total, Math.abs(to.losses_w.total!))
  return [
    ...lawsOfCandidate(from),
    ...lawsOfCandidate(to),
    ...told('the difference is not that of the parts', off, difference_w),
    ...lawsOfCautions(result),
  ]
}

function lawsOfTrend(result: TrendResult): readonly string[] {
  const parts = result.points.flatMap(({ candidates }) => candidates)
  return [
    ...parts.flatMap((part) => [
      ...lawsOfLosses(part.id, part.losses_w),
      ...lawsOfEfficiency(part.id, part.efficiency),
    ]),
    ...lawsOfCautions(result),
  ]
}

function lawsOfCandidate(candidate: CandidateResult): readonly string[] {
  const { id, rank, accepted, reasons, thermal, interval_w: band, odds_best: odds, losses_w } = candidate
  return [
    ...lawsOfLosses(id, losses_w),
    ...lawsOfEfficiency(id, candidate.efficiency),
    ...lawsOfStageLoss(candidate),
    ...told(`${id}: a rank for a rejected part`, rank !== null && !accepted, rank),
    ...told(`${id}: accepted with reasons against it`, accepted && reasons.length > 0, reasons),
    ...told(`${id}: rejected without a reason`, !accepted && reasons.length === 0, null),
    ...told(
      `${id}: a temperature where there is none`,
      thermal === 'none' && candidate.junction_c !== null,
      candidate.junction_c,
    ),
    ...told(`${id}: odds for a rejected part`, !accepted && (odds ?? 0) > 0, odds),
    ...told(`${id}: odds outside 0 to 1`, odds !== null && (odds < 0 || odds > 1), odds),
    ...told(`${id}: the band is upside down`, band !== null && !(band.low <= band.high && band.low >= 0), band),
    ...told(`${id}: colder than absolute zero`, (candidate.junction_c ?? 0) < -273.15, candidate.junction_c),
    ...lawsOfPoint(candidate),
  ]
}

function lawsOfPoint({ id, point, event }: CandidateResult): readonly string[] {
  if (point === null) return []
  const negative =
    event === null
      ? []
      : Object.entries(event).filter(([, value]) => typeof value === 'number' && value < 0 && value > -1e300)
  return [
    ...told(`${id}: duty outside 0 to 1`, !(point.duty >= 0 && point.duty <= 1), point.duty),
    ...told(`${id}: valley above peak`, point.valley_a > point.peak_a * (1 + 1e-9), point),
    ...told(
      `${id}: a negative figure of the event`,
      negative.some(([key]) => !key.endsWith('_c') || key === 'qrr_c' || key === 'stored_c'),
      negative,
    ),
  ]
}

function lawsOfLosses(id: string, losses: CandidateResult['losses_w']): readonly string[] {
  const { total, ...rows } = losses
  const values = Object.values(rows)
  if (values.some((value) => value === null)) return told(`${id}: a total of incomplete rows`, total !== null, losses)
  const sum = values.reduce<number>((before, value) => before + value!, 0)
  return [
    ...told(
      `${id}: a negative loss`,
      values.some((value) => value! < 0),
      losses,
    ),
    ...told(`${id}: the ledger does not sum`, total === null || !close(sum, total, sum), losses),
  ]
}

/** What the choice costs the stage is the sum of what the document lists. */
function lawsOfStageLoss(candidate: CandidateResult): readonly string[] {
  const { id, losses_w, stage_loss_w: stageLoss, inductor_w, snubber_w, fixed_w } = candidate
  const { conduction_w, turn_on_base_w, turn_off_w, stored_w } = candidate.switch
  const rows = [losses_w.total, conduction_w, turn_on_base_w, turn_off_w, stored_w, inductor_w, snubber_w, fixed_w]
  if (stageLoss === null || rows.some((row) => row === null)) return []
  const sum = rows.reduce<number>((before, row) => before + row!, 0)
  return [
    ...told(
      `${id}: a negative loss beside the rectifier`,
      rows.some((row) => row! < 0),
      rows,
    ),
    ...told(`${id}: the stage's loss is not the sum of its rows`, !close(sum, stageLoss, sum), {
      sum,
      stageLoss,
      rows,
    }),
  ]
}

function lawsOfEfficiency(id: string, efficiency: number | null): readonly string[] {
  return told(
    `${id}: an efficiency outside 0 to 1`,
    efficiency !== null && !(efficiency >= 0 && efficiency <= 1),
    efficiency,
  )
}

function lawsOfCapture({ row, spread, recovery, charge_by_end }: CaptureDocument): readonly string[] {
  const figures = Object.entries(row).filter(
    ([key, value]) => typeof value === 'number' && value < 0 && key !== 'voltage_v',
  )
  return [
    ...told('a negative figure of a capture', recovery === 'measured' && figures.length > 0, figures),
    ...told(
      'a negative spread',
      Object.values(spread).some((value) => value < 0),
      spread,
    ),
    ...told(
      'a negative charge',
      charge_by_end.some(({ qrr_c }) => qrr_c < 0),
      charge_by_end,
    ),
  ]
}

function close(one: number, other: number, size: number): boolean {
  return Math.abs(one - other) <= 1e-9 * Math.abs(size) + 1e-300
}

function told(law: string, broken: boolean, figures: unknown): readonly string[] {
  return broken ? [`${law}: ${JSON.stringify(figures)?.slice(0, 300)}`] : []
}
