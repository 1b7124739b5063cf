/** Joins class names; whatever is falsy is left out. */
export function cn(...names: readonly (string | false | null | undefined)[]): string {
  return names.filter(Boolean).join(' ')
}
