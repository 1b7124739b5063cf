import { useState } from 'react'

/** The same value as long as it says the same, so that what is computed from it stays. */
export function useSteady<T>(value: T, text: string): T {
  const [kept, setKept] = useState({ value, text })
  if (kept.text === text) return kept.value
  setKept({ value, text })
  return value
}
