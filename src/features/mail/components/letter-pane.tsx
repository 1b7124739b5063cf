import type { Letters } from '#shared/api/mail.ts'
import { shortInstant } from '#src/lib/format.ts'
import { buttonClass } from '#src/ui/button.tsx'

export type LetterPaneProps = { letter: Letters['letters'][number] }

/** What a link is for, from its address. */
function linkName(url: string): string {
  const { pathname, searchParams } = new URL(url, window.location.origin)
  if (pathname.startsWith('/join/')) return 'Open the invitation'
  if (searchParams.has('letter')) return 'Sign in'
  if (pathname === '/reset') return 'Set a new password'
  if (pathname.startsWith('/shoots/')) return 'Open the shoot'
  return `Open ${pathname}`
}

/** Links of our own stay within this window's origin, whatever name the letter gave the machine. */
function localHref(url: string): string {
  const { pathname, search, hash } = new URL(url, window.location.origin)
  return pathname + search + hash
}

export function LetterPane({ letter }: LetterPaneProps) {
  return (
    <article className="rounded-r border border-hair bg-paper">
      <header className="border-b border-hair-soft px-5 py-4 md:px-7">
        <h2 className="text-xl">{letter.subject}</h2>
        <p className="mt-1 text-xs text-ink-soft">
          To {letter.to} · {shortInstant(letter.atMs)}
        </p>
      </header>
      <div className="px-5 py-5 md:px-7">
        <p className="max-w-prose text-base leading-relaxed break-words whitespace-pre-wrap">{letter.text}</p>
        {letter.links.length > 0 && (
          <div className="mt-6 flex flex-wrap gap-2">
            {letter.links.map((url, index) => (
              <a key={url} href={localHref(url)} className={buttonClass(index === 0 ? 'primary' : 'plain')}>
                {linkName(url)}
              </a>
            ))}
          </div>
        )}
      </div>
    </article>
  )
}
