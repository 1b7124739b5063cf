import { type RenditionPx, RENDITIONS } from '#shared/api/uploads.ts'
import type { Frame } from '#shared/domain/board/schema.ts'
import { pictureUrl } from '#src/lib/picture-url.ts'
import { useLocalPicture, useOutbox } from '#src/realtime/outbox/use-outbox.ts'

/** The smallest rendition that still fills this many CSS pixels on this screen. */
function renditionFor(picture: Frame['picture'], widthPx: number): RenditionPx {
  const longest = widthPx * Math.max(1, picture.heightPx / picture.widthPx) * (globalThis.devicePixelRatio || 1)
  return RENDITIONS.find((edge) => edge >= longest * 0.9) ?? 2048
}

type FramePictureProps = { frame: Frame; widthPx: number; className?: string }

/** A frame's picture: from the server, from this device while it waits, or the place it will take. Decorative: the print carries the name. */
export function FramePicture({ frame, widthPx, className = 'size-full' }: FramePictureProps) {
  const { picture } = frame
  const localUrl = useLocalPicture(picture.uploadId)
  const src =
    localUrl ?? (picture.state === 'stored' ? pictureUrl(picture.uploadId, renditionFor(picture, widthPx)) : null)
  return (
    <div className={`relative overflow-hidden bg-[#c4c1bb] ${className}`} style={{ background: frame.palette[0] }}>
      {src && (
        <img
          src={src}
          alt=""
          draggable={false}
          decoding="async"
          className="pointer-events-none size-full object-cover"
        />
      )}
      {picture.state !== 'stored' && <PictureState frame={frame} hasLocal={localUrl !== undefined} />}
    </div>
  )
}

function PictureState({ frame, hasLocal }: { frame: Frame; hasLocal: boolean }) {
  const { items } = useOutbox()
  const { picture } = frame
  const item = items.find(({ uploadId }) => uploadId === picture.uploadId)
  if (picture.state === 'refused') {
    return (
      <p className="absolute inset-x-0 bottom-0 bg-velvet-wash/95 p-2 text-xs leading-snug text-velvet">
        <b className="block font-semibold">Not kept</b>
        {picture.why ?? 'The server did not take this picture.'}
      </p>
    )
  }
  if (!hasLocal) {
    return (
      <p className="absolute inset-0 grid place-content-center p-2 text-center text-xs text-ink">
        <b className="block font-semibold">Waiting</b>
        {picture.widthPx} × {picture.heightPx}
        <br />
        still on {frame.made ? `${frame.made.name}’s` : 'another'} device
      </p>
    )
  }
  const share = item?.progress ?? 0
  return (
    <div className="absolute inset-x-0 bottom-0 bg-night/75 px-2 py-1.5 text-xs text-bone">
      {item?.state === 'sending' ? 'Sending' : 'Waiting, kept on this device'}
      <div
        role="progressbar"
        aria-label="Sent"
        aria-valuemin={0}
        aria-valuemax={100}
        aria-valuenow={Math.round(share * 100)}
        className="mt-1 h-1 bg-bone/25"
      >
        <div className="h-full bg-glow-lit" style={{ width: `${share * 100}%` }} />
      </div>
    </div>
  )
}
