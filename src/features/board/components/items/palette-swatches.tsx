import type { Palette } from '#shared/domain/board/schema.ts'
import { patchItem } from '#shared/realtime/collection.ts'
import { palettes } from '#shared/realtime/documents.ts'
import { useStore } from '../../use-wall-state.ts'
import { useWall } from '../../wall-control.ts'
import { EditInPlace } from './edit-in-place.tsx'

export function PaletteSwatches({ palette }: { palette: Palette }) {
  const { doc, state } = useWall()
  const editing = useStore(state.editing, (id) => id === palette.id)
  return (
    <>
      <div className="flex h-(--box-h)">
        {palette.colours.map((colour, index) => (
          <i key={index} className="block min-w-0 flex-1" style={{ background: colour }} />
        ))}
      </div>
      <div className="pt-1 text-xs text-ink-soft">
        {editing ? (
          <EditInPlace
            label="Title of the palette"
            line
            value={palette.title}
            maxLength={120}
            onWrite={(title) => patchItem(doc, palettes, palette.id, { title })}
          />
        ) : (
          palette.title
        )}
      </div>
    </>
  )
}
