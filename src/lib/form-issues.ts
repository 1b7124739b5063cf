import type { FieldValues, Path, UseFormSetError } from 'react-hook-form'
import { ApiError } from './api.ts'

/** Puts a refusal's issues to their fields; returns the sentence for the form as a whole. */
export function showIssues<Values extends FieldValues>(
  error: unknown,
  setError: UseFormSetError<Values>,
  fields: readonly Path<Values>[],
): string {
  if (!(error instanceof ApiError)) return 'Something on this page went wrong. What you typed is still here; try again.'
  for (const issue of error.issues) {
    const field = fields.find((name) => name === issue.path)
    if (field !== undefined) setError(field, { message: sentence(issue.message) })
  }
  return error.message
}

/** Schemas speak in the middle of a sentence; a form begins one. */
export function sentence(words: string): string {
  return words.charAt(0).toUpperCase() + words.slice(1)
}
