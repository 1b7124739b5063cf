import type { PlannedLook } from '#shared/domain/plan/read-plan.ts'
import { useState } from 'react'
import { Dialog } from '#src/ui/dialog.tsx'
import { LookPicture } from './look-picture.tsx'

export type LookPicturesProps = { planned: PlannedLook }

/** The look's pictures on the neutral wall, the first one large; each opens in full. */
export function LookPictures({ planned: { look, sitter } }: LookPicturesProps) {
  const [open, setOpen] = useState<string | null>(null)
  const [hero, ...others] = look.pictureIds
  const name = (index: number) =>
    `${look.name}${sitter ? `, ${sitter.character || sitter.name}` : ''}, picture ${index + 1} of ${look.pictureIds.length}`
  if (hero === undefined) {
    return (
      <p className="grid min-h-40 place-items-center bg-surround p-6 text-center text-ink-soft md:min-h-full">
        No pictures yet. The stylist pins them to the look.
      </p>
    )
  }
  return (
    <div className="bg-surround md:grid md:grid-cols-2 md:content-start md:gap-2.5 md:p-4">
      <button
        type="button"
        aria-label={`Open ${name(0)}`}
        onClick={() => setOpen(hero)}
        className="col-span-2 block w-full"
      >
        <LookPicture
          eager
          uploadId={hero}
          alt={name(0)}
          sizes="(max-width: 767px) 100vw, 400px"
          focus="50% 20%"
          className="h-[330px] w-full md:rounded-sm"
        />
      </button>
      <div className={others.length > 0 ? 'flex gap-2 overflow-x-auto p-2 md:contents' : 'hidden'}>
        {others.map((id, index) => (
          <button
            key={id}
            type="button"
            aria-label={`Open ${name(index + 1)}`}
            onClick={() => setOpen(id)}
            className="block flex-none last:odd:col-span-2 md:w-full"
          >
            <LookPicture
              uploadId={id}
              alt={name(index + 1)}
              sizes="(max-width: 767px) 80px, 370px"
              focus="50% 25%"
              className="h-24 w-20 rounded-sm md:h-[150px] md:w-full"
            />
          </button>
        ))}
      </div>
      <Dialog wide open={open !== null} onOpenChange={() => setOpen(null)} title={look.name}>
        {open !== null && (
          <LookPicture
            eager
            uploadId={open}
            alt={name(look.pictureIds.findIndex((id) => id === open))}
            sizes="(max-width: 767px) 100vw, 768px"
            fit="contain"
            className="h-[68dvh] w-full bg-surround"
          />
        )}
      </Dialog>
    </div>
  )
}
