import { useEffect, useRef } from 'react'

type FrameCanvasProps = {
  width: number
  height: number
  /** Null: nothing to show yet. */
  bytes: Uint8ClampedArray<ArrayBuffer> | null
  /** What it shows, in words. */
  label: string
  className?: string
}

/** A picture from its bytes. */
export function FrameCanvas({ width, height, bytes, label, className }: FrameCanvasProps) {
  const canvas = useRef<HTMLCanvasElement>(null)
  useEffect(() => {
    const context = bytes && canvas.current?.getContext('2d')
    if (context && bytes.length === width * height * 4) context.putImageData(new ImageData(bytes, width, height), 0, 0)
  }, [bytes, width, height])
  return <canvas ref={canvas} width={width} height={height} role="img" aria-label={label} className={className} />
}
