import { useId } from 'react'

export type MarkProps = { tone?: 'night' | 'paper'; className?: string }

/** The lamp on the wall: the program's own mark. */
export function Mark({ tone = 'night', className }: MarkProps) {
  const glow = useId()
  return (
    <svg width="26" height="24" viewBox="0 0 26 24" aria-hidden className={className}>
      <defs>
        <radialGradient id={glow} cx="50%" cy="100%" r="100%">
          <stop offset="0" stopColor="#FFD9A0" />
          <stop offset=".55" stopColor="#E9923B" />
          <stop offset="1" stopColor="#E9923B" stopOpacity={tone === 'night' ? 0 : 1} />
        </radialGradient>
      </defs>
      <path d="M0 14a13 13 0 0 1 26 0z" fill={`url(#${glow})`} />
      <path d="M7 16h12l-3 5h-6z" fill={tone === 'night' ? '#F3EEE6' : '#1F1C1A'} />
    </svg>
  )
}
