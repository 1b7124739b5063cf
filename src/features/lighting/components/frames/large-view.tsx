import { useState } from 'react'
import type { FrameStage } from '#shared/domain/lighting/frame-stages.ts'
import type { Orientation } from '#shared/domain/lighting/frame.ts'
import type { Light } from '#shared/domain/lighting/schema.ts'
import { STOP_STEPS, develop, falseColour } from '#shared/domain/lighting/test-frame/develop.ts'
import { AMBIENT, type Layers } from '#shared/domain/lighting/test-frame/render.ts'
import { sampleAt, spotReading } from '#shared/domain/lighting/test-frame/sample.ts'
import type { Scene } from '#shared/domain/lighting/test-frame/scene.ts'
import { fNumberLabel, stopsLabel } from '#shared/domain/lighting/words.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { saveFile } from '#src/lib/save-file.ts'
import { Button } from '#src/ui/button.tsx'
import { Choice } from '#src/ui/choice.tsx'
import { FullDialog } from '#src/ui/full-dialog.tsx'
import { toast } from '#src/ui/toast.ts'
import { blobOf, canvasOf } from '../../test-frame/picture-blob.ts'
import { useLargeFrame } from '../../test-frame/use-large-frame.ts'
import { useSteady } from '../../test-frame/use-steady.ts'
import { useWeights } from '../../test-frame/use-stage-pictures.ts'
import { LargeCanvas, type LargeLook, type Spot } from './large-canvas.tsx'
import { WallLegend, WallView } from './wall-view.tsx'

const PROMISE = 'A study from the numbers, not a promise'

type LargeViewProps = {
  whole: WholeSetup
  scene: Scene
  orientation: Orientation
  stages: readonly FrameStage[]
  /** The strip's picture. */
  under: Layers | null
  stageId: string
  onStage: (lightId: string) => void
  onClose: () => void
}

type How = 'built up' | 'alone'

/** The lights of a picture: all up to one, or that one alone, which then counts as on. */
function lightsOf(stages: readonly FrameStage[], stageId: string, how: How): Light[] {
  const index = stages.findIndex((stage) => stage.light.id === stageId)
  if (how === 'built up') return stages.slice(0, index + 1).map((stage) => stage.light)
  return stages.slice(index, index + 1).map((stage) => ({ ...stage.light, isOn: true }))
}

