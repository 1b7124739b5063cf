import { useEffect, useState } from 'react'
import { cn } from '#src/lib/cn.ts'
import { pictureSrcSet, pictureUrl } from '#src/lib/picture-url.ts'
import { Lamp } from './lamp.tsx'

export type PictureProps = {
  uploadId: string
  alt: string
  /** Where the picture is: on the server, still on somebody's device, or refused for good. */
  state?: 'stored' | 'waiting' | 'refused'
  /** The picture as it is on this device, while the server has not got it. */
  localUrl?: string | undefined
  /** How wide it is shown, as in the attribute of `img`. */
  sizes?: string
  /** Its size in pixels, to choose the rendition well. */
  size?: { widthPx: number; heightPx: number } | undefined
  /** A colour to fade from: the first of its palette. */
  tint?: string | undefined
  fit?: 'cover' | 'contain'
  /** Which part stays when it is cropped, as `object-position`. */
  focus?: string
  /** Shown at once, not when it comes near the screen. */
  eager?: boolean
  /** Why it was refused. */
  why?: string | undefined
  className?: string
}

const PAUSES_MS = [3000, 10_000, 30_000, 60_000]

/** A stored picture in the size that fits; fills its box. Waiting, refused and missing are drawn, never a broken sign. */
export function Picture({
  uploadId,
  alt,
  state = 'stored',
  localUrl,
  sizes = '320px',
  size,
  tint,
  fit = 'cover',
  focus = '50% 30%',
  eager = false,
  why,
  className,
}: PictureProps) {
  const source = localUrl ?? uploadId
  const [loaded, setLoaded] = useState('')
  const [failure, setFailure] = useState({ source: '', times: 0, isTrying: false })
  const times = failure.source === source ? failure.times : 0
  const isMissing = times > 0 && !failure.isTrying
  const mayShow = localUrl !== undefined || state === 'stored'

  useEffect(() => {
    if (!isMissing) return
    const again = () => setFailure((last) => ({ ...last, isTrying: true }))
    const timer = setTimeout(again, PAUSES_MS[Math.min(times, PAUSES_MS.length) - 1])
    window.addEventListener('online', again)
    return () => {
      clearTimeout(timer)
      window.removeEventListener('online', again)
    }
  }, [isMissing, times])

  const words = state === 'refused' ? 'Not kept' : 'On its way'
  return (
    <span
      className={cn('relative block overflow-hidden bg-ink/8', className)}
      style={tint === undefined ? undefined : { backgroundColor: tint }}
    >
      {mayShow && !isMissing ? (
        <img
          key={`${source}:${times}`}
          alt={alt}
          draggable={false}
          decoding="async"
          loading={eager ? 'eager' : 'lazy'}
          {...(localUrl === undefined
            ? { src: pictureUrl(uploadId, 960), srcSet: pictureSrcSet(uploadId, size), sizes }
            : { src: localUrl })}
          onLoad={() => setLoaded(source)}
          onError={() => setFailure({ source, times: times + 1, isTrying: false })}
          style={{ objectFit: fit, objectPosition: focus }}
          className={cn(
            'absolute inset-0 size-full transition-opacity duration-[250ms]',
            loaded === source ? 'opacity-100' : 'opacity-0',
          )}
        />
      ) : (
        <span
          role="img"
          aria-label={`${alt}: ${words.toLowerCase()}`}
          title={why ?? words}
          className="absolute inset-0 flex flex-col items-center justify-center gap-1.5 bg-surround p-2 text-center text-xs text-ink-soft"
        >
          <Lamp state={state === 'refused' ? 'unlit' : 'half'} />
          <span aria-hidden className="line-clamp-3">
            {why ?? words}
          </span>
        </span>
      )}
    </span>
  )
}
