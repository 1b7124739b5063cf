import { type ReactNode, useEffect, useRef } from 'react'
import { NavLink, useLocation } from 'react-router-dom'
import { cn } from '#src/lib/cn.ts'
import { Lamp, type LampState } from '#src/ui/lamp.tsx'
import { Mark } from '#src/ui/mark.tsx'
import { useIsPhone } from '#src/ui/use-media.ts'

export type FrameProps = {
  /** The dark left column of wide screens. */
  spine: ReactNode
  /** The dark bar at the foot of phones; null where a screen has a foot of its own. */
  bottom: ReactNode
  children: ReactNode
}

/** A screen with the way to all others beside it, or below it on phones. */
export function Frame({ spine, bottom, children }: FrameProps) {
  const isPhone = useIsPhone()
  const { pathname } = useLocation()
  const main = useRef<HTMLElement>(null)
  const shown = useRef(pathname)
  // A new screen starts at its top, and the next press of Tab starts in it.
  useEffect(() => {
    if (shown.current === pathname) return
    shown.current = pathname
    main.current?.scrollTo(0, 0)
    main.current?.focus({ preventScroll: true })
  }, [pathname])
  return (
    <div className="grid h-dvh grid-rows-[minmax(0,1fr)_auto] md:grid-cols-[13rem_minmax(0,1fr)] md:grid-rows-1 print:block print:h-auto">
      <a
        href="#screen"
        className="sr-only focus:not-sr-only focus:fixed focus:top-2 focus:left-2 focus:z-60 focus:rounded-r focus:bg-paper focus:px-4 focus:py-2"
      >
        Skip to the screen
      </a>
      {!isPhone && spine}
      <main
        id="screen"
        ref={main}
        tabIndex={-1}
        className="relative min-w-0 overflow-x-hidden overflow-y-auto outline-none print:overflow-visible"
      >
        {children}
      </main>
      {isPhone && bottom}
    </div>
  )
}

export type SpineProps = { head: ReactNode; foot: ReactNode; label: string; children: ReactNode }

export function Spine({ head, foot, label, children }: SpineProps) {
  return (
    <header className="on-night no-print flex min-h-0 flex-col bg-night pt-[18px] pb-3.5 text-bone">
      <NavLink to="/" className="flex items-center gap-[9px] px-[18px] pb-4 font-display text-xl font-semibold">
        <Mark />
        Sconce
      </NavLink>
      <div className="border-y border-night-3 px-[18px] pt-3 pb-3.5">{head}</div>
      <nav aria-label={label} className="min-h-0 flex-1 overflow-y-auto py-2.5">
        {children}
      </nav>
      <div className="border-t border-night-3 px-[18px] pt-3">{foot}</div>
    </header>
  )
}

export type SpineLinkProps = { to: string; children: ReactNode; lamp?: LampState; lampWhy?: string; end?: boolean }

/** A section with its lamp: the lamp's state is told in words to who does not see it. */
export function SpineLink({ to, children, lamp, lampWhy, end = false }: SpineLinkProps) {
  return (
    <NavLink
      to={to}
      end={end}
      title={lampWhy}
      className={({ isActive }) =>
        cn(
          'flex items-center justify-between gap-2 border-l-3 px-[18px] py-[7.5px] text-base font-medium max-md:min-h-12',
          isActive
            ? 'border-glow-lit bg-night-2 text-white'
            : 'border-transparent text-bone-soft hover:bg-night-2 hover:text-bone',
        )
      }
    >
      <span>{children}</span>
      {lamp && (
        <>
          <Lamp state={lamp} />
          <span className="sr-only">{LAMP_WORDS[lamp]}</span>
        </>
      )}
    </NavLink>
  )
}

const LAMP_WORDS: Record<LampState, string> = { unlit: 'not begun', half: 'under way', lit: 'ready' }

export type BottomBarProps = { label: string; children: ReactNode }

export function BottomBar({ label, children }: BottomBarProps) {
  return (
    <nav
      aria-label={label}
      className="on-night no-print flex bg-night pt-1 pb-[max(0.5rem,env(safe-area-inset-bottom))] text-bone-soft *:flex *:min-h-[52px] *:flex-1 *:flex-col *:items-center *:justify-end *:gap-1 *:pb-1 *:text-[0.8125rem] *:font-medium"
    >
      {children}
    </nav>
  )
}

export type BottomLinkProps = { to: string; children: ReactNode; lamp?: LampState; end?: boolean }

export function BottomLink({ to, children, lamp, end = false }: BottomLinkProps) {
  return (
    <NavLink
      to={to}
      end={end}
      className={({ isActive }) => (isActive ? 'text-white shadow-[inset_0_2px_0_var(--color-glow-lit)]' : '')}
    >
      {lamp && <Lamp state={lamp} />}
      <span>{children}</span>
      {lamp && <span className="sr-only">{LAMP_WORDS[lamp]}</span>}
    </NavLink>
  )
}
