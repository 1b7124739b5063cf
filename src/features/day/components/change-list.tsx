import { Check } from 'lucide-react'
import type { CardRow, CardSign } from '#shared/domain/day/card.ts'
import { cn } from '#src/lib/cn.ts'

export type ChangeListProps = {
  title: string
  rows: readonly CardRow[]
  isDone: (key: string) => boolean
  /** Missing for somebody who only reads. */
  onTick?: ((key: string, done: boolean) => void) | undefined
}

/** Everything to do before the shot; the whole row is the tick's target. */
export function ChangeList({ title, rows, isDone, onTick }: ChangeListProps) {
  return (
    <section className="border-t border-night-3 pt-2.5">
      <h2 className="mb-1 text-lg text-white">{title}</h2>
      {rows.length === 0 ? (
        <p className="py-2 text-[0.9375rem] text-bone-soft">Nothing: lights, set and clothes stay as they are.</p>
      ) : (
        <ul>
          {rows.map((row) => (
            <li key={row.key} className="border-b border-[#292521]">
              <ChangeRow row={row} done={isDone(row.key)} onTick={onTick} />
            </li>
          ))}
        </ul>
      )}
    </section>
  )
}

type ChangeRowProps = { row: CardRow; done: boolean; onTick?: ((key: string, done: boolean) => void) | undefined }

function ChangeRow({ row, done, onTick }: ChangeRowProps) {
  return (
    <label
      className={cn(
        'flex min-h-12 items-center gap-3 py-2 focus-within:outline-2 focus-within:outline-offset-2 focus-within:outline-glow-lit',
        onTick && 'cursor-pointer',
      )}
    >
      <Sign sign={row.sign} />
      <span className="min-w-0 flex-1">
        <span className={cn('block text-[0.9375rem]', done && 'text-bone-soft line-through decoration-night-edge')}>
          {row.what}
        </span>
        {row.detail !== '' && <span className="block text-[0.8125rem] text-bone-soft">{row.detail}</span>}
      </span>
      <input
        type="checkbox"
        className="sr-only"
        checked={done}
        disabled={!onTick}
        onChange={(event) => onTick?.(row.key, event.target.checked)}
      />
      <span
        aria-hidden
        className={cn(
          'grid size-7 flex-none place-items-center rounded-r border-[1.5px]',
          done ? 'border-glow-lit bg-glow-lit text-[#221]' : onTick ? 'border-night-edge' : 'invisible',
        )}
      >
        {done && <Check size={18} strokeWidth={2.5} />}
      </span>
    </label>
  )
}

const SIGN_WORDS: Record<Exclude<CardSign['kind'], 'group'>, { letter: string; word: string }> = {
  wardrobe: { letter: 'W', word: 'Wardrobe' },
  set: { letter: 'S', word: 'Set' },
  plain: { letter: '', word: '' },
}

function Sign({ sign }: { sign: CardSign }) {
  const isGroup = sign.kind === 'group'
  const { letter, word } = isGroup ? { letter: sign.letter, word: `Group ${sign.letter}` } : SIGN_WORDS[sign.kind]
  return (
    <span
      className={cn(
        'grid size-[26px] flex-none place-items-center rounded-full border-[1.5px] text-[0.8125rem] font-bold',
        isGroup ? 'border-bone' : 'border-dashed border-night-edge',
      )}
    >
      <span aria-hidden>{letter}</span>
      {word !== '' && <span className="sr-only">{word}</span>}
    </span>
  )
}
