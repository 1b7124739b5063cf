import { useEffect } from 'react'
import { type FrameRenderer, createFrameRenderer } from './frame-renderer.ts'

/** With one core to spare or none a second worker only takes time from the page. */
const HANDS = typeof navigator === 'undefined' || navigator.hardwareConcurrency < 2 ? 1 : 2

/** One for all pictures of the page, so that they share what was computed and wait for each other. */
export const frameRenderer: FrameRenderer = createFrameRenderer({
  startWorker: () => new Worker(new URL('./frame-worker.ts', import.meta.url), { type: 'module' }),
  hands: HANDS,
  isSeen: () => document.visibilityState !== 'hidden',
  onSeen: (listener) => document.addEventListener('visibilitychange', listener),
})

/** The renderer, whose workers run as long as something on the screen shows pictures. */
export function useFrameRenderer(): FrameRenderer {
  useEffect(() => frameRenderer.hold(), [])
  return frameRenderer
}
