import { useState } from 'react'
import type { Frame } from '#shared/domain/board/schema.ts'
import type { PlannedShot } from '#shared/domain/plan/read-plan.ts'
import { frames as frameItems } from '#shared/realtime/documents.ts'
import { cn } from '#src/lib/cn.ts'
import { useLocalPicture } from '#src/realtime/outbox/use-outbox.ts'
import { useItems } from '#src/realtime/use-items.ts'
import { Button } from '#src/ui/button.tsx'
import { Dialog } from '#src/ui/dialog.tsx'
import { Picture } from '#src/ui/picture.tsx'
import { Cover } from './cover.tsx'

export type CoverChoiceProps = {
  planned: PlannedShot
  mayWrite: boolean
  onChange: (frameId: Frame['id'] | null) => void
}

/** The frame from the board that this shot is after. */
export function CoverChoice({ planned, mayWrite, onChange }: CoverChoiceProps) {
  const [isOpen, setIsOpen] = useState(false)
  const frames = [...useItems('board', frameItems).values()]
  const { cover } = planned
  const choose = (frameId: Frame['id'] | null) => {
    onChange(frameId)
    setIsOpen(false)
  }
  return (
    <div className="flex items-center gap-3">
      <Cover shot={planned} className="h-[84px] w-[66px] rounded-sm" />
      <div className="min-w-0 text-sm">
        <p className="label-small">Cover frame</p>
        <p className="line-clamp-2">{cover ? cover.caption || 'A frame without a caption' : 'None chosen'}</p>
        {mayWrite && (
          <Button size="small" className="mt-1.5" onClick={() => setIsOpen(true)}>
            {cover ? 'Choose another' : 'Choose a frame'}
          </Button>
        )}
      </div>
      <Dialog
        wide
        open={isOpen}
        onOpenChange={setIsOpen}
        title="Choose the cover frame"
        description="From the pictures on the board."
        {...(cover ? { footer: <Button onClick={() => choose(null)}>No cover</Button> } : {})}
      >
        {frames.length === 0 ? (
          <p className="py-6 text-center text-ink-soft">There is no picture on the board yet. Pin one there first.</p>
        ) : (
          <div className="grid grid-cols-[repeat(auto-fill,minmax(104px,1fr))] gap-3">
            {frames.map((frame) => (
              <FrameButton
                key={frame.id}
                frame={frame}
                isChosen={frame.id === cover?.id}
                onPress={() => choose(frame.id)}
              />
            ))}
          </div>
        )}
      </Dialog>
    </div>
  )
}

function FrameButton({ frame, isChosen, onPress }: { frame: Frame; isChosen: boolean; onPress: () => void }) {
  const localUrl = useLocalPicture(frame.picture.uploadId)
  const caption = frame.caption || 'Without a caption'
  return (
    <button
      type="button"
      aria-pressed={isChosen}
      onClick={onPress}
      className={cn(
        'flex flex-col rounded-r border bg-print p-1 text-left hover:border-ink-soft',
        isChosen ? 'border-velvet ring-1 ring-velvet' : 'border-hair',
      )}
    >
      <Picture
        uploadId={frame.picture.uploadId}
        state={frame.picture.state}
        localUrl={localUrl}
        tint={frame.palette[0]}
        alt=""
        sizes="112px"
        className="aspect-[4/5] w-full"
      />
      <span className="line-clamp-2 px-0.5 pt-1 text-xs">{caption}</span>
    </button>
  )
}
