import { DndContext, DragOverlay, useDroppable } from '@dnd-kit/core'
import { SortableContext, horizontalListSortingStrategy } from '@dnd-kit/sortable'
import { Fragment } from 'react'
import { LOOSE } from '#shared/domain/board/schema.ts'
import { cn } from '#src/lib/cn.ts'
import { useBoardPlan } from '../../board-plan.ts'
import { useChangeovers } from '../../use-changeovers.ts'
import { minutesWords } from '../../words.ts'
import type { ShotList } from '../../write-shots.ts'
import { AddShot } from './add-shot.tsx'
import { ShotCard } from './shot-card.tsx'
import { CarriedShot } from './shot-face.tsx'
import { useNameOfList } from './use-name-of-list.ts'
import { listDropId, useStripSorting } from './use-strip-sorting.ts'

type ListProps = {
  list: ShotList
  lists: readonly ShotList[]
  joints: ReadonlyMap<string, number>
  mayWrite: boolean
  nameOfList: (listId: string) => string
}

function List({ list, lists, joints, mayWrite, nameOfList }: ListProps) {
  const plan = useBoardPlan()
  const { setNodeRef, isOver } = useDroppable({ id: listDropId(list.id) })
  return (
    <SortableContext items={list.shots.map((shot) => shot.id)} strategy={horizontalListSortingStrategy}>
      <ol
        ref={setNodeRef}
        aria-label={nameOfList(list.id)}
        className={cn('flex flex-none items-stretch', list.id === LOOSE && 'gap-3')}
      >
        {list.shots.map((shot, index) => {
          const planned = plan.shots.get(shot.id)
          const next = list.shots[index + 1]
          const jointMin = !next || list.id === LOOSE ? null : joints.get(next.id)
          return planned ? (
            <ShotCard
              key={shot.id}
              planned={planned}
              jointMin={jointMin}
              mayWrite={mayWrite}
              lists={lists}
              nameOfList={nameOfList}
            />
          ) : null
        })}
        {list.shots.length === 0 && list.id !== LOOSE && (
          <li
            className={`grid h-[122px] w-28 place-items-center rounded-sm border border-dashed p-2 text-center text-xs text-bone-soft ${isOver ? 'border-glow-lit' : 'border-night-3'}`}
          >
            No shots on this day yet
          </li>
        )}
      </ol>
    </SortableContext>
  )
}

/** The shots in order below the wall, day after day, loose ones last, with the minutes of changeover at the joints. */
export function Strip({ mayWrite }: { mayWrite: boolean }) {
  const plan = useBoardPlan()
  const { before, totalMin } = useChangeovers(plan)
  const nameOfList = useNameOfList()
  const { lists, activeId, context } = useStripSorting(nameOfList)
  const carried = activeId === null ? undefined : plan.shots.get(activeId)
  const shown = lists.filter((list) => list.id !== LOOSE || list.shots.length > 0)
  const several = shown.length > 1
  const hint = [
    mayWrite && plan.shots.size > 1 ? 'Drag to reorder' : '',
    plan.shots.size > 1 ? `${minutesWords(totalMin)} of changeover` : '',
  ].filter((part) => part !== '')
  return (
    <section aria-label="Shots, in order" className="on-night min-h-[211px] flex-none bg-night pt-2.5 text-bone">
      <header className="flex items-baseline gap-3 px-6">
        <h2 className="text-lg">Shots, in order</h2>
        <span className="text-xs text-bone-soft">{hint.join(' · ')}</span>
      </header>
      <DndContext {...context}>
        <div
          // Without anything to press in it, the keyboard could not scroll it.
          {...(mayWrite ? {} : { tabIndex: 0, role: 'group', 'aria-label': 'All shots' })}
          className="flex items-start gap-6 overflow-x-auto px-6 pt-2 pb-3"
        >
          {shown.map((list) => (
            <Fragment key={list.id}>
              {several && (
                <div className="grid h-[122px] flex-none place-items-center border-l border-night-edge pl-2">
                  <span className="rotate-180 text-xs leading-tight text-bone-soft [writing-mode:vertical-rl]">
                    {nameOfList(list.id)}
                  </span>
                </div>
              )}
              <List list={list} lists={lists} joints={before} mayWrite={mayWrite} nameOfList={nameOfList} />
            </Fragment>
          ))}
          {mayWrite && <AddShot lists={lists} />}
          {!mayWrite && plan.shots.size === 0 && (
            <p className="py-8 text-sm text-bone-soft">No shots are written down yet.</p>
          )}
        </div>
        <DragOverlay dropAnimation={null}>{carried && <CarriedShot planned={carried} />}</DragOverlay>
      </DndContext>
    </section>
  )
}
