import { Plus } from 'lucide-react'
import type { Sitter } from '#shared/domain/looks/schema.ts'
import type { ReactNode } from 'react'
import { sitterLine, sitterTitle } from '../words.ts'

export type SitterRailProps = {
  sitter: Sitter | null
  looks: number
  isChosen: boolean
  onOpen: () => void
  /** Hangs another look here; absent for who only reads. */
  onHang?: (() => void) | undefined
  children: ReactNode
}

/** A sitter's rail with their looks hanging from it; as wide as it has looks. */
export function SitterRail({ sitter, looks, isChosen, onOpen, onHang, children }: SitterRailProps) {
  return (
    <section
      aria-label={sitterTitle(sitter)}
      style={{ flexGrow: Math.max(1, looks), maxWidth: `${Math.max(1, looks) * 19}rem` }}
      className="min-w-0 max-md:!max-w-none"
    >
      <header className="flex min-h-9 items-baseline gap-2 pb-1.5 pl-0.5 max-md:items-center">
        <div className="flex min-w-0 flex-1 items-baseline gap-x-2 max-md:flex-col">
          <h2 className="flex-none text-lg whitespace-nowrap max-md:max-w-full max-md:truncate">
            {sitter ? (
              <button
                type="button"
                aria-pressed={isChosen}
                onClick={onOpen}
                className="rounded-r text-left underline-offset-4 hover:underline max-md:min-h-8"
              >
                {sitterTitle(sitter)}
              </button>
            ) : (
              sitterTitle(sitter)
            )}
          </h2>
          {sitter && (
            <span className="min-w-0 truncate text-xs text-ink-soft max-md:max-w-full max-md:text-[0.8125rem]">
              {sitterLine(sitter)}
            </span>
          )}
        </div>
        {onHang && (
          <button
            type="button"
            aria-label={`Hang another look for ${sitterTitle(sitter)}`}
            title="Hang another look here"
            onClick={onHang}
            className="grid size-8 flex-none place-items-center self-center rounded-r text-ink-soft hover:bg-ink/5 hover:text-ink max-md:size-11"
          >
            <Plus size={17} aria-hidden />
          </button>
        )}
      </header>
      <div className="flex items-start gap-3 overflow-x-auto border-t-[5px] border-rail pb-1 max-md:-mx-4 max-md:px-4">
        {looks === 0 ? <p className="mt-4 pb-2 text-sm text-ink-soft">Nothing hangs here yet.</p> : children}
      </div>
    </section>
  )
}
