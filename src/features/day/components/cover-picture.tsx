import type { PlannedShot } from '#shared/domain/plan/read-plan.ts'
import { cn } from '#src/lib/cn.ts'
import { useLocalPicture } from '#src/realtime/outbox/use-outbox.ts'
import { Picture } from '#src/ui/picture.tsx'

export type CoverPictureProps = { shot: PlannedShot; className?: string }

/** The frame a shot is after, or an empty print of the same size. The title stands beside it, so it has no words of its own. */
export function CoverPicture({ shot, className }: CoverPictureProps) {
  const picture = shot.cover?.picture
  const localUrl = useLocalPicture(picture?.uploadId ?? '')
  if (!picture)
    return (
      <span
        aria-hidden
        className={cn('block flex-none rounded-sm border border-dashed border-night-edge', className)}
      />
    )
  return (
    <Picture
      uploadId={picture.uploadId}
      state={picture.state}
      localUrl={localUrl}
      alt=""
      sizes="96px"
      className={cn('flex-none rounded-sm', className)}
    />
  )
}
