import { type KeyboardEvent, type PointerEvent, useEffect, useRef } from 'react'
import { type Weights, develop, falseColour } from '#shared/domain/lighting/test-frame/develop.ts'
import { rowsOfLayers } from '#shared/domain/lighting/test-frame/develop-stages.ts'
import type { Layers } from '#shared/domain/lighting/test-frame/render.ts'
import { canvasOf } from '../../test-frame/picture-blob.ts'
import type { LargeFrame, Rows } from '../../test-frame/use-large-frame.ts'

export type LargeLook = 'picture' | 'false colour'
/** A place of the picture, in shares of it from the top left; whoever moves it by keys is told aloud what it reads. */
export type Spot = { across: number; down: number; byKeys: boolean }

type LargeCanvasProps = {
  /** The small picture, shown until the large one is there. */
  under: Layers | null
  large: LargeFrame
  weights: Weights
  look: LargeLook
  label: string
  spot: Spot | null
  onSpot: (spot: Spot | null) => void
}

/** Drawing stops for the page after so long, ms. */
const AT_ONCE_MS = 12
/** A press of an arrow key moves the spot by so much of the picture. */
const STEP = 0.02

type Drawn = { weights: Weights; look: LargeLook; under: Layers | null; layers: Layers | null; rows: Set<Rows> }

const bytesOf = (look: LargeLook, layers: Layers, weights: Weights) =>
  look === 'picture' ? develop(layers, weights) : falseColour(layers, weights)

export function LargeCanvas({ under, large, weights, look, label, spot, onSpot }: LargeCanvasProps) {
  const canvas = useRef<HTMLCanvasElement>(null)
  const drawn = useRef<Drawn | null>(null)
  const { layers, rows, size } = large
  const { width, height } = size

  useEffect(() => {
    const context = canvas.current?.getContext('2d')
    if (!context) return undefined
    const before = drawn.current
    const isSame =
      before?.weights === weights && before.look === look && before.under === under && before.layers === layers
    const now: Drawn = isSame ? before : { weights, look, under, layers, rows: new Set() }
    drawn.current = now
    if (!isSame && under) {
      context.imageSmoothingQuality = 'high'
      const small = canvasOf({ width: under.width, height: under.height, bytes: bytesOf(look, under, weights) })
      context.drawImage(small, 0, 0, width, height)
    }
    let frame = 0
    const waiting = rows.filter((band) => !now.rows.has(band))
    function draw() {
      const startMs = performance.now()
      while (layers && context && waiting.length > 0 && performance.now() - startMs < AT_ONCE_MS) {
        const band = waiting.shift()
        if (!band) break
        const own = rowsOfLayers(layers, band[0], band[1])
        context.putImageData(new ImageData(bytesOf(look, own, weights), own.width, own.height), 0, band[0])
        now.rows.add(band)
      }
      if (waiting.length > 0) frame = requestAnimationFrame(draw)
    }
    draw()
    return () => cancelAnimationFrame(frame)
  }, [under, layers, rows, weights, look, width, height])

  function handlePointer(event: PointerEvent<HTMLElement>) {
    const box = event.currentTarget.getBoundingClientRect()
    const across = (event.clientX - box.left) / box.width
    onSpot({ across, down: (event.clientY - box.top) / box.height, byKeys: false })
  }
  function handleKeys(event: KeyboardEvent) {
    const arrow = { ArrowLeft: [-1, 0], ArrowRight: [1, 0], ArrowUp: [0, -1], ArrowDown: [0, 1] }[event.key]
    if (!arrow) return
    event.preventDefault()
    const from = spot ?? { across: 0.5, down: 1 / 3 }
    const moved = (value: number, by: number | undefined) => Math.min(0.999, Math.max(0, value + (by ?? 0) * STEP))
    onSpot({ across: moved(from.across, arrow[0]), down: moved(from.down, arrow[1]), byKeys: true })
  }

  return (
    <button
      type="button"
      aria-label={`${label}. Arrow keys move the spot that is read.`}
      onPointerMove={handlePointer}
      onPointerDown={handlePointer}
      onPointerLeave={(event) => {
        if (event.pointerType === 'mouse') onSpot(null)
      }}
      onKeyDown={handleKeys}
      className="relative block max-h-full max-w-full cursor-crosshair touch-pan-y"
      style={{ aspectRatio: `${width} / ${height}` }}
    >
      <canvas ref={canvas} width={width} height={height} className="block size-full bg-night-2" />
      {spot && (
        <span
          aria-hidden
          className="pointer-events-none absolute size-3 -translate-1/2 rounded-full border border-white shadow-[0_0_0_1px_#151312]"
          style={{ left: `${spot.across * 100}%`, top: `${spot.down * 100}%` }}
        />
      )}
    </button>
  )
}
