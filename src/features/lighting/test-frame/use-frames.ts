import { useMemo } from 'react'
import { type FrameStage, frameStages } from '#shared/domain/lighting/frame-stages.ts'
import type { Orientation } from '#shared/domain/lighting/frame.ts'
import type { SetupReading } from '#shared/domain/lighting/readings.ts'
import { sceneOf } from '#shared/domain/lighting/test-frame/scene-of.ts'
import type { Scene } from '#shared/domain/lighting/test-frame/scene.ts'
import { wearingOf } from '#shared/domain/lighting/wearing.ts'
import type { Plan, WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { useSteady } from './use-steady.ts'
import { type TestFrame, useTestFrame } from './use-test-frame.ts'

export type Frames = { scene: Scene; orientation: Orientation; stages: FrameStage[]; frame: TestFrame }

/** The test frames of a setup as it is shown, with whatever is being dragged where hands hold it. */
export function useFrames(plan: Plan, whole: WholeSetup, reading: SetupReading, orientation: Orientation): Frames {
  const wearing = useMemo(() => wearingOf(plan, whole.setup.id), [plan, whole.setup.id])
  const now = useMemo(() => sceneOf(whole, orientation, wearing), [whole, orientation, wearing])
  const scene = useSteady(now, JSON.stringify(now))
  const stages = useMemo(() => frameStages(whole, reading), [whole, reading])
  return { scene, orientation, stages, frame: useTestFrame(scene, orientation) }
}
