type Bytes = { width: number; height: number; bytes: Uint8ClampedArray<ArrayBuffer> }

/** A canvas with a picture on it, and room for a line of words under it. */
export function canvasOf({ width, height, bytes }: Bytes, line = ''): HTMLCanvasElement {
  const footPx = line === '' ? 0 : Math.round(height / 24)
  const canvas = document.createElement('canvas')
  canvas.width = width
  canvas.height = height + footPx
  const context = canvas.getContext('2d')
  if (!context) throw new Error('No canvas in this browser.')
  context.putImageData(new ImageData(bytes, width, height), 0, 0)
  if (footPx > 0) {
    context.fillStyle = '#d8d7d4'
    context.fillRect(0, height, width, footPx)
    context.fillStyle = '#1f1c1a'
    context.font = `${Math.round(footPx * 0.46)}px 'Instrument Sans', system-ui, sans-serif`
    context.textBaseline = 'middle'
    context.fillText(line, footPx * 0.4, height + footPx / 2, width - footPx * 0.8)
  }
  return canvas
}

/** The canvas as a file. */
export function blobOf(canvas: HTMLCanvasElement, type: 'image/png' | 'image/jpeg'): Promise<Blob> {
  return new Promise((resolve, reject) => {
    canvas.toBlob((blob) => (blob ? resolve(blob) : reject(new Error('The picture could not be written.'))), type, 0.92)
  })
}
