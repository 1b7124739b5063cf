import { useCallback, useState } from 'react'

export type Size = { width: number; height: number }

/** Size of an element in CSS px, kept up to date; give `ref` to the element. Null before it is measured. */
export function useSize(): { ref: (element: HTMLElement | null) => (() => void) | undefined; size: Size | null } {
  const [size, setSize] = useState<Size | null>(null)
  const ref = useCallback((element: HTMLElement | null) => {
    if (!element || typeof ResizeObserver !== 'function') return undefined
    const observer = new ResizeObserver(([entry]) => {
      if (entry) setSize({ width: entry.contentRect.width, height: entry.contentRect.height })
    })
    observer.observe(element)
    return () => observer.disconnect()
  }, [])
  return { ref, size }
}
