import { wellFormed } from '#shared/domain/text.ts'
import { AppError } from '#server/errors.ts'

const MAX_NAME = 80

/** A person's name on one line without control characters. @throws BAD_REQUEST when nothing is left or it is too long. */
export function personName(raw: string): string {
  const name = wellFormed(raw)
    .replace(/[\p{Cc}\p{Cf}\s]+/gu, ' ')
    .trim()
  if (name === '' || name.length > MAX_NAME) {
    const message = name === '' ? 'say what we call you' : `a name has at most ${MAX_NAME} characters`
    throw new AppError('BAD_REQUEST', 'The name does not fit. Nothing was changed.', {
      issues: [{ path: 'name', message }],
    })
  }
  return name
}
