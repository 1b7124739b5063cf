import { type KeyboardEvent, useState } from 'react'
import type { Shot } from '#shared/domain/board/schema.ts'
import { patchItem } from '#shared/realtime/collection.ts'
import { shots } from '#shared/realtime/documents.ts'
import { cn } from '#src/lib/cn.ts'
import { useWall } from '../../wall-control.ts'

type ShotTitleProps = { shot: Shot; renaming: boolean; onDone: () => void; className?: string }

/** A shot's title, or the field in its place. An empty title leaves the old one. */
export function ShotTitle({ shot, renaming, onDone, className }: ShotTitleProps) {
  const { doc } = useWall()
  const [text, setText] = useState<string | null>(null)
  if (!renaming) return <div className={cn('break-words', className)}>{shot.title}</div>
  const end = (keep: boolean) => {
    const title = (text ?? shot.title).trim()
    if (keep && title !== '' && title !== shot.title) patchItem(doc, shots, shot.id, { title })
    setText(null)
    onDone()
  }
  const handleKey = (event: KeyboardEvent) => {
    event.stopPropagation()
    if (event.key === 'Enter') end(true)
    else if (event.key === 'Escape') end(false)
  }
  return (
    <input
      autoFocus
      aria-label="Title of the shot"
      maxLength={120}
      value={text ?? shot.title}
      onFocus={(event) => event.currentTarget.select()}
      onChange={(event) => setText(event.target.value)}
      onBlur={() => end(true)}
      onKeyDown={handleKey}
      className={cn('w-full rounded-r border border-night-edge bg-white px-1 py-0.5 text-ink', className)}
    />
  )
}
