import { useMemo, useState } from 'react'
import { Link } from 'react-router-dom'
import { cautionsOf } from '#shared/domain/lighting/cautions.ts'
import type { LightPurpose } from '#shared/domain/lighting/schema.ts'
import { readSetup } from '#shared/domain/lighting/readings.ts'
import { setupUse, widestOf } from '#shared/domain/lighting/setup-use.ts'
import { purposeWord } from '#shared/domain/lighting/words.ts'
import type { Plan, WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { sitters as sittersOf } from '#shared/realtime/documents.ts'
import { useLengthUnit } from '#src/lib/length-unit.ts'
import { useMayWrite, useShoot } from '#src/realtime/shoot-realtime.tsx'
import { useItems } from '#src/realtime/use-items.ts'
import { usePlan } from '#src/realtime/use-plan.ts'
import { useUndoKeys } from '#src/realtime/use-undo-keys.ts'
import { Button, buttonClass } from '#src/ui/button.tsx'
import { Empty } from '#src/ui/empty.tsx'
import { Sheet } from '#src/ui/sheet.tsx'
import { useIsPhone } from '#src/ui/use-media.ts'
import { type Part, partKey, partName, withMoves } from '../parts.ts'
import { useKit } from '../use-kit.ts'
import { useMoving } from '../use-moving.ts'
import { usePeerMoves } from '../use-peer-moves.ts'
import { useSetupWriter } from '../use-setup-writer.ts'
import { useFrames } from '../test-frame/use-frames.ts'
import { useSheetFrames } from '../test-frame/use-sheet-frames.ts'
import { AddLight } from './add-light.tsx'
import { FrameStrip } from './frames/frame-strip.tsx'
import { LargeView } from './frames/large-view.tsx'
import { MeterReadings } from './meter/meter-readings.tsx'
import { NewerNumbers } from './meter/newer-numbers.tsx'
import { NextStepLine } from './next-step-line.tsx'
import { PlanDrawing } from './plan/plan-drawing.tsx'
import { SideDrawing } from './plan/side-drawing.tsx'
import { Overview } from './readings/overview.tsx'
import { useOpenGroups } from './readings/use-open-groups.ts'
import { useRecipeDialogs } from './recipe/use-recipe-dialogs.tsx'
import { SetupBar } from './setup-bar.tsx'
import { SetupEditor, isPartOf } from './setup-editor.tsx'

/** One lighting setup: drawn to scale, with its numbers beside. */
export function SetupScreen({ setupId }: { setupId: string }) {
  const plan = usePlan()
  const shoot = useShoot()
  const whole = plan.setups.get(setupId)
  if (!whole) {
    return (
      <Empty
        title="This setup is not here any more"
        action={
          <Link to={`/shoots/${shoot.id}/lighting`} className={buttonClass('plain')}>
            All setups
          </Link>
        }
      >
        Somebody removed it, or the address is wrong. The other setups are as they were.
      </Empty>
    )
  }
  return <Setup key={setupId} plan={plan} whole={whole} />
}

function Setup({ plan, whole }: { plan: Plan; whole: WholeSetup }) {
  const isPhone = useIsPhone()
  const mayWrite = useMayWrite('lighting')
  const kit = useKit()
  const writer = useSetupWriter(whole)
  const sitterItems = useItems('looks', sittersOf)
  const [chosen, setChosen] = useState<string | null>(null)
  const [isSheetOpen, setIsSheetOpen] = useState(false)
  const [adding, setAdding] = useState<LightPurpose | 'any' | null>(null)
  const [isMetering, setIsMetering] = useState(false)
  const groups = useOpenGroups()
  const lengthUnit = useLengthUnit()
  const [openStage, setOpenStage] = useState<string | null>(null)
  const recipes = useRecipeDialogs(useSheetFrames(plan))
  const use = useMemo(() => setupUse(plan, whole.setup.id), [plan, whole.setup.id])

  const sitters = [...sitterItems.values()].map((sitter) => ({
    id: sitter.id,
    label: sitter.character === '' ? sitter.name : `${sitter.name}, ${sitter.character}`,
    looks: [...plan.looks.values()].flatMap(({ look }) => (look.sitterId === sitter.id ? [look] : [])),
  }))
  const rooms = [...new Map(use.shots.flatMap(({ room }) => (room ? [[room.id, room] as const] : []))).values()]
  const nameOf = (part: Part) => {
    const sitter =
      part.kind === 'place' && part.place.sitterId !== null ? sitterItems.get(part.place.sitterId) : undefined
    return partName(part, sitter?.name)
  }
  const chosenKey = chosen !== null && isPartOf(whole, chosen) ? chosen : null

  const moving = useMoving({
    whole,
    mayWrite,
    nameOf,
    onChoose: (part) => setChosen(partKey(part)),
    onDrop: writer.drop,
  })
  const peers = usePeerMoves(whole)
  const ownMoves = useMemo(() => new Map(moving.held ? [[moving.held.key, moving.held.at]] : []), [moving.held])
  const shown = useMemo(() => withMoves(withMoves(whole, peers.moves), ownMoves), [whole, peers.moves, ownMoves])
  const asked = useMemo(
    () => ({ orientations: use.orientations, frames: use.frames, unit: lengthUnit }),
    [use, lengthUnit],
  )
  const reading = useMemo(() => readSetup(shown, asked), [shown, asked])
  const cautions = useMemo(() => cautionsOf(shown, asked, reading), [shown, asked, reading])
  const orientation = widestOf(use.orientations)
  const frames = useFrames(plan, shown, reading, use.orientations[0] ?? 'upright')
  useUndoKeys(writer.undo)
  const drawing = { whole: shown, written: whole, chosenKey, moving, mayWrite, peers: peers.holds, nameOf }

  function open(key: string) {
    setChosen(key)
    if (isPhone) setIsSheetOpen(true)
  }

  const overview = (
    <Overview
      whole={shown}
      reading={reading}
      use={use}
      groups={groups}
      cautions={cautions}
      writer={writer}
      mayWrite={mayWrite}
      chosenKey={chosenKey}
      nameOfPlace={(id) => {
        const place = whole.places.find((candidate) => candidate.id === id)
        return place ? nameOf({ kind: 'place', place }) : 'Sitter'
      }}
      onChoose={open}
    />
  )
  const editor = chosenKey !== null && (
    <SetupEditor
      chosenKey={chosenKey}
      whole={shown}
      reading={reading}
      kit={kit}
      writer={writer}
      sitters={sitters}
      rooms={rooms}
      mayWrite={mayWrite}
      withBack={!isPhone}
      onChoose={(key) => {
        setChosen(key)
        if (key === null) setIsSheetOpen(false)
      }}
    />
  )
  const chosenLight = whole.lights.find((light) => chosenKey === light.id || chosenKey === `${light.id}:aim`)

  return (
    <div className="flex min-h-full flex-col md:h-full">
      <SetupBar
        whole={whole}
        usedWords={use.words}
        mayWrite={mayWrite}
        undo={writer.undo}
        recipeItems={recipes.itemsOf(whole)}
        onMeter={() => setIsMetering(true)}
        onAddLight={() => setAdding('any')}
      />
      {recipes.dialogs}
      <div className="grid min-h-0 flex-1 md:grid-cols-[minmax(0,1fr)_minmax(19rem,32%)] xl:grid-cols-[minmax(0,1fr)_25rem]">
        <div className="flex min-w-0 flex-col gap-3 p-2.5 md:min-h-0 md:py-0 md:pr-5 md:pb-3.5 md:pl-6">
          <FrameStrip
            setup={shown.setup}
            stages={frames.stages}
            orientation={frames.orientation}
            frame={frames.frame}
            chosenId={chosenKey}
            onChoose={setChosen}
            onOpen={setOpenStage}
          />
          {mayWrite && (
            <NextStepLine whole={whole} onAddLight={setAdding} onAddPanel={() => open(writer.addProp('panel'))} />
          )}
          <div className="h-[min(52dvh,26rem)] md:h-auto md:min-h-0 md:flex-1">
            <PlanDrawing {...drawing} orientation={orientation} onChooseNothing={() => setChosen(null)} />
          </div>
          {isPhone && chosenKey !== null && (
            <div className="flex items-center gap-3 rounded-r border border-hair bg-paper py-1.5 pr-1.5 pl-3.5 text-base">
              <span className="min-w-0 flex-1 truncate font-semibold">
                {chosenLight ? purposeWord(chosenLight.purpose) : 'Chosen'}
              </span>
              <Button onClick={() => setIsSheetOpen(true)}>{mayWrite ? 'Change' : 'Look at it'}</Button>
            </div>
          )}
          <div className="h-40 flex-none md:h-[clamp(8rem,24%,14rem)]">
            <SideDrawing {...drawing} reading={reading} orientation={orientation} />
          </div>
        </div>
        <aside
          aria-label="Numbers of the setup"
          className="bg-paper px-[18px] py-4 md:min-h-0 md:overflow-y-auto md:border-l md:border-hair md:px-5 md:py-3.5"
        >
          {(isPhone || editor === false) && <NewerNumbers whole={whole} kit={kit} writer={writer} />}
          {isPhone || editor === false ? overview : editor}
        </aside>
      </div>
      {isPhone && (
        <Sheet open={isSheetOpen && chosenKey !== null} onOpenChange={setIsSheetOpen} title="Change">
          {editor}
        </Sheet>
      )}
      {frames.stages.some((stage) => stage.light.id === openStage) && openStage !== null && (
        <LargeView
          whole={shown}
          scene={frames.scene}
          orientation={frames.orientation}
          stages={frames.stages}
          under={frames.frame.layers}
          stageId={openStage}
          onStage={setOpenStage}
          onClose={() => setOpenStage(null)}
        />
      )}
      <MeterReadings
        whole={whole}
        reading={reading}
        kit={kit}
        writer={writer}
        open={isMetering}
        onOpenChange={setIsMetering}
      />
      <AddLight
        open={adding !== null}
        onOpenChange={(isOpen) => {
          if (!isOpen) setAdding(null)
        }}
        purpose={adding === 'any' ? null : adding}
        lights={whole.lights}
        kit={kit}
        onAdd={(light) => setChosen(writer.addLight(light))}
      />
      <p role="status" aria-live="assertive" className="sr-only">
        {moving.said}
      </p>
    </div>
  )
}
