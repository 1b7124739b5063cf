import { type FrameStage, frameStages } from '#shared/domain/lighting/frame-stages.ts'
import type { Orientation } from '#shared/domain/lighting/frame.ts'
import { readSetup } from '#shared/domain/lighting/readings.ts'
import { weightsOf } from '#shared/domain/lighting/test-frame/develop.ts'
import { developStages } from '#shared/domain/lighting/test-frame/develop-stages.ts'
import { type Wearing, sceneOf } from '#shared/domain/lighting/test-frame/scene-of.ts'
import type { Layers } from '#shared/domain/lighting/test-frame/render.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { askFor } from './frame-follower.ts'
import type { FrameAsk } from './frame-messages.ts'
import { type FrameRenderer, URGENCY } from './frame-renderer.ts'
import { blobOf, canvasOf } from './picture-blob.ts'

export type SheetFrame = { caption: string; blob: Blob }

function rendered(renderer: FrameRenderer, ask: FrameAsk): Promise<Layers> {
  const known = renderer.cache.find(ask)
  if (known) return Promise.resolve(known)
  return new Promise((resolve, reject) => {
    renderer.ask(ask, URGENCY.strip, { onDone: resolve, onFail: (sentence) => reject(new Error(sentence)) })
  })
}

const captionOf = ({ caption, reading }: FrameStage) => (reading === '' ? caption : `${caption} ${reading}`)

/** The strip's pictures as files, for the recipe sheet; computed first when they are not there yet. */
export async function framesForSheet(
  renderer: FrameRenderer,
  whole: WholeSetup,
  orientation: Orientation,
  wearing: Wearing,
): Promise<SheetFrame[]> {
  const release = renderer.hold()
  try {
    const stages = frameStages(whole, readSetup(whole))
    const layers = await rendered(renderer, askFor(sceneOf(whole, orientation, wearing), orientation, 'fine'))
    const order = stages.map((stage) => stage.light.id)
    const pictures = developStages(layers, weightsOf(whole.setup, whole.lights), order)
    const { width, height } = layers
    return await Promise.all(
      stages.flatMap((stage, index) => {
        const bytes = pictures[index]
        if (!bytes) return []
        const blob = blobOf(canvasOf({ width, height, bytes }), 'image/jpeg')
        return [blob.then((done): SheetFrame => ({ caption: captionOf(stage), blob: done }))]
      }),
    )
  } finally {
    release()
  }
}
