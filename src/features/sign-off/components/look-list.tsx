import { signOffLamp, signOffWords } from '#shared/domain/sign-off/state.ts'
import { cn } from '#src/lib/cn.ts'
import { Lamp } from '#src/ui/lamp.tsx'
import type { LookStanding } from '../use-look-standings.ts'
import { LookPicture } from './look-picture.tsx'

export type LookListProps = {
  looks: readonly LookStanding[]
  chosen: string
  onChoose: (lookId: string) => void
  /** Whether the reader is the one who is waited for. */
  isYours: boolean
}

/** All looks with their lamps; the way from one to the next. */
export function LookList({ looks, chosen, onChoose, isYours }: LookListProps) {
  return (
    <ul>
      {looks.map(({ planned: { look, sitter }, state }) => {
        const isChosen = look.id === chosen
        const hero = look.pictureIds[0]
        return (
          <li key={look.id} className="border-t border-hair">
            <button
              type="button"
              aria-current={isChosen || undefined}
              onClick={() => onChoose(look.id)}
              className={cn(
                '-mx-2 flex w-[calc(100%+1rem)] items-center gap-2.5 rounded-r px-2 py-2.5 text-left',
                isChosen ? 'bg-paper' : 'hover:bg-ink/4',
              )}
            >
              {hero === undefined ? (
                <span className="h-[52px] w-11 flex-none rounded-sm bg-ink/8" />
              ) : (
                <LookPicture uploadId={hero} alt="" sizes="44px" className="h-[52px] w-11 flex-none rounded-sm" />
              )}
              <span className="min-w-0 flex-1">
                <b className="block text-sm leading-snug font-semibold">{look.name}</b>
                <span
                  className={cn(
                    'block text-xs',
                    state.kind === 'changed since' || state.kind === 'change asked' ? 'text-glow-ink' : 'text-ink-soft',
                  )}
                >
                  {isYours && state.kind === 'waiting' ? 'Waiting for you' : signOffWords(state)}
                </span>
                <span className="sr-only">{sitter?.character || sitter?.name}</span>
              </span>
              <Lamp state={signOffLamp(state)} />
            </button>
          </li>
        )
      })}
    </ul>
  )
}
