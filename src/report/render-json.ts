/**
 * A document as JSON: two spaces, one trailing newline, keys in the order of the document.
 * Characters that could steer a terminal or hide text are written as \u escapes, which every JSON reader turns back.
 */
export function renderJson(document: unknown): string {
  return `${JSON.stringify(document, null, 2).replace(steering, escaped)}\n`
}

const steering = /[\u007F-\u009F\u061C\u200E\u200F\u2028-\u202E\u2066-\u2069\uFEFF\uFFF9-\uFFFB]/g

function escaped(character: string): string {
  return `\\u${character.charCodeAt(0).toString(16).padStart(4, '0')}`
}