export function LargeView(props: LargeViewProps) {
  const { whole, scene, orientation, stages, under, stageId, onStage, onClose } = props
  const [look, setLook] = useState<LargeLook | 'wall'>('picture')
  const [how, setHow] = useState<How>('built up')
  const [spot, setSpot] = useState<Spot | null>(null)
  const large = useLargeFrame(scene, orientation)
  const lights = lightsOf(stages, stageId, how)
  const all = useWeights(whole.setup, lights)
  const alone = useSteady(
    how === 'alone' ? new Map([...all].filter(([id]) => id !== AMBIENT)) : all,
    `${how}${JSON.stringify([...all])}`,
  )
  const isWhole = large.share >= 1
  const read = isWhole ? large.layers : under
  const reading = spot && read && spotReading(sampleAt(read, alone, spot.across, spot.down), whole.setup.camera.fNumber)
  const stage = stages.find((candidate) => candidate.light.id === stageId)

  function save() {
    const layers = isWhole ? large.layers : under
    if (!layers) return
    const bytes = look === 'false colour' ? falseColour(layers, alone) : develop(layers, alone)
    blobOf(
      canvasOf({ width: layers.width, height: layers.height, bytes }, `${whole.setup.name} · ${PROMISE}`),
      'image/png',
    )
      .then((blob) => saveFile(`${whole.setup.name}, ${stage?.light.purpose ?? 'test frame'}.png`, blob))
      .catch(() => toast.say('The picture could not be written. Nothing is lost; try again.'))
  }

  return (
    <FullDialog
      open
      onOpenChange={(open) => {
        if (!open) onClose()
      }}
      title={whole.setup.name}
      description={`${PROMISE}.`}
      actions={
        <>
          <Choice
            label="What is shown"
            value={look}
            onChange={setLook}
            options={[
              { value: 'picture', label: 'Picture' },
              { value: 'false colour', label: 'False colour' },
              { value: 'wall', label: 'Wall' },
            ]}
          />
          {look !== 'wall' && (
            <Button onClick={save} disabled={read === null}>
              Save as PNG
            </Button>
          )}
        </>
      }
    >
      <div className="flex min-h-0 flex-1 flex-col gap-4 px-[18px] pb-5 md:flex-row md:gap-6 md:px-6">
        <div className="flex min-h-0 min-w-0 flex-1 items-center justify-center max-md:max-h-[68dvh] max-md:flex-none">
          {look === 'wall' ? (
            <WallView whole={whole} orientation={orientation} />
          ) : (
            <LargeCanvas
              under={under}
              large={large}
              weights={alone}
              look={look}
              label={`Test frame, ${how === 'alone' ? `${stage?.light.purpose ?? ''} alone` : (stage?.caption ?? '')}`}
              spot={spot}
              onSpot={setSpot}
            />
          )}
        </div>
        <aside aria-label="Stages and scale" className="flex flex-none flex-col gap-4 md:w-60 md:overflow-y-auto">
          {look === 'wall' ? (
            <>
              <p className="text-sm text-ink-soft">
                All lights that are on, without the sitter’s shadow. The cross is the brightest place; the dashes are
                the sitter before it.
              </p>
              <WallLegend />
            </>
          ) : (
            <>
              <p aria-live={spot?.byKeys ? 'polite' : 'off'} className="min-h-[3.2em] text-sm">
                {reading ? (
                  <>
                    <span className="font-display text-lg font-semibold">{stopsWords(reading.stops)}</span>
                    <br />
                    <span className="text-ink-soft">
                      {reading.fNumber > 0
                        ? `would be middle grey at ${fNumberLabel(reading.fNumber)}`
                        : 'no light comes from here'}
                    </span>
                  </>
                ) : (
                  <span className="text-ink-soft">Point at the picture to read a spot: stops against middle grey.</span>
                )}
              </p>
              <Choice
                label="How lights are shown"
                value={how}
                onChange={setHow}
                className="self-start"
                options={[
                  { value: 'built up', label: 'Built up' },
                  { value: 'alone', label: 'Alone' },
                ]}
              />
              <ul aria-label="Stages" className="flex flex-col gap-1">
                {stages.map((each) => (
                  <li key={each.light.id}>
                    <button
                      type="button"
                      aria-pressed={each.light.id === stageId}
                      onClick={() => onStage(each.light.id)}
                      className="flex w-full justify-between gap-2 rounded-r border border-transparent px-2.5 py-1.5 text-left text-sm hover:bg-paper/60 aria-pressed:border-edge aria-pressed:bg-paper max-md:min-h-11 max-md:items-center"
                    >
                      <span className="font-semibold">{each.caption}</span>
                      <span className="text-ink-soft">{each.reading}</span>
                    </button>
                  </li>
                ))}
              </ul>
              {how === 'alone' && stage && !stage.light.isOn && (
                <p className="text-sm text-ink-soft">
                  This light is off in the setup; here it is shown as if it were on.
                </p>
              )}
              {look === 'false colour' && <StopLegend />}
              <Making large={large} />
            </>
          )}
        </aside>
      </div>
    </FullDialog>
  )
}

function stopsWords(stops: number): string {
  if (!Number.isFinite(stops)) return 'Black'
  const label = stopsLabel(stops)
  return label === '0' ? 'Middle grey' : `${label} ${/^[−+](1|⅓|⅔)$/.test(label) ? 'stop' : 'stops'}`
}

function StopLegend() {
  return (
    <ul aria-label="Stops against middle grey" className="flex flex-col gap-px text-sm">
      {[...STOP_STEPS].reverse().map((step) => (
        <li key={step.words} className="flex items-center gap-2">
          <span
            aria-hidden
            className="h-4 w-8 border border-edge"
            style={{ background: `rgb(${step.colour.join(' ')})` }}
          />
          {step.words}
        </li>
      ))}
    </ul>
  )
}

function Making({ large }: { large: ReturnType<typeof useLargeFrame> }) {
  if (large.failure !== null) {
    return (
      <div className="text-sm">
        <p>{large.failure}</p>
        <Button size="small" className="mt-1.5" onClick={large.goOn}>
          Try again
        </Button>
      </div>
    )
  }
  if (large.share >= 1) return <p className="text-sm text-ink-soft">In full.</p>
  return (
    <div className="flex flex-col items-start gap-1.5 text-sm text-ink-soft">
      <p>{large.isStopped ? 'Stopped; what is there stays.' : 'Working out the large picture…'}</p>
      <div
        role="progressbar"
        aria-label="Large picture"
        aria-valuenow={Math.round(large.share * 100)}
        className="h-1.5 w-full rounded-sm bg-hair"
      >
        <div className="h-full rounded-sm bg-ink-soft" style={{ width: `${large.share * 100}%` }} />
      </div>
      <Button size="small" onClick={large.isStopped ? large.goOn : large.stop}>
        {large.isStopped ? 'Go on' : 'Stop'}
      </Button>
    </div>
  )
}
