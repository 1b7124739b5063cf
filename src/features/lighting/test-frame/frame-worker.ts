import { type Layers, emptyLayers, renderRows } from '#shared/domain/lighting/test-frame/render.ts'
import { FINE, ROUGH, type Stage } from '#shared/domain/lighting/test-frame/stage.ts'
import { type StageStore, stageAgain } from '#shared/domain/lighting/test-frame/stage-again.ts'
import { type BandRequest, type FrameAnswer, type FrameAsk, parseFrameRequest } from './frame-messages.ts'

type Job = { job: number; ask: FrameAsk; into: Layers; stage: Stage }

const stages: StageStore = new Map()
let current: Job | null = null

self.addEventListener('message', ({ data }: MessageEvent<unknown>) => {
  const request = parseFrameRequest(data)
  if (!request) return
  try {
    if (request.kind === 'begin') current = begun(request)
    else if (current?.job === request.job) band(current, request)
  } catch (error) {
    post({ kind: 'failed', job: request.job, why: error instanceof Error ? error.message : String(error) }, [])
  }
})

function begun({ job, scene, width, height, quality }: { job: number } & FrameAsk): Job {
  return {
    job,
    ask: { scene, width, height, quality },
    into: emptyLayers(scene, width, height),
    stage: stageAgain(scene, quality === 'rough' ? ROUGH : FINE, stages),
  }
}

function band({ job, ask, into, stage }: Job, { from, to }: BandRequest): void {
  const rows = renderRows(ask.scene, ask.quality, into, from, to, stage)
  while (rows.next().done !== true);
  const layers = into.layers.map((layer) => layer.slice(from * ask.width * 3, to * ask.width * 3))
  post(
    { kind: 'band', job, from, to, layers },
    layers.map((layer) => layer.buffer),
  )
}

function post(answer: FrameAnswer, transfer: Transferable[]): void {
  self.postMessage(answer, { transfer })
}
