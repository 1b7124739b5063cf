import { useEffect, useMemo, useState } from 'react'
import { inBuildOrder } from '#shared/domain/lighting/frame-stages.ts'
import type { Orientation } from '#shared/domain/lighting/frame.ts'
import type { Layers } from '#shared/domain/lighting/test-frame/render.ts'
import { type Wearing, sceneOf } from '#shared/domain/lighting/test-frame/scene-of.ts'
import { develop } from '#shared/domain/lighting/test-frame/develop.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { askFor } from '../../test-frame/frame-follower.ts'
import { URGENCY } from '../../test-frame/frame-renderer.ts'
import { useFrameRenderer } from '../../test-frame/shared-renderer.ts'
import { useWeights } from '../../test-frame/use-stage-pictures.ts'
import { useSteady } from '../../test-frame/use-steady.ts'
import { FrameCanvas } from './frame-canvas.tsx'

type CardFrameProps = { whole: WholeSetup; orientation: Orientation; wearing: Wearing }

/** A setup's picture with all its lights, computed when nothing on the screen is waiting. Nothing without light. */
export function CardFrame({ whole, orientation, wearing }: CardFrameProps) {
  const renderer = useFrameRenderer()
  const now = sceneOf(whole, orientation, wearing)
  const scene = useSteady(now, JSON.stringify(now))
  const [layers, setLayers] = useState<Layers | null>(null)
  const isLit = whole.lights.some((light) => light.isOn)
  useEffect(() => {
    if (!isLit) return undefined
    return renderer.ask(askFor(scene, orientation, 'fine'), URGENCY.card, {
      onDone: setLayers,
      onFail: () => undefined,
    })
  }, [renderer, scene, orientation, isLit])
  const weights = useWeights(whole.setup, whole.lights)
  const bytes = useMemo(() => layers && develop(layers, weights), [layers, weights])
  if (!isLit) return null
  const purposes = inBuildOrder(whole.lights).map((light) => light.purpose)
  return (
    <div className="relative w-2/5 flex-none border-b border-hair bg-night">
      <FrameCanvas
        width={layers?.width ?? 2}
        height={layers?.height ?? 3}
        bytes={bytes}
        label={`Test frame with ${purposes.join(', ')}`}
        className="absolute inset-0 size-full object-contain"
      />
    </div>
  )
}
