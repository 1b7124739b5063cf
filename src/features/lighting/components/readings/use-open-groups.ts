import { useState } from 'react'
import type { OpenGroups } from './lines.tsx'

/** Which groups of readings are open; none to begin with. */
export function useOpenGroups(): OpenGroups {
  const [open, setOpen] = useState<ReadonlySet<string>>(new Set())
  return {
    open,
    toggle: (title) =>
      setOpen((before) => {
        const next = new Set(before)
        if (!next.delete(title)) next.add(title)
        return next
      }),
  }
}
