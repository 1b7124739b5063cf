import type { ReactNode } from 'react'
import { Mark } from '#src/ui/mark.tsx'

export type AccountPageProps = {
  title: string
  children: ReactNode
  /** Under the form: other ways in. */ foot?: ReactNode
}

/** The page of people who are not in yet: the lamp on its wall beside one sheet of paper. */
export function AccountPage({ title, children, foot }: AccountPageProps) {
  return (
    <div className="grid min-h-dvh bg-paper max-md:grid-rows-[auto_1fr] md:grid-cols-[minmax(18rem,2fr)_3fr]">
      <title>{`${title} · Sconce`}</title>
      <header className="on-night relative flex flex-col overflow-hidden bg-night px-5 py-4 text-bone md:px-10 md:py-9">
        <WallLamp />
        <div className="relative flex items-center gap-[9px] font-display text-xl font-semibold">
          <Mark />
          Sconce
        </div>
        <p className="relative mt-auto max-w-xs font-display text-2xl leading-snug font-semibold max-md:hidden">
          Agree on the picture, light it, and run the day from one list.
        </p>
      </header>
      <main className="flex flex-col items-center px-5 py-8 md:justify-center md:py-12">
        <div className="w-full max-w-sm">
          <h1 className="text-2xl">{title}</h1>
          <div className="mt-5">{children}</div>
          {foot !== undefined && <div className="mt-7 border-t border-hair pt-4 text-sm text-ink-soft">{foot}</div>}
        </div>
      </main>
    </div>
  )
}

/** Light thrown up a wall by the lamp. */
function WallLamp() {
  return (
    <svg
      aria-hidden
      viewBox="0 0 400 600"
      preserveAspectRatio="xMidYMid slice"
      className="absolute inset-0 size-full max-md:hidden"
    >
      <defs>
        <radialGradient id="thrown" cx="50%" cy="98%" r="92%">
          <stop offset="0" stopColor="#FFE3B8" />
          <stop offset=".1" stopColor="#FFCB85" stopOpacity=".95" />
          <stop offset=".3" stopColor="#E9923B" stopOpacity=".6" />
          <stop offset=".62" stopColor="#A85A18" stopOpacity=".24" />
          <stop offset="1" stopColor="#151312" stopOpacity="0" />
        </radialGradient>
        <filter id="soft" x="-20%" y="-20%" width="140%" height="140%">
          <feGaussianBlur stdDeviation="9" />
        </filter>
      </defs>
      <path
        d="M166 396 C150 300 70 150 -20 40 V-40 H420 V40 C330 150 250 300 234 396 Z"
        fill="url(#thrown)"
        filter="url(#soft)"
      />
      <ellipse cx="200" cy="392" rx="35" ry="5" fill="#FFE9C9" />
      <path d="M164 392h72l-18 34h-36z" fill="#F3EEE6" />
      <path d="M196 426h8v20h-8z" fill="#B8B0A5" />
    </svg>
  )
}
