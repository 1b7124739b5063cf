import type { ReactNode } from 'react'
import type { Point } from '#shared/domain/board/geometry.ts'
import { useShoot } from '#src/realtime/shoot-realtime.tsx'
import { Button } from '#src/ui/button.tsx'
import { useStore } from '../../use-wall-state.ts'
import { useFirstView } from '../../use-wall-control.ts'
import { selectedItems, useWall } from '../../wall-control.ts'
import type { WallItems } from '../../wall-item.ts'
import { Wall } from '../wall.tsx'

type PhoneWallProps = {
  items: WallItems
  mayWrite: boolean
  onDetail: () => void
  onDropFiles: (files: File[], at: Point) => void
  bar: ReactNode
}

/** The wall on a phone; what is selected opens from a bar above it, so that it stays in sight while it is moved. */
export function PhoneWall({ items, mayWrite, onDetail, onDropFiles, bar }: PhoneWallProps) {
  const control = useWall()
  const shoot = useShoot()
  useFirstView(control, shoot.id)
  const count = useStore(control.state.selection, (selection) => selection.size)
  const entries = count > 0 ? selectedItems(control) : []
  return (
    <>
      <Wall items={items} mayWrite={mayWrite} onDropFiles={onDropFiles} />
      {entries.length > 0 ? (
        <div className="absolute inset-x-3 top-3 flex items-center gap-3 rounded-r border border-hair bg-paper py-1.5 pr-1.5 pl-3.5">
          <span className="min-w-0 flex-1 truncate text-sm">{control.nameOf(entries)}</span>
          <Button onClick={onDetail}>Open</Button>
        </div>
      ) : (
        items.size > 0 && (
          <p className="pointer-events-none absolute top-0 left-1/2 -translate-x-1/2 rounded-b-r bg-paper px-3 py-1 text-[0.8125rem] whitespace-nowrap text-ink-soft">
            {mayWrite ? 'Press long to pick up, two fingers to zoom' : 'Two fingers to zoom'}
          </p>
        )
      )}
      {bar}
    </>
  )
}
