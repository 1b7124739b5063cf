import type { ReactNode } from 'react'
import { Link } from 'react-router-dom'
import { ApiError } from '#src/lib/api.ts'
import { Button, buttonClass } from '#src/ui/button.tsx'
import { Mark } from '#src/ui/mark.tsx'

type Words = { title: string; text: string; again: boolean }

function wordsOf(error: unknown): Words {
  if (error instanceof ApiError) {
    switch (error.code) {
      case 'NOT_FOUND':
        return {
          title: 'There is nothing here for you',
          text: 'The address is wrong, or you are not in this shoot or studio (any more). Ask whoever sent you here.',
          again: false,
        }
      case 'FORBIDDEN':
        return { title: 'This is not yours to open', text: error.message, again: false }
      case 'OFFLINE':
      case 'STARTING':
        return {
          title: 'Sconce cannot be reached',
          text: 'This page is not kept on this device yet. What you typed elsewhere is still here; try again when you have a signal.',
          again: true,
        }
      case 'BAD_REQUEST':
        return { title: 'This address does not fit', text: 'Check that the link was copied whole.', again: false }
      default:
        return { title: 'That did not work', text: error.message, again: true }
    }
  }
  // A page of an earlier build asks for a file that is gone, or the signal went while it was fetched.
  if (error instanceof TypeError && /import|module|fetch/i.test(error.message)) {
    return {
      title: 'This screen could not be fetched',
      text: 'There is no signal, or Sconce has been renewed meanwhile. What you typed is kept; load the page again.',
      again: true,
    }
  }
  return {
    title: 'Something on this page went wrong',
    text: 'What you typed is kept. Load the page again; if it stays, tell whoever looks after Sconce what you did last.',
    again: true,
  }
}

/** What is shown instead of a screen that failed. */
export function ErrorView({
  error,
  inFrame = false,
  children,
}: {
  error: unknown
  inFrame?: boolean
  children?: ReactNode
}) {
  return (
    <Trouble {...wordsOf(error)} inFrame={inFrame}>
      {children}
    </Trouble>
  )
}

export function NotFound() {
  return <Trouble title="There is nothing at this address" text="Check that the link was copied whole." again={false} />
}

/** A screen that cannot be shown: what happened, what was kept, what to do. */
export function Trouble({
  title,
  text,
  again,
  inFrame = false,
  children,
}: Words & {
  /** Whether it stands inside a frame's own main part. */
  inFrame?: boolean
  /** What else there is to decide. */
  children?: ReactNode
}) {
  const Part = inFrame ? 'div' : 'main'
  return (
    <Part className="mx-auto flex min-h-[75dvh] max-w-lg flex-col items-start justify-center px-6 py-12">
      <title>{`${title} · Sconce`}</title>
      <Mark tone="paper" />
      <h1 className="mt-4 text-2xl">{title}</h1>
      <p className="mt-2 text-ink-soft">{text}</p>
      {children}
      <div className="mt-6 flex gap-2">
        {again && (
          <Button variant="primary" onClick={() => window.location.reload()}>
            Load again
          </Button>
        )}
        <Link to="/" className={buttonClass(again ? 'plain' : 'primary')}>
          Go to your shoots
        </Link>
      </div>
    </Part>
  )
}
