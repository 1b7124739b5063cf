import type { z } from 'zod'
import { type ErrorCode, type Issue, errorEnvelopeSchema } from '#shared/api/errors.ts'

/** A refusal of the server, or no answer at all (`OFFLINE`). Screens choose their words by `code`; `message` is a plain sentence. */
export class ApiError extends Error {
  readonly code: ErrorCode | 'OFFLINE'
  readonly issues: readonly Issue[]
  readonly details: unknown

  constructor(code: ErrorCode | 'OFFLINE', message: string, issues: readonly Issue[] = [], details?: unknown) {
    super(message)
    this.name = 'ApiError'
    this.code = code
    this.issues = issues
    this.details = details
  }
}

type Request<Schema extends z.ZodType> = {
  method?: 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE'
  body?: unknown
  response: Schema
  signal?: AbortSignal
}

/** Calls `/api<path>` and parses the answer. @throws ApiError */
export async function api<Schema extends z.ZodType>(path: string, request: Request<Schema>): Promise<z.output<Schema>> {
  const answer = await send(path, request)
  const json: unknown = await answer.json().catch(() => undefined)
  if (answer.ok) return request.response.parse(json)
  throw refusal(json)
}

/** Calls `/api<path>` for a file. @throws ApiError */
export async function apiFile(path: string, request: Omit<Request<z.ZodType>, 'response'>): Promise<Blob> {
  const answer = await send(path, request)
  if (answer.ok) return answer.blob()
  throw refusal(await answer.json().catch(() => undefined))
}

async function send(path: string, request: Omit<Request<z.ZodType>, 'response'>): Promise<Response> {
  const form = request.body instanceof FormData ? request.body : undefined
  try {
    return await fetch(`/api${path}`, {
      method: request.method ?? 'GET',
      credentials: 'same-origin',
      ...(request.body === undefined || form ? {} : { headers: { 'content-type': 'application/json' } }),
      ...(request.body === undefined ? {} : { body: form ?? JSON.stringify(request.body) }),
      ...(request.signal ? { signal: request.signal } : {}),
    })
  } catch (error) {
    if (error instanceof DOMException && error.name === 'AbortError') throw error
    throw new ApiError(
      'OFFLINE',
      'Sconce cannot be reached. What you typed is still here; try again when you have a signal.',
    )
  }
}

function refusal(json: unknown): ApiError {
  const envelope = errorEnvelopeSchema.safeParse(json)
  if (!envelope.success)
    return new ApiError('INTERNAL', 'Sconce answered with something it should not. Nothing was changed; try again.')
  const { code, message, issues, details } = envelope.data.error
  return new ApiError(code, message, issues, details)
}
