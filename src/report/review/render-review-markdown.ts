import type { ReviewResult } from '../../domain/review.ts'
import { escapeMarkdown, markdownTable } from '../render-markdown.ts'
import { reviewDocument } from './review-sections.ts'
import type { ReviewBlock, ReviewSection } from './review-types.ts'

/** The review document as Markdown: the same sections and complete tables; drawings stay in the HTML form. */
export function renderReviewMarkdown(review: ReviewResult): string {
  const { title, sections } = reviewDocument(review)
  const parts = [`# ${escapeMarkdown(title)}`, ...sections.flatMap(sectionParts)]
  return `${parts.join('\n\n')}\n`
}

function sectionParts({ title, blocks }: ReviewSection, index: number): string[] {
  return [`## ${index + 1} ${escapeMarkdown(title)}`, ...blocks.flatMap(blockParts)]
}

function blockParts(block: ReviewBlock): string[] {
  switch (block.kind) {
    case 'text':
      return [escapeMarkdown(block.text)]
    case 'facts':
      return [block.items.map(({ label, text }) => item(label, text)).join('\n')]
    case 'list':
      return [
        ...(block.heading === null ? [] : [`### ${escapeMarkdown(block.heading)}`]),
        block.items.map(({ lead, text }) => item(lead, text)).join('\n'),
      ]
    case 'table':
      return [
        `### ${escapeMarkdown(block.heading)}`,
        markdownTable(block.table),
        ...(block.note === null ? [] : [escapeMarkdown(block.note)]),
      ]
    case 'methods':
      return [
        block.items
          .map(({ name, equation, source, note }) => item(name, `${equation}. ${note} Source: ${source}.`))
          .join('\n'),
      ]
    case 'figure':
      return []
  }
}

function item(lead: string | null, text: string): string {
  return lead === null ? `- ${escapeMarkdown(text)}` : `- **${escapeMarkdown(lead)}:** ${escapeMarkdown(text)}`
}
