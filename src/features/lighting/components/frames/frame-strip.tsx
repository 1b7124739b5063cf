import { type KeyboardEvent, useRef } from 'react'
import type { FrameStage } from '#shared/domain/lighting/frame-stages.ts'
import type { Orientation } from '#shared/domain/lighting/frame.ts'
import type { Setup } from '#shared/domain/lighting/schema.ts'
import { STRIP_PIXELS, pictureSize } from '#shared/domain/lighting/test-frame/picture-size.ts'
import { cn } from '#src/lib/cn.ts'
import { Button } from '#src/ui/button.tsx'
import { useStagePictures } from '../../test-frame/use-stage-pictures.ts'
import type { TestFrame } from '../../test-frame/use-test-frame.ts'
import { FrameCanvas } from './frame-canvas.tsx'

type FrameStripProps = {
  setup: Setup
  stages: readonly FrameStage[]
  orientation: Orientation
  frame: TestFrame
  chosenId: string | null
  onChoose: (lightId: string) => void
  onOpen: (lightId: string) => void
}

/** How high pictures stand in the strip at most, CSS px. */
const MOST_HIGH_PX = 190

/** The picture being built up, light by light. */
export function FrameStrip({ setup, stages, orientation, frame, chosenId, onChoose, onOpen }: FrameStripProps) {
  const list = useRef<HTMLUListElement>(null)
  const pictures = useStagePictures(frame.layers, setup, stages)
  const size = frame.layers ?? pictureSize(orientation, STRIP_PIXELS)
  const aspect = size.width / size.height
  const last = stages.at(-1)
  const outlined = stages.find((stage) => stage.light.id === chosenId) ?? last

  function handleKeys(event: KeyboardEvent, index: number) {
    const step = { ArrowLeft: -1, ArrowUp: -1, ArrowRight: 1, ArrowDown: 1 }[event.key]
    const to = event.key === 'Home' ? 0 : event.key === 'End' ? stages.length - 1 : index + (step ?? 0)
    const stage = stages[to]
    if (to === index || !stage) return
    event.preventDefault()
    list.current?.querySelectorAll('button')[to]?.focus()
    onChoose(stage.light.id)
  }

  if (!last) {
    return (
      <p className="rounded-r bg-night px-3.5 py-3 text-sm text-bone-soft">
        Test frames stand here once there is a light: the picture as it is built up, light by light.
      </p>
    )
  }
  return (
    <section
      aria-label="Test frames"
      data-quality={frame.isFine ? 'fine' : frame.layers ? 'rough' : 'none'}
      className="on-night flex-none rounded-r bg-night text-bone"
    >
      {frame.failure !== null && (
        <div className="flex flex-wrap items-center gap-3 px-3 pt-2.5 text-sm" role="status">
          <p className="min-w-0 flex-1">{frame.failure}</p>
          <Button variant="night" size="small" onClick={frame.tryAgain}>
            Try again
          </Button>
        </div>
      )}
      <div className="flex items-stretch gap-3 p-2.5">
        <ul
          ref={list}
          className="-m-1 flex min-w-0 flex-1 snap-x snap-proximity scroll-p-1 gap-2.5 overflow-x-auto p-1"
        >
          {stages.map((stage, index) => (
            <li
              key={stage.light.id}
              className="flex min-w-26 flex-1 snap-start flex-col"
              style={{ maxWidth: Math.max(112, Math.round(MOST_HIGH_PX * aspect)) }}
            >
              <button
                type="button"
                aria-pressed={stage.light.id === chosenId}
                aria-haspopup="dialog"
                tabIndex={stage === outlined ? 0 : -1}
                onKeyDown={(event) => handleKeys(event, index)}
                onClick={() => {
                  onChoose(stage.light.id)
                  onOpen(stage.light.id)
                }}
                className="group block w-full rounded-sm text-left"
              >
                <span
                  className={cn(
                    'block rounded-sm border-2 p-1',
                    stage === outlined ? 'border-glow-lit' : 'border-transparent group-hover:border-night-edge',
                  )}
                >
                  <FrameCanvas
                    width={size.width}
                    height={size.height}
                    bytes={pictures[index] ?? null}
                    label={`Test frame: ${stage.caption}`}
                    className="mx-auto block w-full bg-night-2"
                  />
                </span>
                <span className="mt-1 flex flex-wrap justify-between gap-x-2 px-1 text-sm leading-snug">
                  <span className="font-semibold">{stage.caption}</span>
                  <span className={cn('text-bone-soft', !stage.light.isOn && 'italic')}>{stage.reading}</span>
                </span>
              </button>
            </li>
          ))}
        </ul>
        <div className="flex w-36 flex-none flex-col items-start justify-between gap-2 pr-1 text-xs text-bone-soft max-lg:hidden">
          <Button variant="night" size="small" onClick={() => onOpen(outlined?.light.id ?? last.light.id)}>
            Look closer
          </Button>
          <p>
            {frame.isFine || frame.failure !== null ? '' : frame.layers ? 'Getting finer… ' : 'Working it out… '}A study
            from the numbers, not a promise.
          </p>
        </div>
      </div>
    </section>
  )
}
