import { Plus } from 'lucide-react'
import { type FormEvent, useState } from 'react'
import { cn } from '#src/lib/cn.ts'
import { Button } from '#src/ui/button.tsx'
import { announce, asStep, useWall } from '../../wall-control.ts'
import { type ShotList, addShot } from '../../write-shots.ts'

/** Writes down a shot: its title is all that is needed; it stands at the end of the first day. */
export function AddShot({ lists, className }: { lists: readonly ShotList[]; className?: string }) {
  const control = useWall()
  const [title, setTitle] = useState<string | null>(null)
  const handleSubmit = (event: FormEvent) => {
    event.preventDefault()
    const words = title?.trim() ?? ''
    if (words === '') return
    asStep(control, () => addShot(control.doc, lists, words))
    announce(control, `Shot ${words} added`)
    setTitle('')
  }
  if (title === null) {
    return (
      <button
        type="button"
        onClick={() => setTitle('')}
        className={cn(
          'flex h-[122px] w-28 flex-none flex-col items-center justify-center gap-1.5 rounded-sm border border-dashed border-night-edge text-xs text-bone-soft hover:border-bone hover:text-bone',
          className,
        )}
      >
        <Plus size={18} aria-hidden />
        Add a shot
      </button>
    )
  }
  return (
    <form
      onSubmit={handleSubmit}
      className="flex w-44 flex-none flex-col gap-2"
      onKeyDown={(event) => {
        if (event.key === 'Escape') setTitle(null)
      }}
    >
      <textarea
        autoFocus
        rows={2}
        aria-label="Title of the shot"
        placeholder="What is the picture?"
        maxLength={120}
        value={title}
        onChange={(event) => setTitle(event.target.value.replace(/\n/g, ' '))}
        onKeyDown={(event) => {
          if (event.key === 'Enter') handleSubmit(event)
        }}
        className="w-full resize-none rounded-r border border-night-edge bg-white px-2 py-1.5 text-sm text-ink max-md:text-base"
      />
      <div className="flex gap-2">
        <Button type="submit" size="small" variant="night" disabled={title.trim() === ''}>
          Add
        </Button>
        <Button size="small" variant="night" onClick={() => setTitle(null)}>
          Done
        </Button>
      </div>
    </form>
  )
}
