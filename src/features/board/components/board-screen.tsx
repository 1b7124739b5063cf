import { MoreHorizontal } from 'lucide-react'
import { Suspense, lazy, useState } from 'react'
import type { Plan } from '#shared/domain/plan/read-plan.ts'
import { usePlan } from '#src/realtime/use-plan.ts'
import { count } from '#src/lib/format.ts'
import { useShoot } from '#src/realtime/shoot-realtime.tsx'
import type { Undo } from '#src/realtime/use-undo.ts'
import { IconButton } from '#src/ui/button.tsx'
import { Menu } from '#src/ui/menu.tsx'
import { ScreenBar } from '#src/ui/screen-bar.tsx'
import { useIsPhone } from '#src/ui/use-media.ts'
import { Waiting } from '#src/ui/waiting.tsx'
import { BoardPlanProvider } from '../board-plan.ts'
import { useAddPictures } from '../use-add-pictures.ts'
import { useClipboard } from '../use-clipboard.ts'
import { useNewThings } from '../use-new-things.ts'
import { useFirstView, useWallControl } from '../use-wall-control.ts'
import { type WallControl, WallControlProvider, useWall } from '../wall-control.ts'
import { type WallItems, useWallItems } from '../wall-item.ts'
import { select } from '../wall-state.ts'
import { EmptyBoard } from './empty-board.tsx'
import { PictureInputFields, usePictureInputs } from './picture-inputs.tsx'
import { SearchBox } from './search-box.tsx'
import { Wall } from './wall.tsx'
import { ZoomBar } from './zoom-bar.tsx'

// The wall comes first; what stands around it follows while it is already in the hand.
const Inspector = lazy(async () => ({ default: (await import('./inspector/inspector.tsx')).Inspector }))
const Strip = lazy(async () => ({ default: (await import('./strip/strip.tsx')).Strip }))
const VersionsDialog = lazy(async () => ({
  default: (await import('./versions/versions-dialog.tsx')).VersionsDialog,
}))
const PhoneBoard = lazy(async () => ({ default: (await import('./phone/phone-board.tsx')).PhoneBoard }))

/** The shared wall of references and the strip of shots. */
export function BoardScreen() {
  const plan = usePlan()
  const { control, mayWrite, undo } = useWallControl(plan)
  const items = useWallItems()
  return <BoardView plan={plan} control={control} items={items} mayWrite={mayWrite} undo={undo} />
}

type BoardViewProps = {
  plan: Plan
  control: WallControl
  items: WallItems
  mayWrite: boolean
  undo: Pick<Undo, 'canUndo' | 'canRedo'>
}

/** A board, of today or as it stood: the wall and the strip on wide screens, one at a time on phones. */
export function BoardView({ plan, control, ...board }: BoardViewProps) {
  const shoot = useShoot()
  const isPhone = useIsPhone()
  const [showsVersions, setShowsVersions] = useState(false)
  const Board = isPhone ? PhoneBoard : WideBoard
  return (
    <WallControlProvider value={control}>
      <BoardPlanProvider value={plan}>
        <Suspense fallback={<Waiting />}>
          <Board key={shoot.id} {...board} onVersions={() => setShowsVersions(true)} />
        </Suspense>
        {showsVersions && (
          <Suspense>
            <VersionsDialog open onOpenChange={setShowsVersions} />
          </Suspense>
        )}
      </BoardPlanProvider>
    </WallControlProvider>
  )
}

/** "14 frames, 6 tags" */
function countWords(items: WallItems): string {
  let frames = 0
  let tags = 0
  for (const entry of items.values()) {
    if (entry.kind === 'frame') frames++
    else if (entry.kind === 'tag') tags++
  }
  return `${count(frames, 'frame')}, ${count(tags, 'tag')}`
}

type BoardProps = Omit<BoardViewProps, 'plan' | 'control'> & { onVersions: () => void }

function WideBoard({ items, mayWrite, undo, onVersions }: BoardProps) {
  const control = useWall()
  const shoot = useShoot()
  const inputs = usePictureInputs()
  const addPictures = useAddPictures()
  const make = useNewThings(control)
  useClipboard(control, shoot.id, addPictures)
  useFirstView(control, shoot.id)
  const openFiles = () => inputs.files.current?.click()
  const more = (
    <Menu
      trigger={
        <IconButton label="More for the wall" variant="plain">
          <MoreHorizontal size={17} aria-hidden />
        </IconButton>
      }
      items={[
        { label: 'Mark an area', onSelect: () => make.area() },
        { label: 'Hang a palette', onSelect: () => make.palette() },
        'line',
        { label: 'Select everything', hint: 'Ctrl A', onSelect: () => select(control.state, control.items().keys()) },
      ]}
    />
  )
  return (
    <div className="flex h-full min-h-[560px] flex-col">
      <ScreenBar
        title="Board"
        sub={countWords(items)}
        actions={[
          { label: 'Kept versions', variant: 'quiet', onPress: onVersions },
          ...(mayWrite
            ? [
                { label: 'Write a note', onPress: () => make.note() },
                { label: 'Hang a tag', onPress: () => make.tag() },
                { label: 'Add pictures', variant: 'primary' as const, onPress: openFiles },
              ]
            : []),
        ]}
      >
        <SearchBox items={items} />
        {mayWrite && more}
      </ScreenBar>
      <PictureInputFields {...inputs} onAdd={addPictures} />
      <div className="flex min-h-0 flex-1 border-y border-hair">
        <div className="relative min-w-0 flex-1">
          <Wall items={items} mayWrite={mayWrite} onDropFiles={(files, at) => void addPictures(files, { at })} />
          {items.size === 0 && <EmptyBoard mayWrite={mayWrite} onAdd={openFiles} />}
          <ZoomBar mayWrite={mayWrite} canUndo={undo.canUndo} canRedo={undo.canRedo} />
        </div>
        <Suspense fallback={<div className="w-[250px] flex-none border-l border-hair bg-paper" />}>
          <Inspector items={items} mayWrite={mayWrite} />
        </Suspense>
      </div>
      <Suspense fallback={<div className="h-[211px] flex-none bg-night" />}>
        <Strip mayWrite={mayWrite} />
      </Suspense>
    </div>
  )
}
