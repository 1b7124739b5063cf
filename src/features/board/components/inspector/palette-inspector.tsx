import { Plus, X } from 'lucide-react'
import type { Palette } from '#shared/domain/board/schema.ts'
import { patchItem } from '#shared/realtime/collection.ts'
import { palettes } from '#shared/realtime/documents.ts'
import { Button } from '#src/ui/button.tsx'
import { useDraft } from '#src/lib/use-draft.ts'
import { useWall } from '../../wall-control.ts'
import { ColourCompare } from './colour-compare.tsx'
import { TextRow } from './row.tsx'
import { SwatchStrip } from './swatch-strip.tsx'

const MOST = 12

type ColourRowProps = { colour: string; onWrite: (colour: string) => void; onRemove: (() => void) | null }

function ColourRow({ colour, onWrite, onRemove }: ColourRowProps) {
  const draft = useDraft(colour, onWrite)
  return (
    <li className="flex items-center gap-2">
      <input
        type="color"
        aria-label={`Colour ${colour}`}
        value={draft.value}
        onChange={(event) => draft.change(event.target.value)}
        onBlur={draft.leave}
        className="h-8 w-12 flex-none cursor-pointer rounded-r border border-edge bg-white p-0.5 max-md:h-11"
      />
      <span className="flex-1 text-[0.78125rem]">{draft.value}</span>
      {onRemove && (
        <button
          type="button"
          aria-label={`Take ${colour} out`}
          className="grid size-7 place-items-center rounded-r text-ink-soft hover:bg-ink/5 hover:text-ink max-md:size-11"
          onClick={onRemove}
        >
          <X size={14} aria-hidden />
        </button>
      )}
    </li>
  )
}

export function PaletteInspector({ palette, mayWrite }: { palette: Palette; mayWrite: boolean }) {
  const { doc } = useWall()
  const write = (colours: string[]) => patchItem(doc, palettes, palette.id, { colours })
  return (
    <>
      <SwatchStrip colours={palette.colours} label="Palette" />
      <ColourCompare palette={palette.colours} prefer={null} without={palette.id} />
      <div className="mt-2">
        <TextRow
          label="Title"
          value={palette.title}
          maxLength={120}
          mayWrite={mayWrite}
          onWrite={(title) => patchItem(doc, palettes, palette.id, { title })}
        />
      </div>
      {mayWrite && (
        <>
          <ul className="mt-2 flex flex-col gap-1">
            {palette.colours.map((colour, index) => (
              <ColourRow
                key={index}
                colour={colour}
                onWrite={(next) => write(palette.colours.map((other, at) => (at === index ? next : other)))}
                onRemove={
                  palette.colours.length > 1 ? () => write(palette.colours.filter((_, at) => at !== index)) : null
                }
              />
            ))}
          </ul>
          {palette.colours.length < MOST && (
            <Button
              size="small"
              variant="quiet"
              className="mt-1 -ml-2"
              onClick={() => write([...palette.colours, palette.colours.at(-1) ?? '#808080'])}
            >
              <Plus size={14} aria-hidden />
              Add a colour
            </Button>
          )}
        </>
      )}
    </>
  )
}
