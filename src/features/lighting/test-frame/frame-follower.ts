import { type Orientation } from '#shared/domain/lighting/frame.ts'
import { ROUGH_PIXELS, STRIP_PIXELS, pictureSize } from '#shared/domain/lighting/test-frame/picture-size.ts'
import type { Layers, Quality } from '#shared/domain/lighting/test-frame/render.ts'
import type { Scene } from '#shared/domain/lighting/test-frame/scene.ts'
import type { FrameAsk } from './frame-messages.ts'
import { type FrameRenderer, URGENCY } from './frame-renderer.ts'
import { frameText } from './layer-cache.ts'

export type FollowedFrame = {
  /** The newest picture there is; null: none yet. While something moves it may be of a moment ago. */
  layers: Layers | null
  /** Whether it is the fine one of what was asked last. */
  isFine: boolean
  failure: string | null
}

/** A picture that follows a scene: rough while it changes, fine once it rests. */
export type FrameFollower = {
  follow: (scene: Scene, orientation: Orientation) => void
  snapshot: () => FollowedFrame
  subscribe: (listener: () => void) => () => void
  tryAgain: () => void
  stop: () => void
}

/** Rough pictures begin no closer together than this; a hand that rests for so long is done, ms. */
const ROUGH_EVERY_MS = 80
const REST_MS = 250

export function askFor(scene: Scene, orientation: Orientation, quality: Quality): FrameAsk {
  return { scene, quality, ...pictureSize(orientation, quality === 'rough' ? ROUGH_PIXELS : STRIP_PIXELS) }
}

/** The scene apart from how wide the lens is open, which at this size is hardly seen. */
const withoutLens = (ask: FrameAsk) => frameText({ ...ask, scene: { ...ask.scene, lens: { openingM: 0, focusM: 0 } } })

type Wanted = { text: string; withoutLens: string; rough: FrameAsk; fine: FrameAsk }

export function createFrameFollower(renderer: FrameRenderer, nowMs: () => number): FrameFollower {
  const listeners = new Set<() => void>()
  let state: FollowedFrame = { layers: null, isFine: false, failure: null }
  let wanted: Wanted | null = null
  let roughTimer: ReturnType<typeof setTimeout> | undefined
  let fineTimer: ReturnType<typeof setTimeout> | undefined
  let roughAtMs = -Infinity
  /** What of the rough picture is under way; a newer one waits for it, so that something is always shown. */
  let takeBackRough: (() => void) | null = null
  let takeBackFine: (() => void) | null = null
  /** The very first picture: its fine one is begun when the rough one is there, so that nothing holds that up. */
  let isFineNext = false

  function show(next: Partial<FollowedFrame>) {
    state = { ...state, ...next }
    for (const listener of listeners) listener()
  }
  const onFail = (sentence: string) => {
    takeBackRough = null
    takeBackFine = null
    show({ failure: sentence })
  }

  function startRough() {
    roughTimer = undefined
    if (!wanted || takeBackRough) return
    const own = wanted
    roughAtMs = nowMs()
    takeBackRough = renderer.ask(own.rough, URGENCY.rough, {
      onDone(layers) {
        takeBackRough = null
        if (!(state.isFine && wanted === own)) show({ layers, isFine: false, failure: null })
        if (wanted !== own) planRough()
        else if (isFineNext) startFine()
      },
      onFail,
    })
  }
  function planRough() {
    if (!wanted || roughTimer !== undefined || takeBackRough) return
    const known = renderer.cache.find(wanted.rough)
    if (known) {
      if (!state.isFine) show({ layers: known })
      return
    }
    roughTimer = setTimeout(startRough, Math.max(0, roughAtMs + ROUGH_EVERY_MS - nowMs()))
  }
  function startFine() {
    isFineNext = false
    if (!wanted) return
    const own = wanted
    takeBackFine = renderer.ask(own.fine, URGENCY.strip, {
      onDone(layers) {
        takeBackFine = null
        if (wanted === own) show({ layers, isFine: true, failure: null })
      },
      onFail,
    })
  }
  function leaveFine() {
    isFineNext = false
    clearTimeout(fineTimer)
    takeBackFine?.()
    takeBackFine = null
  }

  return {
    follow(scene, orientation) {
      const fine = askFor(scene, orientation, 'fine')
      const text = frameText(fine)
      if (wanted?.text === text) return
      const before = wanted
      wanted = { text, withoutLens: withoutLens(fine), rough: askFor(scene, orientation, 'rough'), fine }
      leaveFine()
      const known = renderer.cache.find(fine)
      if (known) {
        clearTimeout(roughTimer)
        roughTimer = undefined
        show({ layers: known, isFine: true })
        return
      }
      const isOnlyLens = before?.withoutLens === wanted.withoutLens && state.layers !== null
      if (state.isFine) state = { ...state, isFine: false }
      if (!isOnlyLens) planRough()
      if (before) fineTimer = setTimeout(startFine, REST_MS)
      else if (roughTimer === undefined) startFine()
      else isFineNext = true
    },
    snapshot: () => state,
    subscribe(listener) {
      listeners.add(listener)
      return () => listeners.delete(listener)
    },
    tryAgain() {
      renderer.tryAgain()
      show({ failure: null })
      planRough()
      leaveFine()
      startFine()
    },
    stop() {
      clearTimeout(roughTimer)
      roughTimer = undefined
      leaveFine()
      takeBackRough?.()
      takeBackRough = null
      wanted = null
    },
  }
}
