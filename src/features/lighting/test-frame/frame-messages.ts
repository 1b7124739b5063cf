import type { Quality } from '#shared/domain/lighting/test-frame/render.ts'
import type { Scene } from '#shared/domain/lighting/test-frame/scene.ts'

/** A picture to be computed. */
export type FrameAsk = { scene: Scene; width: number; height: number; quality: Quality }

/** To the worker: which picture the next rows are of, then rows of it. It works on one at a time. */
export type FrameRequest = ({ kind: 'begin'; job: number } & FrameAsk) | BandRequest
export type BandRequest = { kind: 'band'; job: number; from: number; to: number }

/** Rows of a picture: one buffer for each emitter of the scene in its order, ambient light last. */
export type FrameAnswer =
  | { kind: 'band'; job: number; from: number; to: number; layers: Float32Array[] }
  | { kind: 'failed'; job: number; why: string }

const isNumber = (value: unknown): value is number => typeof value === 'number' && Number.isFinite(value)

/** What a worker has said; null when it is nothing of ours. */
export function parseFrameAnswer(data: unknown): FrameAnswer | null {
  if (typeof data !== 'object' || data === null || !('kind' in data) || !('job' in data) || !isNumber(data.job))
    return null
  const { job } = data
  if (data.kind === 'failed') return { kind: 'failed', job, why: 'why' in data ? String(data.why) : '' }
  if (data.kind !== 'band' || !('from' in data) || !('to' in data) || !('layers' in data)) return null
  const { from, to, layers } = data
  if (!isNumber(from) || !isNumber(to) || !Array.isArray(layers)) return null
  const buffers = layers.filter((layer): layer is Float32Array => layer instanceof Float32Array)
  return buffers.length === layers.length ? { kind: 'band', job, from, to, layers: buffers } : null
}

/** What the page has asked; null when it is nothing of ours. The scene was built by `sceneOf` in the same build. */
export function parseFrameRequest(data: unknown): FrameRequest | null {
  if (!hasKind(data)) return null
  return data.kind === 'begin' || data.kind === 'band' ? (data as FrameRequest) : null
}

function hasKind(data: unknown): data is { kind: unknown; job: number } {
  return typeof data === 'object' && data !== null && 'kind' in data && 'job' in data && isNumber(data.job)
}
