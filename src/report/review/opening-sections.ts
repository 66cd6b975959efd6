import type { CandidateResult } from '../../domain/result.ts'
import type { CurrentCheck, ReviewResult } from '../../domain/review.ts'
import { celsius, odds, quantity, withInterval } from '../format.ts'
import { numberColumn, tableOf, textColumn } from '../table-view.ts'
import type { Fact } from '../view-types.ts'
import { isHazardous } from '../words/caution-words.ts'
import { decisionSentences } from '../words/review-words.ts'
import { partColumns } from './nominal-tables.ts'
import { type ReviewSection, tableBlock } from './review-types.ts'

/** Reasons that leave a part without a junction temperature. */
const noTemperature: readonly string[] = ['no-stable-temperature', 'cannot-deliver', 'thermal-path-missing']

export function decisionSection({ rank }: ReviewResult): ReviewSection {
  const best = rank.candidates.find(({ id }) => id === rank.verdict.best)
  return {
    title: 'Decision',
    blocks: [
      { kind: 'text', text: decisionSentences(rank).join(' '), lead: true },
      ...(best === undefined ? [] : [{ kind: 'facts', items: bestFacts(best) } as const]),
    ],
  }
}

function bestFacts(best: CandidateResult): Fact[] {
  const { losses_w, interval_w } = best
  const total =
    losses_w.total === null ? '–' : withInterval(losses_w.total, interval_w?.low ?? null, interval_w?.high ?? null, 'W')
  return [
    { label: 'Cheapest part', text: best.title === null ? best.id : `${best.id} (${best.title})` },
    { label: 'Stage loss', text: quantity(best.stage_loss_w, 'W') },
    { label: 'Of it caused by the rectifier', text: total },
    { label: 'Efficiency', text: best.efficiency === null ? '–' : `${(best.efficiency * 100).toFixed(2)} %` },
    { label: 'Odds of being cheapest', text: best.odds_best === null ? 'not computed' : odds(best.odds_best) },
    {
      label: 'Evidence grade',
      text: `${best.evidence} (${best.evidence_because ?? 'A: rows at the operating point; D: class guess'})`,
    },
  ]
}

export function cautionsSection({ rank }: ReviewResult): ReviewSection {
  const items = rank.cautions.map(({ code, text }) => ({ lead: code, text }))
  const list = { kind: 'list', heading: null, tone: 'caution', items } as const
  return { title: 'Cautions', blocks: isHazardous(rank.cautions) ? [list] : [belowLimits, list] }
}

const belowLimits = {
  kind: 'text',
  text: 'No computed voltage of this stage, overshoot at its rectifiers included, is above 60 V dc or 42.4 V peak, and it is not fed from the mains.',
} as const

export function scopeSection(review: ReviewResult): ReviewSection {
  const { rank, limits } = review
  const { stage } = rank
  const junction =
    limits.junction_c === null
      ? 'the rating in the record'
      : `${celsius(limits.junction_c)} or the rating in the record, whichever is lower`
  const use = `${(limits.voltage_use * 100).toFixed(0)} %`
  return {
    title: 'Scope and limits',
    blocks: [
      {
        kind: 'facts',
        items: [
          { label: 'Stage', text: stage.title === '' ? stage.kind : `${stage.title} (${stage.kind})` },
          { label: 'Compared', text: `${rank.candidates.length} rectifiers, ranked by what each costs the stage` },
          { label: 'Event model', text: stage.loss_model },
          {
            label: 'Typical and high',
            text: `Single figures are nominal. Low and high hold 90 % of ${rank.draws} draws (seed ${rank.seed}) over what rows, classes and the bench leave open; high is the 95th percentile.`,
          },
          {
            label: 'Tracing a number',
            text: 'Results and their equations: section 5 and section 14. Which row each was moved from, how far and by what factor: section 13, with every input and its source. What would change the decision: section 12.',
          },
          ...(stage.assumed.length === 0
            ? []
            : [
                {
                  label: 'Assumed, not given',
                  text: stage.assumed.map(({ path, value }) => `${path} ${value}`).join('; '),
                },
              ]),
        ],
      },
      {
        kind: 'list',
        heading: 'A part passes when all of these hold',
        tone: 'plain',
        items: [
          {
            lead: 'Voltage',
            text: `peak reverse voltage with overshoot at most ${use} of the rating, at the highest input.`,
          },
          { lead: 'Current', text: 'mean rectifier current at most the rating times the parts in parallel.' },
          { lead: 'Junction', text: `at most ${junction}.` },
          { lead: 'Stability', text: 'a stable junction temperature, at expected and at maximum leakage.' },
          { lead: 'Interval', text: 'recovery ends within the on-time of the switch.' },
        ],
      },
      passTable(review),
    ],
  }
}

function passTable({ rank, currents, limits }: ReviewResult) {
  const check = ({ id }: CandidateResult): CurrentCheck | undefined => currents.find((each) => each.id === id)
  const verdict = (row: CandidateResult, ...codes: readonly string[]) => {
    if (row.reasons.some(({ code }) => codes.includes(code))) return 'fails'
    return row.thermal === 'none' ? 'not judged' : 'passes'
  }
  return tableBlock(
    'Pass or fail',
    tableOf(
      [
        ...partColumns,
        numberColumn<CandidateResult>('peak reverse', 'V', 'v', ({ event }) => event?.peak_reverse_v ?? null, {
          decimals: 0,
        }),
        numberColumn<CandidateResult>(
          'allowed',
          'V',
          'v',
          (row) => {
            const rating = check(row)?.reverse_voltage_v
            return rating === undefined ? null : rating * limits.voltage_use
          },
          { decimals: 0 },
        ),
        textColumn<CandidateResult>('voltage', 'v', (row) => verdict(row, 'voltage-margin')),
        numberColumn<CandidateResult>('mean current', 'A', 'i', (row) => check(row)?.mean_a ?? null),
        numberColumn<CandidateResult>('allowed', 'A', 'i', (row) => check(row)?.limit_a ?? null),
        textColumn<CandidateResult>('current', 'i', (row) => verdict(row, 'average-current')),
        textColumn<CandidateResult>('junction', 't', (row) =>
          row.reasons.some(({ code }) => noTemperature.includes(code)) ? 'fails' : verdict(row, 'junction-over-limit'),
        ),
        textColumn<CandidateResult>('maximum leakage', 't', (row) => verdict(row, 'runaway-at-maximum-leakage')),
        textColumn<CandidateResult>('interval', 'e', (row) => verdict(row, 'recovery-too-slow')),
      ],
      rank.candidates,
    ),
  )
}
