import { cn } from '#src/lib/cn.ts'

export type SwatchProps = {
  /** `#rrggbb`, or null where none is chosen: then an outline. */
  colour: string | null
  sizePx?: number
  className?: string
}

/** A small square of colour; what it means stands beside it in words. */
export function Swatch({ colour, sizePx = 14, className }: SwatchProps) {
  return (
    <span
      aria-hidden
      title={colour ?? 'No colour chosen'}
      style={{ width: sizePx, height: sizePx, ...(colour === null ? {} : { backgroundColor: colour }) }}
      className={cn(
        'inline-block flex-none rounded-sm',
        colour === null ? 'border border-dashed border-edge' : 'ring-1 ring-black/10 ring-inset',
        className,
      )}
    />
  )
}
