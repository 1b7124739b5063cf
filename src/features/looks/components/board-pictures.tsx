import { frames } from '#shared/realtime/documents.ts'
import { cn } from '#src/lib/cn.ts'
import { useItems } from '#src/realtime/use-items.ts'
import { Button } from '#src/ui/button.tsx'
import { Dialog } from '#src/ui/dialog.tsx'
import { WardrobePicture } from './wardrobe-picture.tsx'

export type BoardPicturesProps = {
  open: boolean
  onOpenChange: (open: boolean) => void
  /** Upload ids that hang on the look already. */
  chosen: readonly string[]
  onToggle: (uploadId: string) => void
}

/** Every picture of the board, to choose from. */
export function BoardPictures({ open, onOpenChange, chosen, onToggle }: BoardPicturesProps) {
  const all = useItems('board', frames)
  const pictures = new Map([...all.values()].map((frame) => [frame.picture.uploadId, frame]))
  return (
    <Dialog
      wide
      open={open}
      onOpenChange={onOpenChange}
      title="Pictures on the board"
      description="Press a picture to pin it to the look, and again to take it off."
      footer={
        <Button variant="primary" onClick={() => onOpenChange(false)}>
          Done
        </Button>
      }
    >
      {pictures.size === 0 && <p className="py-8 text-center text-ink-soft">Nothing hangs on the board yet.</p>}
      <ul className="grid grid-cols-3 gap-2.5 sm:grid-cols-4">
        {[...pictures].map(([uploadId, frame]) => {
          const isChosen = chosen.includes(uploadId)
          return (
            <li key={uploadId}>
              <button
                type="button"
                aria-pressed={isChosen}
                onClick={() => onToggle(uploadId)}
                className={cn(
                  'block w-full rounded-sm bg-print p-1 text-left shadow-print',
                  isChosen && 'outline-2 outline-offset-1 outline-draft',
                )}
              >
                <WardrobePicture
                  uploadId={uploadId}
                  alt={frame.caption || 'A picture without a caption'}
                  state={frame.picture.state}
                  size={frame.picture}
                  tint={frame.palette[0]}
                  sizes="170px"
                  className="aspect-[4/5]"
                />
                <span className="block truncate px-0.5 pt-1 text-xs">
                  {isChosen ? '✓ pinned' : frame.caption || '\u00a0'}
                </span>
              </button>
            </li>
          )
        })}
      </ul>
    </Dialog>
  )
}
