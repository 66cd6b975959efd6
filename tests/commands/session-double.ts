import type { Session } from '../../src/commands/session.ts'

/** A session that remembers what was said on each stream. */
export function recordingSession(): Session & { readonly printed: string[]; readonly told: string[] } {
  const printed: string[] = []
  const told: string[] = []
  return {
    root: new URL('../..', import.meta.url),
    version: '0.0.0',
    print: (text) => void printed.push(text),
    tell: (text) => void told.push(text),
    width: 100,
    colour: false,
    progress: () => {},
    printed,
    told,
  }
}

/** The message of what the work throws; a test fails where it throws nothing. */
export function messageOf(work: () => unknown): string {
  try {
    work()
  } catch (error) {
    return error instanceof Error ? error.message : String(error)
  }
  throw new Error('nothing was thrown')
}
