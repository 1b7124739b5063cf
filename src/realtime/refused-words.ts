import { REFUSALS, type Refusal } from '#shared/realtime/protocol.ts'

/** Why the server does not take a change, in a sentence. */
export const REFUSED_WORDS: Readonly<Record<Refusal, string>> = {
  'read-only': 'Your role may read this, not change it.',
  'too-large': 'The last change is too large for one step.',
  full: 'This document is full.',
  invalid: 'The last change could not be read.',
  frozen: 'This document is locked for repair. What you did is kept on this device and sent afterwards.',
  'database-down': 'The database cannot be reached just now.',
}

/** The sentence for what a server says, which may be newer than this page. */
export function refusedWords(reason: string): string {
  const known = REFUSALS.find((one) => one === reason)
  return known ? REFUSED_WORDS[known] : 'The server did not take the last change.'
}
