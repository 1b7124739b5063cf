import type { SignOff } from '#shared/api/sign-off.ts'
import { shortInstant } from '#src/lib/format.ts'
import { Lamp } from '#src/ui/lamp.tsx'

export type AnswerHistoryProps = { history: readonly SignOff[]; fingerprint: string; zone: string }

/** Every answer to this look with name, time and the version it was given to. */
export function AnswerHistory({ history, fingerprint, zone }: AnswerHistoryProps) {
  if (history.length === 0) return null
  return (
    <section className="mt-5 border-t border-hair pt-3">
      <h3 className="label-small font-sans">What was answered</h3>
      <ol className="mt-1 text-sm">
        {history.map((answer) => (
          <li key={answer.id} className="flex gap-2.5 border-t border-hair-soft py-2 first:border-0">
            <Lamp state={answer.answer === 'signed off' ? 'lit' : 'half'} className="mt-1" />
            <div className="min-w-0">
              <b className="font-semibold">{answer.answer === 'signed off' ? 'Signed off' : 'Change asked for'}</b> by{' '}
              {answer.name}, {shortInstant(answer.atMs, zone)}
              {answer.words !== '' && <p className="whitespace-pre-line">“{answer.words}”</p>}
              <p className="text-xs text-ink-soft">
                {answer.fingerprint === fingerprint ? 'This version' : 'An earlier version'} ·{' '}
                <span title={answer.fingerprint}>{answer.fingerprint.slice(0, 8)}</span>
              </p>
            </div>
          </li>
        ))}
      </ol>
    </section>
  )
}
