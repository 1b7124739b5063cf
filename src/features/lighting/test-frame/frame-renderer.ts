import { AMBIENT, type Layers } from '#shared/domain/lighting/test-frame/render.ts'
import { type FrameAsk, type FrameRequest, parseFrameAnswer } from './frame-messages.ts'
import { type LayerCache, createLayerCache } from './layer-cache.ts'

export type FrameWorker = Pick<Worker, 'postMessage' | 'addEventListener' | 'terminate'>

export type FrameListener = {
  /** Rows `from` … `to` − 1 of the picture are there now; the others are empty or from before. */
  onBand?: (layers: Layers, from: number, to: number) => void
  onDone: (layers: Layers) => void
  /** A plain sentence. */
  onFail: (sentence: string) => void
}

export type FrameRenderer = {
  cache: LayerCache
  /** Asks for a picture; gives back what takes the question back. Higher urgency first, then as asked. */
  ask: (ask: FrameAsk, urgency: number, listener: FrameListener) => () => void
  /** Somebody shows pictures; gives back what says that they do no longer. When nobody does, the workers end. */
  hold: () => () => void
  /** After a failure: workers are started anew by the next question. */
  tryAgain: () => void
}

/** How urgent pictures are: what follows a hand, what stands on the screen, what was opened, what lies in a list. */
export const URGENCY = { rough: 3, strip: 2, large: 1, card: 0 } as const

export const NO_FRAMES =
  'Test frames cannot be computed in this browser just now. Drawings and numbers are not affected.'

/** From one screen with pictures to the next, workers and what they know of the sitters stay, ms. */
const LINGER_MS = 1000

type Job = {
  id: number
  /** The picture with only the lights that are not known yet. */
  ask: FrameAsk
  whole: FrameAsk
  layers: Layers
  urgency: number
  bands: (readonly [from: number, to: number])[]
  /** Rows that are not computed yet. */
  open: number
  listener: FrameListener
}

type Hand = { worker: FrameWorker; jobId: number | null; isBusy: boolean }

/** Rows handed out at a time, as many as the renderer works on at once. */
const BAND_ROWS = 24

/** The rows about the eyes first: that is where people look. */
function bandsOf({ quality, height }: FrameAsk): Job['bands'] {
  // Two workers would both work out the sitter's body first, which takes as long as the rest of a rough picture.
  const rows = quality === 'rough' ? height : BAND_ROWS
  const bands = Array.from({ length: Math.ceil(height / rows) }, (_, index): Job['bands'][number] => [
    index * rows,
    Math.min(height, (index + 1) * rows),
  ])
  const fromEyes = ([from, to]: Job['bands'][number]) => Math.abs((from + to) / 2 - height / 3)
  return bands.sort((a, b) => fromEyes(a) - fromEyes(b))
}

type World = {
  startWorker: () => FrameWorker
  hands: number
  /** Whether somebody can see the page, and to be told when that changes. */
  isSeen: () => boolean
  onSeen: (listener: () => void) => void
}

/** Pictures computed beside the page: rows are handed out to workers one band at a time, so that anything can be dropped between. */
export function createFrameRenderer({ startWorker, hands: handCount, isSeen, onSeen }: World): FrameRenderer {
  const cache = createLayerCache()
  let hands: Hand[] = []
  let jobs: Job[] = []
  let holders = 0
  let lastId = 0
  let isBroken = false
  onSeen(pump)

  function end() {
    for (const hand of hands) hand.worker.terminate()
    hands = []
    jobs = []
  }
  function fail() {
    isBroken = true
    const failed = jobs
    end()
    for (const job of failed) job.listener.onFail(NO_FRAMES)
  }
  /** A worker that waits for work; another is started only for work there is. Null: all are busy, or none can start. */
  function idleHand(): Hand | null {
    const idle = hands.find((hand) => !hand.isBusy)
    if (idle || hands.length >= handCount) return idle ?? null
    try {
      const hand = started(startWorker())
      hands.push(hand)
      return hand
    } catch {
      return null
    }
  }
  function started(worker: FrameWorker): Hand {
    const hand: Hand = { worker, jobId: null, isBusy: false }
    worker.addEventListener('message', (event) => {
      if (hands.includes(hand)) answered(hand, 'data' in event ? event.data : null)
    })
    worker.addEventListener('error', () => {
      if (hands.includes(hand)) fail()
    })
    return hand
  }
  function answered(hand: Hand, data: unknown) {
    const answer = parseFrameAnswer(data)
    if (!answer) return
    if (answer.kind === 'failed') {
      fail()
      return
    }
    hand.isBusy = false
    const job = jobs.find((candidate) => candidate.id === answer.job)
    if (job) take(job, answer.from, answer.to, answer.layers)
    pump()
  }
  function take(job: Job, from: number, to: number, rows: readonly Float32Array[]) {
    const { ask, whole, layers, listener } = job
    const ids = [...ask.scene.emitters.map((emitter) => emitter.id), AMBIENT]
    ids.forEach((id, index) => {
      const band = rows[index]
      if (band) layers.layers[layers.ids.indexOf(id)]?.set(band, from * layers.width * 3)
    })
    job.open -= to - from
    listener.onBand?.(layers, from, to)
    if (job.open > 0) return
    jobs = jobs.filter((candidate) => candidate !== job)
    cache.put(whole, layers)
    listener.onDone(layers)
  }
  function pump() {
    if (!isSeen()) return
    for (;;) {
      const job = jobs.find((candidate) => candidate.bands.length > 0)
      if (!job) return
      const hand = isBroken ? null : idleHand()
      if (!hand) {
        if (hands.length === 0) fail()
        return
      }
      const band = job.bands.shift()
      if (!band) return
      if (hand.jobId !== job.id) post(hand, { kind: 'begin', job: job.id, ...job.ask })
      hand.jobId = job.id
      hand.isBusy = true
      post(hand, { kind: 'band', job: job.id, from: band[0], to: band[1] })
    }
  }
  function post(hand: Hand, request: FrameRequest) {
    hand.worker.postMessage(request)
  }

  return {
    cache,
    hold() {
      if (holders === 0) isBroken = false
      holders += 1
      return () => {
        holders -= 1
        if (holders > 0) return
        setTimeout(() => {
          if (holders === 0) end()
        }, LINGER_MS)
      }
    },
    tryAgain() {
      isBroken = false
    },
    ask(whole, urgency, listener) {
      const found = cache.find(whole)
      if (found) {
        let isWanted = true
        queueMicrotask(() => {
          if (isWanted) listener.onDone(found)
        })
        return () => {
          isWanted = false
        }
      }
      const known = cache.known(whole)
      const missing = whole.scene.emitters.filter((emitter) => !known.has(emitter.id))
      const ids = [...whole.scene.emitters.map((emitter) => emitter.id), AMBIENT]
      const job: Job = {
        id: ++lastId,
        ask: { ...whole, scene: { ...whole.scene, emitters: missing } },
        whole,
        layers: {
          width: whole.width,
          height: whole.height,
          ids,
          layers: ids.map(
            (id) => (id === AMBIENT ? null : known.get(id)) ?? new Float32Array(whole.width * whole.height * 3),
          ),
        },
        urgency,
        bands: bandsOf(whole),
        open: whole.height,
        listener,
      }
      jobs = [...jobs, job].sort((a, b) => b.urgency - a.urgency || a.id - b.id)
      pump()
      return () => {
        jobs = jobs.filter((candidate) => candidate !== job)
      }
    },
  }
}
