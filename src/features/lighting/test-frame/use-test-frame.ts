import { useEffect, useState, useSyncExternalStore } from 'react'
import type { Orientation } from '#shared/domain/lighting/frame.ts'
import type { Scene } from '#shared/domain/lighting/test-frame/scene.ts'
import { type FollowedFrame, createFrameFollower } from './frame-follower.ts'
import { useFrameRenderer } from './shared-renderer.ts'

export type TestFrame = FollowedFrame & { tryAgain: () => void }

/** The test frame of a scene, computed beside the page: rough at once and while it changes, then fine. */
export function useTestFrame(scene: Scene, orientation: Orientation): TestFrame {
  const renderer = useFrameRenderer()
  const [follower] = useState(() => createFrameFollower(renderer, () => performance.now()))
  const frame = useSyncExternalStore(follower.subscribe, follower.snapshot)
  useEffect(() => follower.follow(scene, orientation), [follower, scene, orientation])
  useEffect(() => follower.stop, [follower])
  return { ...frame, tryAgain: follower.tryAgain }
}
