import type { Scene } from './scene.ts'
import { type Stage, stageOf } from './stage.ts'

type Fineness = Parameters<typeof stageOf>[1]

/** Stages whose bodies and props can be used again, by what they are made of; the newest few. */
export type StageStore = Map<string, Stage>

const KEPT = 4

/**
 * A scene's stage, with its sitters and props taken from an earlier one where they are the same: working them out takes
 * as long as a small picture, and moving a light does not change them. Gives what `stageOf` gives.
 */
export function stageAgain(scene: Scene, fineness: Fineness, store: StageStore): Stage {
  const key = JSON.stringify([fineness, scene.figures, scene.props])
  const known = store.get(key)
  const bare = known && stageOf({ ...scene, figures: [], props: [] }, fineness)
  const stage = known && bare ? { ...bare, scene, solids: known.solids, heads: known.heads } : stageOf(scene, fineness)
  store.delete(key)
  store.set(key, stage)
  for (const oldest of store.keys()) {
    if (store.size <= KEPT) break
    store.delete(oldest)
  }
  return stage
}
