import { useState } from 'react'
import { cn } from '#src/lib/cn.ts'
import { useShoot } from '#src/realtime/shoot-realtime.tsx'
import type { Undo } from '#src/realtime/use-undo.ts'
import { ScreenBar } from '#src/ui/screen-bar.tsx'
import { Sheet } from '#src/ui/sheet.tsx'
import { useAddPictures } from '../../use-add-pictures.ts'
import { useClipboard } from '../../use-clipboard.ts'
import { useNewThings } from '../../use-new-things.ts'
import { useWall } from '../../wall-control.ts'
import type { WallItems } from '../../wall-item.ts'
import { EmptyBoard } from '../empty-board.tsx'
import { InspectorBody, useInspected } from '../inspector/inspector.tsx'
import { PictureInputFields, usePictureInputs } from '../picture-inputs.tsx'
import { SearchBox } from '../search-box.tsx'
import { ZoomBar } from '../zoom-bar.tsx'
import { PhoneAreas } from './phone-areas.tsx'
import { PhoneShots } from './phone-shots.tsx'
import { PhoneWall } from './phone-wall.tsx'

const VIEWS = [
  { value: 'areas', label: 'By area' },
  { value: 'wall', label: 'Wall' },
  { value: 'shots', label: 'Shots' },
] as const
type PhoneView = (typeof VIEWS)[number]['value']

type PhoneBoardProps = {
  items: WallItems
  mayWrite: boolean
  undo: Pick<Undo, 'canUndo' | 'canRedo'>
  onVersions: () => void
}

/** The board in a hand: prints by area, the wall, or the shots, one press apart. */
export function PhoneBoard({ items, mayWrite, undo, onVersions }: PhoneBoardProps) {
  const control = useWall()
  const shoot = useShoot()
  const inputs = usePictureInputs()
  const addPictures = useAddPictures()
  const make = useNewThings(control)
  useClipboard(control, shoot.id, addPictures)
  const [view, setView] = useState<PhoneView>('areas')
  const [searching, setSearching] = useState(false)
  const [detail, setDetail] = useState(false)
  const { title, entries } = useInspected(items)
  // What was open has been removed.
  if (detail && entries.length === 0) setDetail(false)
  const openFiles = () => inputs.files.current?.click()

  const makeThing = (kind: 'note' | 'tag') => {
    make[kind]()
    // Written in the sheet: there is no room for it on the print itself.
    control.state.editing.set(null)
    setDetail(true)
  }

  return (
    <div className="flex h-full flex-col bg-surround">
      <ScreenBar
        title="Board"
        float
        actions={[
          { label: searching ? 'Close the search' : 'Search the wall', onPress: () => setSearching(!searching) },
          { label: 'Kept versions', onPress: onVersions },
          ...(mayWrite
            ? [
                { label: 'Add pictures', onPress: openFiles },
                { label: 'Write a note', onPress: () => makeThing('note') },
                { label: 'Hang a tag', onPress: () => makeThing('tag') },
                ...(view === 'shots'
                  ? []
                  : [
                      {
                        label: 'Pin from camera',
                        variant: 'primary' as const,
                        onPress: () => inputs.camera.current?.click(),
                      },
                    ]),
              ]
            : []),
        ]}
      >
        <div
          role="group"
          aria-label="What is shown"
          className="grid w-full grid-cols-3 overflow-hidden rounded-r border border-edge"
        >
          {VIEWS.map(({ value, label }) => (
            <button
              key={value}
              type="button"
              aria-pressed={view === value}
              onClick={() => setView(value)}
              className={cn(
                'min-h-11 border-edge text-sm font-semibold not-first:border-l',
                view === value ? 'bg-ink text-white' : 'bg-white text-ink',
              )}
            >
              {label}
            </button>
          ))}
        </div>
        {searching && <SearchBox items={items} onFound={() => setDetail(view !== 'wall')} />}
      </ScreenBar>
      <PictureInputFields {...inputs} onAdd={addPictures} />
      <div className={cn('relative min-h-0 flex-1', view === 'wall' ? 'overflow-hidden' : 'overflow-y-auto')}>
        {view === 'areas' && <PhoneAreas items={items} onOpen={() => setDetail(true)} />}
        {view === 'wall' && (
          <PhoneWall
            items={items}
            mayWrite={mayWrite}
            onDetail={() => setDetail(true)}
            onDropFiles={(files, at) => void addPictures(files, { at })}
            bar={<ZoomBar mayWrite={mayWrite} canUndo={undo.canUndo} canRedo={undo.canRedo} />}
          />
        )}
        {view === 'shots' && <PhoneShots mayWrite={mayWrite} />}
        {items.size === 0 && view !== 'shots' && <EmptyBoard mayWrite={mayWrite} onAdd={openFiles} />}
      </div>
      <Sheet open={detail} onOpenChange={setDetail} title={title}>
        <InspectorBody items={items} mayWrite={mayWrite} />
      </Sheet>
    </div>
  )
}
