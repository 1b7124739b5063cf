import { ChevronRight } from 'lucide-react'
import { type ReactNode, useId } from 'react'
import { cn } from '#src/lib/cn.ts'
import { How } from './how.tsx'

/** Which groups of readings are open: kept by the screen, so that looking at a light in between does not close them. */
export type OpenGroups = { open: ReadonlySet<string>; toggle: (title: string) => void }

type GroupProps = {
  title: string
  /** The one figure that is seen while the group is closed. */
  sum?: ReactNode
  groups: OpenGroups
  children: ReactNode
}

/** Readings that are looked at now and then, under a plain title. */
export function Group({ title, sum, groups, children }: GroupProps) {
  const id = useId()
  const isOpen = groups.open.has(title)
  return (
    <section aria-labelledby={id} className="border-t border-hair">
      <h2 className="font-sans text-sm">
        <button
          type="button"
          aria-expanded={isOpen}
          onClick={() => groups.toggle(title)}
          className="flex min-h-10 w-full items-center gap-2 rounded-r text-left hover:text-draft max-md:min-h-11"
        >
          <ChevronRight size={14} aria-hidden className={cn('flex-none text-ink-soft', isOpen && 'rotate-90')} />
          <span id={id} className="flex-none font-semibold">
            {title}
          </span>
          {sum !== undefined && <span className="ml-auto min-w-0 truncate pl-2 font-normal text-ink-soft">{sum}</span>}
        </button>
      </h2>
      {isOpen && <ul className="pb-2.5 pl-[22px]">{children}</ul>}
    </section>
  )
}

type LineProps = {
  label: string
  /** Its number; null: there is none, and the words say why. */
  value: ReactNode | null
  words?: ReactNode
  tone?: 'ink' | 'velvet'
  /** How the number is worked out. */
  children?: ReactNode
}

/** One reading: what it is, its number, and what it means. */
export function Line({ label, value, words, tone = 'ink', children }: LineProps) {
  return (
    <li className="flex items-start gap-3 border-t border-hair-soft py-1.5 text-sm first:border-t-0">
      <div className="min-w-0 flex-1">
        {label}
        {words !== undefined && (
          <span className={cn('block text-xs', tone === 'velvet' ? 'font-semibold text-velvet' : 'text-ink-soft')}>
            {words}
          </span>
        )}
      </div>
      {value !== null && (
        <div className="flex-none max-md:-my-1.5">
          {children === undefined ? (
            value
          ) : (
            <How label={label} value={value}>
              {children}
            </How>
          )}
        </div>
      )}
    </li>
  )
}
