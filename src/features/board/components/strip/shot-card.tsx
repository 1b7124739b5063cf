import { useSortable } from '@dnd-kit/sortable'
import { CSS } from '@dnd-kit/utilities'
import { GripVertical } from 'lucide-react'
import { useState } from 'react'
import type { PlannedShot } from '#shared/domain/plan/read-plan.ts'
import { cn } from '#src/lib/cn.ts'
import { useStore } from '../../use-wall-state.ts'
import { useWall } from '../../wall-control.ts'
import { minutesWords } from '../../words.ts'
import type { ShotList } from '../../write-shots.ts'
import { ShotFace } from './shot-face.tsx'
import { ShotMenu } from './shot-menu.tsx'
import { ShotTitle } from './shot-title.tsx'

type ShotCardProps = {
  planned: PlannedShot
  /** Minutes of changeover from here to the next shot of the list; null after the last, undefined while unknown. */
  jointMin: number | null | undefined
  mayWrite: boolean
  lists: readonly ShotList[]
  nameOfList: (listId: string) => string
}

/** One shot of the strip, and the joint to the next. */
export function ShotCard({ planned, jointMin, mayWrite, lists, nameOfList }: ShotCardProps) {
  const { shot, number } = planned
  const { state } = useWall()
  const isOver = useStore(state.overShot, (id) => id === shot.id)
  const [renaming, setRenaming] = useState(false)
  const sortable = useSortable({ id: shot.id, disabled: !mayWrite })
  const { attributes, listeners, setNodeRef, setActivatorNodeRef, transform, transition, isDragging } = sortable
  const isTarget = sortable.isOver
  return (
    <li
      ref={setNodeRef}
      data-shot-id={shot.id}
      className={cn('group flex flex-none', isDragging && 'opacity-35')}
      style={{ transform: CSS.Translate.toString(transform), transition }}
      {...(renaming ? {} : listeners)}
    >
      <div className="w-28">
        <ShotFace
          planned={planned}
          className={cn(
            (isOver || (isTarget && !isDragging)) && 'outline-2 outline-glow-lit',
            mayWrite && 'cursor-grab',
          )}
        >
          {isOver && (
            <span className="absolute inset-x-0 top-0 bg-glow-lit p-1 text-center text-xs font-semibold text-[#1f1508]">
              As cover
            </span>
          )}
          {mayWrite && (
            <>
              <button
                ref={setActivatorNodeRef}
                type="button"
                {...attributes}
                aria-label={`Move shot ${number ?? ''} ${shot.title}`.replace('  ', ' ')}
                className="absolute top-1 left-1 grid size-6 cursor-grab place-items-center rounded-r bg-night/70 text-bone opacity-0 group-hover:opacity-100 focus-visible:opacity-100 pointer-coarse:size-9 pointer-coarse:opacity-100"
              >
                <GripVertical size={14} aria-hidden />
              </button>
              <ShotMenu
                shot={shot}
                lists={lists}
                nameOfList={nameOfList}
                onRename={() => setRenaming(true)}
                className="absolute top-1 right-1 size-6 bg-night/70 opacity-0 group-hover:opacity-100 focus-visible:opacity-100 data-[state=open]:opacity-100 pointer-coarse:size-9 pointer-coarse:opacity-100"
              />
            </>
          )}
        </ShotFace>
        <div onDoubleClick={() => mayWrite && setRenaming(true)}>
          <ShotTitle
            shot={shot}
            renaming={renaming}
            onDone={() => setRenaming(false)}
            className="mt-[5px] line-clamp-2 text-xs leading-[1.25]"
          />
        </div>
      </div>
      {jointMin !== null && (
        <div
          className={cn(
            'flex h-[122px] w-[52px] flex-col items-center justify-center gap-[3px] text-[11px] before:w-px before:flex-1 before:bg-night-3 after:w-px after:flex-1 after:bg-night-3',
            jointMin ? 'text-glow-lit' : 'text-[#a39b90]',
            isDragging && 'invisible',
          )}
        >
          {jointMin === undefined ? '' : jointMin === 0 ? '0' : minutesWords(jointMin)}
        </div>
      )}
    </li>
  )
}
