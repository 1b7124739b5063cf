import type { SignOff } from '#shared/api/sign-off.ts'
import type { SignOffState } from '#shared/domain/sign-off/state.ts'
import { shortInstant } from '#src/lib/format.ts'
import { Caution } from '#src/ui/caution.tsx'
import { DifferenceList } from './difference-list.tsx'

export type StateBoxProps = {
  state: SignOffState<SignOff>
  /** Whether the reader is the one who answered: then "you". */
  isYou: (userId: string) => boolean
  zone: string
  className?: string
}

/** Where the look stands, when that needs a sentence. */
export function StateBox({ state, isYou, zone, className = '' }: StateBoxProps) {
  if (state.kind === 'waiting') return null
  const { answer } = state
  const who = isYou(answer.userId) ? 'you' : answer.name
  const when = shortInstant(answer.atMs, zone)
  switch (state.kind) {
    case 'signed off':
      return (
        <Caution tone="bottle" className={className} title={`Signed off by ${who}, ${when}`}>
          {answer.words !== '' && <Quoted words={answer.words} />}
        </Caution>
      )
    case 'changed since':
      return (
        <Caution className={className} title={`Changed since ${who} signed off on ${when}`}>
          <DifferenceList differences={state.differences} />
        </Caution>
      )
    case 'change asked':
      return (
        <Caution className={className} title={`${who === 'you' ? 'You' : who} asked for a change, ${when}`}>
          <Quoted words={answer.words} />
          {state.changedSince ? (
            <>
              <b className="mt-1.5 block font-semibold">Changed since then</b>
              <DifferenceList differences={state.differences} />
            </>
          ) : (
            <span className="text-ink-soft">The look is still as it was then.</span>
          )}
        </Caution>
      )
  }
}

function Quoted({ words }: { words: string }) {
  return <p className="whitespace-pre-line">“{words}”</p>
}
