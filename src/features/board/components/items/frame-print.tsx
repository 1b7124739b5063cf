import { PRINT_INSET } from '#shared/domain/board/print.ts'
import type { Frame } from '#shared/domain/board/schema.ts'
import { patchItem } from '#shared/realtime/collection.ts'
import { frames } from '#shared/realtime/documents.ts'
import { useStore } from '../../use-wall-state.ts'
import { useWall } from '../../wall-control.ts'
import { FramePicture } from '../frame-picture.tsx'
import { EditInPlace } from './edit-in-place.tsx'

/** A frame on the wall: a print with its caption below and who hung it. */
export function FramePrint({ frame }: { frame: Frame }) {
  const { doc, state } = useWall()
  const editing = useStore(state.editing, (id) => id === frame.id)
  const detail = useStore(state.detail)
  return (
    <figure className="flex min-h-(--box-h) flex-col rounded-sm bg-print px-1.5 pt-1.5 shadow-print">
      <div className="overflow-hidden" style={{ height: `calc(var(--box-h) - ${PRINT_INSET.h}px)` }}>
        <FramePicture frame={frame} widthPx={frame.box[2] * detail} />
      </div>
      <figcaption className="flex flex-1 items-start justify-between gap-2 px-0.5 pt-[5px] pb-[7px] text-xs leading-[1.3]">
        {editing ? (
          <EditInPlace
            label="Caption"
            line
            value={frame.caption}
            maxLength={300}
            onWrite={(caption) => patchItem(doc, frames, frame.id, { caption })}
            className="px-0.5"
          />
        ) : (
          <span className="line-clamp-3 min-w-0 break-words">{frame.caption}</span>
        )}
        {frame.made && <span className="flex-none text-ink-faint">{frame.made.initials}</span>}
      </figcaption>
    </figure>
  )
}
