import { Maximize, Minus, Plus, Redo2, Undo2 } from 'lucide-react'
import { IconButton } from '#src/ui/button.tsx'
import { fitAll, zoomBy } from '../gestures/view-moves.ts'
import { useStore } from '../use-wall-state.ts'
import { useWall } from '../wall-control.ts'
import { setView } from '../wall-state.ts'

type ZoomBarProps = { mayWrite: boolean; canUndo: boolean; canRedo: boolean }

/** Zoom, and taking back one's own steps, in the wall's lower corner. */
export function ZoomBar({ mayWrite, canUndo, canRedo }: ZoomBarProps) {
  const control = useWall()
  const { state } = control
  const percent = useStore(state.view, ({ zoom }) => Math.round(zoom * 100))
  const lifeSize = () => {
    const view = state.view.get()
    const { widthPx, heightPx } = state.viewport.get()
    const middle = { x: view.x + widthPx / view.zoom / 2, y: view.y + heightPx / view.zoom / 2 }
    setView(state, { x: middle.x - widthPx / 2, y: middle.y - heightPx / 2, zoom: 1 })
  }
  return (
    <div className="absolute bottom-3 left-3 flex items-start gap-2 max-md:flex-col-reverse">
      <div role="group" aria-label="Zoom" className="flex items-center rounded-r border border-hair bg-paper">
        <IconButton label="Zoom out" className="!size-8 max-md:!size-11" onClick={() => zoomBy(control, 0.8)}>
          <Minus size={15} aria-hidden />
        </IconButton>
        <button
          type="button"
          aria-label={`Zoom ${percent} per cent: show at life size`}
          className="min-w-12 rounded-r py-1 text-xs text-ink-soft hover:text-ink max-md:min-h-11"
          onClick={lifeSize}
        >
          {percent} %
        </button>
        <IconButton label="Zoom in" className="!size-8 max-md:!size-11" onClick={() => zoomBy(control, 1.25)}>
          <Plus size={15} aria-hidden />
        </IconButton>
        <IconButton label="Show everything" className="!size-8 max-md:!size-11" onClick={() => fitAll(control)}>
          <Maximize size={14} aria-hidden />
        </IconButton>
      </div>
      {mayWrite && (
        <div role="group" aria-label="Own changes" className="flex items-center rounded-r border border-hair bg-paper">
          <IconButton
            label="Undo"
            className="!size-8 max-md:!size-11"
            disabled={!canUndo}
            onClick={() => control.undo()}
          >
            <Undo2 size={15} aria-hidden />
          </IconButton>
          <IconButton
            label="Redo"
            className="!size-8 max-md:!size-11"
            disabled={!canRedo}
            onClick={() => control.redo()}
          >
            <Redo2 size={15} aria-hidden />
          </IconButton>
        </div>
      )}
    </div>
  )
}
