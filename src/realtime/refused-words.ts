import { REFUSALS, type Refusal } from '#shared/realtime/protocol.ts'

/** Why the server does not take a change, in a sentence. */
export const REFUSED_WORDS: Readonly<Record<Refusal, string>> = {
  'read-only': 'Your role may read this, not change it.',
  'too-large':
    'The last change is too large for one step. It is kept on this device; undo it, and do it in smaller ones.',
  full: 'This document is full. What you did is kept on this device; take something out to make room.',
  invalid:
    'The server could not read the last change. It is kept on this device; load the page again, and undo it if this stays.',
  frozen: 'This document is locked for repair. What you did is kept on this device and sent afterwards.',
  'database-down':
    'The database cannot be reached just now. What you did is kept on this device and stored as soon as it can.',
}

/** The sentence for what a server says, which may be newer than this page. */
export function refusedWords(reason: string): string {
  const known = REFUSALS.find((one) => one === reason)
  return known
    ? REFUSED_WORDS[known]
    : 'The server did not take the last change. It is kept on this device; load the page again.'
}
