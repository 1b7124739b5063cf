import { createContext, use } from 'react'
import { type KitInput, kitInputSchema } from '#shared/domain/kit/schema.ts'

/** Sentences about what is wrong with an item, by the path of its field: `name`, `guideNumberM.value`, `zoom.0.focalMm`. */
export type KitIssues = ReadonlyMap<string, string>

export function issuesOf(input: KitInput): KitIssues {
  const issues = new Map<string, string>()
  for (const { path, message } of kitInputSchema.safeParse(input).error?.issues ?? []) {
    const own = path[0] === 'body' ? path.slice(2) : path
    const key = own.join('.')
    if (!issues.has(key)) issues.set(key, message)
  }
  return issues
}

export const KitIssuesContext = createContext<KitIssues>(new Map())

/** What is wrong with one field, or undefined. */
export function useKitIssue(path: string): string | undefined {
  return use(KitIssuesContext).get(path)
}
