import { z } from 'zod'

/** Replaces lone surrogates, which would make every later sync of a document throw, with U+FFFD. */
export function wellFormed(text: string): string {
  return text.replace(/[\uD800-\uDBFF](?![\uDC00-\uDFFF])|(?<![\uD800-\uDBFF])[\uDC00-\uDFFF]/g, '\uFFFD')
}

/** One line of text, trimmed, at least one character, at most `max` UTF-16 units. */
export const lineSchema = (max = 120) => z.string().trim().min(1).max(max).transform(wellFormed)

/** Text that may be empty, at most `max` UTF-16 units; line breaks kept. */
export const proseSchema = (max = 4000) => z.string().max(max).transform(wellFormed)

/** `#rrggbb`, sRGB. */
export const colourSchema = z.string().regex(/^#[0-9a-f]{6}$/i, 'a colour is # and six hexadecimal digits')

/** A civil date without a zone, `YYYY-MM-DD`. */
export const civilDateSchema = z.iso.date()

/** Minutes since midnight of the shoot's civil day; past midnight goes on above 1440. */
export const clockMinSchema = z.number().int().min(0).max(2880)
