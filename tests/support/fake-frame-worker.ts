import {
  type BandRequest,
  type FrameAnswer,
  type FrameRequest,
  parseFrameRequest,
} from '#src/features/lighting/test-frame/frame-messages.ts'
import type { FrameWorker } from '#src/features/lighting/test-frame/frame-renderer.ts'

type Begun = Extract<FrameRequest, { kind: 'begin' }>
type Hand = { begun: Begun | null; waiting: BandRequest[]; say: (name: 'message' | 'error', data?: unknown) => void }

/** Workers that answer when told to: every value of a row is the row's number. */
export function fakeHands() {
  const hands: Hand[] = []
  const begun: Begun[] = []
  const bands: [number, number][] = []
  let ended = 0
  let refuses = false

  function start(): FrameWorker {
    if (refuses) throw new Error('no workers here')
    const listeners = new Map<string, ((event: Event) => void)[]>()
    const hand: Hand = {
      begun: null,
      waiting: [],
      say(name, data) {
        const event = name === 'message' ? new MessageEvent(name, { data }) : new Event(name)
        for (const listener of listeners.get(name) ?? []) listener(event)
      },
    }
    hands.push(hand)
    return {
      postMessage(message: unknown) {
        const request = parseFrameRequest(message)
        if (request?.kind === 'begin') {
          hand.begun = request
          begun.push(request)
        } else if (request) {
          hand.waiting.push(request)
          bands.push([request.from, request.to])
        }
      },
      addEventListener(name: string, listener: unknown) {
        if (typeof listener !== 'function') return
        listeners.set(name, [...(listeners.get(name) ?? []), (event) => void listener(event)])
      },
      terminate() {
        ended += 1
        hand.waiting = []
      },
    }
  }
  /** One band of the first worker that has one; false when there is none. */
  function work(): boolean {
    const hand = hands.find((candidate) => candidate.waiting.length > 0)
    const band = hand?.waiting.shift()
    if (!hand?.begun || !band) return false
    const { scene, width } = hand.begun
    const rowValues = Float32Array.from(
      { length: (band.to - band.from) * width * 3 },
      (_, index) => band.from + Math.floor(index / (width * 3)),
    )
    const layers = [...scene.emitters.map(() => rowValues), rowValues]
    const answer: FrameAnswer = { ...band, kind: 'band', layers }
    hand.say('message', answer)
    return true
  }
  return {
    start,
    work,
    workAll() {
      while (work());
    },
    begun: () => begun,
    bands: () => bands,
    ended: () => ended,
    refuse(next: boolean) {
      refuses = next
    },
    breakDown: () => hands.at(-1)?.say('error'),
    failNext() {
      const band = hands.at(-1)?.waiting.shift()
      if (band) hands.at(-1)?.say('message', { kind: 'failed', job: band.job, why: 'of memory' })
    },
  }
}
