import type { ErrorCode, Issue } from '#shared/api/errors.ts'

/** The only error that reaches a person: a code, a plain sentence, and what a screen may show beside it. */
export class AppError extends Error {
  readonly code: ErrorCode
  readonly issues: Issue[] | undefined
  readonly details: unknown

  constructor(code: ErrorCode, message: string, more: { issues?: Issue[]; details?: unknown; cause?: unknown } = {}) {
    super(message, { cause: more.cause })
    this.name = 'AppError'
    this.code = code
    this.issues = more.issues
    this.details = more.details
  }
}

export const STATUS: Readonly<Record<ErrorCode, number>> = {
  BAD_REQUEST: 400,
  NOT_JSON: 400,
  SIGNED_OUT: 401,
  WRONG_ORIGIN: 403,
  FORBIDDEN: 403,
  NOT_FOUND: 404,
  CONFLICT: 409,
  GONE: 410,
  TOO_LARGE: 413,
  UNSUPPORTED: 415,
  TOO_MANY: 429,
  STARTING: 503,
  INTERNAL: 500,
}
