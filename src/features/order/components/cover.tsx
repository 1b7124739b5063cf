import type { PlannedShot } from '#shared/domain/plan/read-plan.ts'
import { cn } from '#src/lib/cn.ts'
import { useLocalPicture } from '#src/realtime/outbox/use-outbox.ts'
import { Picture } from '#src/ui/picture.tsx'

export type CoverProps = { shot: PlannedShot; className?: string }

/** The frame a shot is after, or an empty print. The title stands beside it, so it has no words of its own. */
export function Cover({ shot, className }: CoverProps) {
  const picture = shot.cover?.picture
  const localUrl = useLocalPicture(picture?.uploadId ?? '')
  if (!picture) return <span aria-hidden className={cn('block flex-none bg-ground', className)} />
  return (
    <Picture
      uploadId={picture.uploadId}
      state={picture.state}
      localUrl={localUrl}
      tint={shot.cover?.palette[0]}
      alt=""
      sizes="96px"
      focus="50% 25%"
      className={cn('flex-none', className)}
    />
  )
}
