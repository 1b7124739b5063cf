import { useState } from 'react'

/** The latest value, except that it stays as it was while somebody holds something: nothing slides under a hand. */
export function useFrozen<T>(value: T, isHeld: boolean): T {
  const [frozen, setFrozen] = useState<{ value: T } | null>(null)
  if (isHeld && !frozen) setFrozen({ value })
  if (!isHeld && frozen) setFrozen(null)
  return frozen ? frozen.value : value
}
