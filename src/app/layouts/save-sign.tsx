import { useState } from 'react'
import { SAVE_SIGNS, type SaveState, sinceWords } from '#src/realtime/save-state.ts'
import { useSaveState } from '#src/realtime/use-save-state.ts'
import { cn } from '#src/lib/cn.ts'
import { count } from '#src/lib/format.ts'
import { Button } from '#src/ui/button.tsx'
import { Lamp } from '#src/ui/lamp.tsx'
import { Popover } from '#src/ui/popover.tsx'

/** How old the oldest unsent change is: " since 14:05". */
function since({ sinceMs }: { sinceMs: number | null }): string {
  return sinceMs === null ? '' : ` ${sinceWords(sinceMs, Date.now())}`
}

function explanation(state: SaveState): string {
  switch (state.kind) {
    case 'saved':
      return 'Everything you did is on the server.'
    case 'saving':
      return state.kept
        ? 'What you did is on its way. It is kept on this device until the server has it.'
        : 'What you did is on its way, and so far only on this page. Leave the page open until it is saved.'
    case 'offline':
      return state.unsent === 0
        ? 'There is no connection. You can go on working: it is kept on this device and sent as soon as there is a signal.'
        : `There is no connection. ${count(state.unsent, 'change')} of yours ${state.unsent === 1 ? 'is' : 'are'} kept on this device${since(state)} and sent as soon as there is a signal.`
    case 'not-saved':
      return state.why
    case 'reload':
      return 'Sconce has been renewed. What you did is kept; load the page again to go on.'
  }
}

export type SaveSignProps = { tone: 'night' | 'paper' }

/** Says whether what was done is safe, in five words that are the same everywhere. One press says more. */
export function SaveSign({ tone }: SaveSignProps) {
  const state = useSaveState()
  const isTrouble = state.kind === 'not-saved' || state.kind === 'reload'
  return (
    <>
      <Popover
        label="What is saved where"
        trigger={
          <button
            type="button"
            className={cn(
              'save-sign flex items-center gap-2 rounded-r text-left text-xs leading-tight max-md:min-h-11 max-md:max-w-36 max-md:flex-row-reverse max-md:text-right',
              tone === 'night' ? 'text-bone-soft hover:text-bone' : 'text-ink-soft hover:text-ink',
              isTrouble && (tone === 'night' ? '!font-semibold !text-glow-lit' : '!font-semibold !text-glow-ink'),
            )}
          >
            <Lamp state={SAVE_SIGNS[state.kind].lamp} />
            {SAVE_SIGNS[state.kind].words}
          </button>
        }
      >
        <p className="font-semibold">{SAVE_SIGNS[state.kind].words}</p>
        <p className="mt-1 text-sm text-ink-soft">{explanation(state)}</p>
        {state.kind === 'reload' && (
          <Button variant="primary" className="mt-3" onClick={() => window.location.reload()}>
            Load the page again
          </Button>
        )}
      </Popover>
      <Announcement state={state} />
    </>
  )
}

/** On phones, above the bottom bar, where the screen itself carries no sign (the style sheet sees to that). */
export function SaveStrip() {
  const state = useSaveState()
  const isTrouble = state.kind === 'not-saved' || state.kind === 'reload'
  return (
    <aside
      aria-label="What is saved"
      className="save-strip on-night no-print flex items-center gap-2.5 border-b border-night-3 bg-night-2 px-[18px] py-1.5 text-[0.8125rem] leading-tight text-bone-soft"
    >
      <Lamp state={SAVE_SIGNS[state.kind].lamp} />
      <span className={cn('min-w-0 flex-1', isTrouble && 'font-semibold text-glow-lit')}>
        {SAVE_SIGNS[state.kind].words}
        {state.kind === 'not-saved' && ` · ${state.why}`}
        {state.kind === 'offline' && state.unsent > 0 && ` · ${count(state.unsent, 'change')} to send${since(state)}`}
      </span>
      {state.kind === 'reload' && (
        <Button variant="glow" size="small" onClick={() => window.location.reload()}>
          Load again
        </Button>
      )}
    </aside>
  )
}

/** Speaks up for trouble, and once when it is over; ordinary saving is silent. */
function Announcement({ state }: { state: SaveState }) {
  const [spoken, setSpoken] = useState('')
  const { kind } = state
  const trouble = kind === 'offline' || kind === 'not-saved' || kind === 'reload'
  const next = trouble ? SAVE_SIGNS[kind].words : kind === 'saved' && spoken !== '' ? SAVE_SIGNS.saved.words : spoken
  if (next !== spoken) setSpoken(next)
  return (
    <span role="status" className="sr-only">
      {spoken}
    </span>
  )
}
