import { cn } from '#src/lib/cn.ts'

export type FaceProps = {
  initials: string
  name: string
  colour: string
  /** Diameter, CSS pixels. */
  sizePx?: number
  /** Colour of the ring round it, where faces overlap. */
  ring?: 'night' | 'paper' | 'none'
  className?: string
}

const RINGS = { night: 'border-2 border-night', paper: 'border-2 border-paper', none: '' }

/** A person as a disc with their initials. */
export function Face({ initials, name, colour, sizePx = 26, ring = 'none', className }: FaceProps) {
  return (
    <span
      role="img"
      aria-label={name}
      title={name}
      style={{ width: sizePx, height: sizePx, background: colour, fontSize: Math.max(11, Math.round(sizePx * 0.4)) }}
      className={cn(
        'inline-grid flex-none place-items-center rounded-full leading-none font-bold text-white select-none',
        RINGS[ring],
        className,
      )}
    >
      {initials}
    </span>
  )
}
