import { useEffect, useRef } from 'react'
import { shotsInWords, shotsOfLook } from '#shared/domain/looks/shots-of-look.ts'
import type { Plan, PlannedLook } from '#shared/domain/plan/read-plan.ts'
import { type SignOffState, signOffLamp, signOffWords } from '#shared/domain/sign-off/state.ts'
import { cn } from '#src/lib/cn.ts'
import { Lamp } from '#src/ui/lamp.tsx'
import { Swatch } from '#src/ui/swatch.tsx'
import { WardrobePicture } from './wardrobe-picture.tsx'

export type LookCardProps = {
  planned: PlannedLook
  plan: Plan
  state: SignOffState
  isChosen: boolean
  /** The first other look that wears the piece too, by piece id. */
  alsoIn: ReadonlyMap<string, string>
  onOpen: () => void
}

/** A look as it hangs on the rail: hook, picture, name, lamp, pieces. */
export function LookCard({ planned: { look, pieces }, plan, state, isChosen, alsoIn, onOpen }: LookCardProps) {
  const card = useRef<HTMLElement>(null)
  // The panel takes room from the rails: what is chosen stays in sight.
  useEffect(() => {
    if (isChosen) card.current?.scrollIntoView?.({ block: 'nearest', inline: 'nearest' })
  }, [isChosen])
  const hero = look.pictureIds[0]
  const shots = shotsInWords(shotsOfLook(plan, look.id))
  const original = look.alternativeOf === null ? undefined : plan.looks.get(look.alternativeOf)
  return (
    <article
      ref={card}
      aria-label={look.name}
      className={cn(
        'relative mt-[22px] w-[15rem] flex-none rounded-r border bg-paper p-2.5 md:w-auto md:max-w-[18.5rem] md:min-w-[11.25rem] md:flex-1',
        'before:absolute before:-top-[22px] before:left-1/2 before:h-[15px] before:border-l-2 before:border-rail',
        'after:absolute after:-top-[7px] after:left-[calc(50%-34px)] after:h-3.5 after:w-[68px] after:rounded-[50%_50%_0_0/100%_100%_0_0] after:border-2 after:border-b-0 after:border-rail',
        isChosen ? 'border-draft outline-1 outline-draft' : 'border-hair hover:border-edge',
      )}
    >
      {hero === undefined ? (
        <div className="grid h-[196px] place-items-center rounded-sm bg-surround px-4 text-center text-xs text-ink-soft">
          No picture pinned yet
        </div>
      ) : (
        <WardrobePicture
          uploadId={hero}
          alt={look.name}
          sizes="290px"
          focus="50% 20%"
          className="h-[196px] rounded-sm"
        />
      )}
      <h3 className="mt-2 flex items-center justify-between gap-2 text-[1rem] leading-snug">
        <button
          type="button"
          onClick={onOpen}
          aria-pressed={isChosen}
          className="min-w-0 text-left before:absolute before:inset-0 before:z-10"
        >
          {look.name}
        </button>
        <Lamp state={signOffLamp(state)} label={signOffWords(state)} />
      </h3>
      <p className="mb-1.5 text-xs text-ink-soft max-md:text-[0.8125rem]">
        {look.changeMin} min to change · {shots || 'in no shot yet'}
      </p>
      {original && <p className="mb-1.5 text-xs text-ink-soft">instead of {original.look.name}</p>}
      <ul className="text-[0.78125rem] max-md:text-[0.8125rem]">
        {pieces.map((piece) => (
          <li
            key={piece.id}
            className="grid grid-cols-[14px_minmax(0,1fr)_auto] items-center gap-[7px] border-t border-hair-soft py-1"
          >
            <Swatch colour={piece.colour} />
            <span className="truncate" title={piece.name}>
              {piece.name}
            </span>
            <span className="max-w-28 truncate text-ink-faint">
              {alsoIn.has(piece.id) ? `also in ${alsoIn.get(piece.id) ?? ''}` : piece.status}
            </span>
          </li>
        ))}
        {pieces.length === 0 && <li className="border-t border-hair-soft py-1 text-ink-soft">No pieces yet</li>}
      </ul>
    </article>
  )
}
