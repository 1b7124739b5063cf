import { useMemo } from 'react'
import type { FrameStage } from '#shared/domain/lighting/frame-stages.ts'
import type { Setup } from '#shared/domain/lighting/schema.ts'
import { type Weights, weightsOf } from '#shared/domain/lighting/test-frame/develop.ts'
import { developStages } from '#shared/domain/lighting/test-frame/develop-stages.ts'
import type { Layers } from '#shared/domain/lighting/test-frame/render.ts'
import { useSteady } from './use-steady.ts'

const textOf = (weights: Weights) => JSON.stringify([...weights])

/** Weights that stay the same value while they say the same, whatever else of the setup changes. */
export function useWeights(setup: Setup, lights: Parameters<typeof weightsOf>[1]): Weights {
  const weights = weightsOf(setup, lights)
  return useSteady(weights, textOf(weights))
}

/** The picture of each stage from layers of light; developed anew only when light or layers change. */
export function useStagePictures(
  layers: Layers | null,
  setup: Setup,
  stages: readonly FrameStage[],
): Uint8ClampedArray<ArrayBuffer>[] {
  const weights = useWeights(
    setup,
    stages.map((stage) => stage.light),
  )
  const ids = stages.map((stage) => stage.light.id)
  const order = useSteady(ids, ids.join())
  return useMemo(() => (layers ? developStages(layers, weights, order) : []), [layers, weights, order])
}
