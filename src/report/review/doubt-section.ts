import type { ReviewResult } from '../../domain/review.ts'
import { significant } from '../format.ts'
import { numberColumn, tableOf, textColumn } from '../table-view.ts'
import { measureWords } from '../words/verdict-words.ts'
import { type ReviewBlock, type ReviewSection, tableBlock } from './review-types.ts'

export function doubtSection({ rank: { verdict } }: ReviewResult): ReviewSection {
  const shares = verdict.sensitivity ?? []
  const next = verdict.measure_next ?? []
  const blocks: ReviewBlock[] = []
  if (shares.length === 0)
    blocks.push({ kind: 'text', text: 'There is no gap between two acceptable parts whose doubt could be divided.' })
  else
    blocks.push(
      tableBlock(
        'Share of the variance of the gap between best and next',
        tableOf(
          [
            numberColumn('order', '', 'key', ({ order }: Ordered) => order, { decimals: 0 }),
            textColumn('input', 'key', ({ input }: Ordered) => inputWords(input), true),
            numberColumn('share', '%', 'share', ({ share }: Ordered) => share, { scale: 100, decimals: 1 }),
          ],
          shares.map((each, index) => ({ ...each, order: index + 1 })),
        ),
        { note: 'What would change the decision, the strongest first.' },
      ),
    )
  if (next.length > 0)
    blocks.push({
      kind: 'list',
      heading: 'What to measure next',
      tone: 'plain',
      items: next.map((each) => ({ lead: null, text: `${capital(measureWords(each))}.` })),
    })
  const { gap_w: gap, gap_low_w: low, gap_high_w: high } = verdict
  if (gap !== null && low !== null && high !== null)
    blocks.push({
      kind: 'text',
      text: `The gap between the two cheapest parts is ${significant(gap)} W; 90 % of the draws lie between ${significant(low)} W and ${significant(high)} W.`,
    })
  return { title: 'Sensitivity and what to measure next', blocks }
}

interface Ordered {
  readonly order: number
  readonly input: string
  readonly share: number
}

function inputWords(input: string): string {
  return sharedInputs[input] ?? input.replace(/^forward of /, 'forward voltage of ')
}

const sharedInputs: Readonly<Record<string, string>> = {
  slope: 'current slope of the stage',
  voltage_fall: 'voltage fall time of the switch',
  thermal: 'thermal resistances',
  turn_on: 'what the measured turn-on energy contains',
}

function capital(text: string): string {
  return `${text.charAt(0).toUpperCase()}${text.slice(1)}`
}
