import { type RefObject, useLayoutEffect, useSyncExternalStore } from 'react'
import type { Box } from '#shared/domain/board/schema.ts'
import type { Store } from '#src/realtime/store.ts'
import { useWall } from './wall-control.ts'

/** A store's value; with `pick`, the part that matters, so that other changes draw nothing. */
export function useStore<T>(store: Store<T>): T
export function useStore<T, Part>(store: Store<T>, pick: (value: T) => Part): Part
export function useStore<T, Part>(store: Store<T>, pick?: (value: T) => Part): T | Part {
  return useSyncExternalStore(store.subscribe, () => (pick ? pick(store.get()) : store.get()))
}

export function useIsSelected(id: string): boolean {
  return useStore(useWall().state.selection, (selection) => selection.has(id))
}

/**
 * Keeps an element at a box of the wall without drawing anything again: where the document has it, or where a hand
 * (one's own before others') holds it at this moment.
 */
export function useHangsAt(ref: RefObject<HTMLElement | null>, id: string, box: Box): void {
  const { own, remote } = useWall().state
  useLayoutEffect(() => {
    const apply = () => {
      const element = ref.current
      if (!element) return
      const held = own.get(id)
      const [x, y, w, h] = held ?? remote.get(id) ?? box
      element.style.transform = `translate(${x}px, ${y}px)`
      element.style.width = `${w}px`
      // Captions and tags may grow below their box.
      element.style.minHeight = `${h}px`
      element.style.setProperty('--box-h', `${h}px`)
      element.toggleAttribute('data-held', held !== undefined)
    }
    apply()
    const stops = [own.subscribe(id, apply), remote.subscribe(id, apply)]
    return () => {
      for (const stop of stops) stop()
    }
  }, [ref, id, box, own, remote])
}
