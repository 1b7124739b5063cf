import { cn } from '#src/lib/cn.ts'
import { count } from '#src/lib/format.ts'
import { useUnreadable } from '#src/realtime/use-unreadable.ts'

/** Says so when the shoot holds something that this page cannot read, instead of passing over it in silence. */
export function NotShown({ className }: { className?: string }) {
  const unreadable = useUnreadable()
  if (unreadable === 0) return null
  return (
    <p role="status" className={cn('on-night no-print text-bone-soft', className)}>
      {count(unreadable, 'thing')} here cannot be shown: this page does not know what{' '}
      {unreadable === 1 ? 'it is' : 'they are'}. Nothing is lost; load the page again, or ask whoever looks after
      Sconce.
    </p>
  )
}
