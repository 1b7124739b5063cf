import type { ReactNode, Ref } from 'react'
import { shotsInWords, shotsOfLook } from '#shared/domain/looks/shots-of-look.ts'
import type { Plan } from '#shared/domain/plan/read-plan.ts'
import { count } from '#src/lib/format.ts'
import { Swatch } from '#src/ui/swatch.tsx'
import type { LookStanding } from '../use-look-standings.ts'
import { AnswerHistory } from './answer-history.tsx'
import { LookPictures } from './look-pictures.tsx'
import { StateBox } from './state-box.tsx'

export type LookSheetProps = {
  standing: LookStanding
  plan: Plan
  userId: string
  /** To give the sheet the focus after an answer. */
  ref: Ref<HTMLElement>
  /** The client's answers, or what stands in their place for others. */
  children: ReactNode
}

/** One look as the client is asked about it: pictures, who, what is worn, where it is seen. */
export function LookSheet({ standing, plan, userId, ref, children }: LookSheetProps) {
  const { planned, state, history, picturesOnWay, fingerprint } = standing
  const { look, sitter, pieces } = planned
  const { zone } = plan.brief
  const seen = shotsInWords(shotsOfLook(plan, look.id))
  const original = look.alternativeOf === null ? undefined : plan.looks.get(look.alternativeOf)
  const hairAndMakeUp = [look.hair && `Hair: ${look.hair}.`, look.makeUp && `Make-up: ${look.makeUp}.`]
    .filter(Boolean)
    .join(' ')
  return (
    <article
      ref={ref}
      tabIndex={-1}
      aria-label={look.name}
      className="bg-paper outline-none max-md:flex max-md:flex-1 max-md:flex-col md:overflow-hidden md:rounded-r md:border md:border-hair lg:grid lg:grid-cols-[minmax(16rem,400px)_minmax(0,1fr)]"
    >
      <LookPictures planned={planned} />
      {/* On phones the parts belong to the sheet itself, so that the answers can stick to its foot all the way. */}
      <div className="max-md:contents md:px-[26px] md:py-[22px]">
        <div className="max-md:px-[18px] max-md:pt-3.5">
          <div className="label-small">{sitter ? sitter.character || sitter.name : 'No sitter yet'}</div>
          <h2 className="text-2xl md:text-[1.9375rem]">{look.name}</h2>
          <p className="mt-1.5">
            {hairAndMakeUp} {seen ? `Seen in ${seen}.` : <span className="text-ink-soft">Not in a shot yet.</span>}
          </p>
          {original && <p className="mt-1 text-ink-soft">An alternative to “{original.look.name}”.</p>}
          <StateBox state={state} isYou={(id) => id === userId} zone={zone} className="my-3.5" />
          <ul className="mt-3">
            {pieces.map((piece) => (
              <li
                key={piece.id}
                className="flex items-center gap-2.5 border-t border-hair-soft py-2 text-sm max-md:text-[0.90625rem]"
              >
                <Swatch colour={piece.colour} sizePx={24} />
                {piece.name}
              </li>
            ))}
            {pieces.length === 0 && (
              <li className="border-t border-hair-soft py-2 text-ink-soft">No pieces written down yet.</li>
            )}
          </ul>
          {picturesOnWay > 0 && (
            <p className="mt-2 text-xs text-glow-ink">
              {count(picturesOnWay, 'picture is', 'pictures are')} still on the way and not part of this version.
            </p>
          )}
        </div>
        {children}
        <div className="max-md:px-[18px] max-md:pb-3">
          <AnswerHistory history={history} fingerprint={fingerprint} zone={zone} />
        </div>
      </div>
    </article>
  )
}
