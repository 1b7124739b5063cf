import { DndContext, DragOverlay, useDroppable } from '@dnd-kit/core'
import { SortableContext, useSortable, verticalListSortingStrategy } from '@dnd-kit/sortable'
import { CSS } from '@dnd-kit/utilities'
import { GripVertical } from 'lucide-react'
import { type ReactNode, useState } from 'react'
import { LOOSE } from '#shared/domain/board/schema.ts'
import type { PlannedShot } from '#shared/domain/plan/read-plan.ts'
import { cn } from '#src/lib/cn.ts'
import { useBoardPlan } from '../../board-plan.ts'
import { useChangeovers } from '../../use-changeovers.ts'
import { minutesWords } from '../../words.ts'
import type { ShotList } from '../../write-shots.ts'
import { FramePicture } from '../frame-picture.tsx'
import { AddShot } from '../strip/add-shot.tsx'
import { CarriedShot } from '../strip/shot-face.tsx'
import { ShotMenu } from '../strip/shot-menu.tsx'
import { ShotTitle } from '../strip/shot-title.tsx'
import { useNameOfList } from '../strip/use-name-of-list.ts'
import { listDropId, useStripSorting } from '../strip/use-strip-sorting.ts'

type RowProps = {
  planned: PlannedShot
  beforeMin: number | undefined
  mayWrite: boolean
  lists: readonly ShotList[]
  nameOfList: (listId: string) => string
}

function ShotRow({ planned, beforeMin, mayWrite, lists, nameOfList }: RowProps) {
  const { shot, number, cover } = planned
  const [renaming, setRenaming] = useState(false)
  const { attributes, listeners, setNodeRef, setActivatorNodeRef, transform, transition, isDragging } = useSortable({
    id: shot.id,
    disabled: !mayWrite,
  })
  return (
    <li
      ref={setNodeRef}
      style={{ transform: CSS.Translate.toString(transform), transition }}
      className={cn('relative', isDragging && 'opacity-35')}
    >
      {beforeMin !== undefined && beforeMin > 0 && (
        <div className={cn('py-1 pl-[66px] text-[0.8125rem] text-glow-lit', isDragging && 'invisible')}>
          {minutesWords(beforeMin)} of changeover
        </div>
      )}
      <div className="flex min-h-[66px] items-center gap-2.5 rounded-r border border-night-3 bg-night-2">
        <div className="relative h-16 w-[54px] flex-none overflow-hidden bg-night-3">
          {cover && <FramePicture frame={cover} widthPx={54} className="size-full [&_img]:object-[50%_22%]" />}
        </div>
        <span className="w-6 flex-none text-center font-display text-xl font-semibold">{number ?? '–'}</span>
        <ShotTitle
          shot={shot}
          renaming={renaming}
          onDone={() => setRenaming(false)}
          className="min-w-0 flex-1 text-base leading-tight"
        />
        {mayWrite && (
          <>
            <ShotMenu
              shot={shot}
              lists={lists}
              nameOfList={nameOfList}
              onRename={() => setRenaming(true)}
              className="size-11 flex-none"
            />
            <button
              ref={setActivatorNodeRef}
              type="button"
              {...attributes}
              {...listeners}
              aria-label={`Move shot ${number ?? ''} ${shot.title}`.replace('  ', ' ')}
              className="grid size-11 flex-none touch-none place-items-center text-bone-soft"
            >
              <GripVertical size={18} aria-hidden />
            </button>
          </>
        )}
      </div>
    </li>
  )
}

function List({ list, children }: { list: ShotList; children: ReactNode }) {
  const { setNodeRef } = useDroppable({ id: listDropId(list.id) })
  return (
    <SortableContext items={list.shots.map((shot) => shot.id)} strategy={verticalListSortingStrategy}>
      <ol ref={setNodeRef} className="flex min-h-4 flex-col gap-1">
        {children}
      </ol>
    </SortableContext>
  )
}

/** The strip of shots as a list, for a hand. */
export function PhoneShots({ mayWrite }: { mayWrite: boolean }) {
  const plan = useBoardPlan()
  const { before, totalMin } = useChangeovers(plan)
  const nameOfList = useNameOfList()
  const { lists, activeId, context } = useStripSorting(nameOfList)
  const carried = activeId === null ? undefined : plan.shots.get(activeId)
  const shown = lists.filter((list) => list.id !== LOOSE || list.shots.length > 0)
  return (
    <section aria-label="Shots, in order" className="on-night min-h-full bg-night px-3 pt-3 pb-8 text-bone">
      {plan.shots.size > 1 && (
        <p className="mb-2 text-[0.8125rem] text-bone-soft">{minutesWords(totalMin)} of changeover</p>
      )}
      {plan.shots.size === 0 && (
        <p className="mb-3 text-base text-bone-soft">
          {mayWrite ? 'Write down the pictures to make; each is one shot.' : 'No shots are written down yet.'}
        </p>
      )}
      <DndContext {...context}>
        {shown.map((list) => (
          <div key={list.id}>
            {shown.length > 1 && (
              <h2 className="pt-3 pb-1.5 font-sans text-sm font-semibold text-bone-soft">{nameOfList(list.id)}</h2>
            )}
            <List list={list}>
              {list.shots.map((shot) => {
                const planned = plan.shots.get(shot.id)
                return planned ? (
                  <ShotRow
                    key={shot.id}
                    planned={planned}
                    beforeMin={before.get(shot.id)}
                    mayWrite={mayWrite}
                    lists={lists}
                    nameOfList={nameOfList}
                  />
                ) : null
              })}
            </List>
          </div>
        ))}
        <DragOverlay dropAnimation={null}>{carried && <CarriedShot planned={carried} />}</DragOverlay>
      </DndContext>
      {mayWrite && (
        <div className="pt-4">
          <AddShot lists={lists} className="!h-14 !w-full flex-row" />
        </div>
      )}
    </section>
  )
}
