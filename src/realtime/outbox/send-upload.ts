import { errorEnvelopeSchema } from '#shared/api/errors.ts'
import { type Upload, uploadSchema } from '#shared/api/uploads.ts'
import { ApiError } from '#src/lib/api.ts'

export type SendUpload = (
  input: { shootId: string; uploadId: string; blob: Blob; name: string },
  onProgress: (share: number) => void,
  signal: AbortSignal,
) => Promise<Upload>

/** Sends one picture; unlike `fetch` this request tells how far it is. @throws ApiError */
export const sendUpload: SendUpload = ({ shootId, uploadId, blob, name }, onProgress, signal) =>
  new Promise((resolve, reject) => {
    const request = new XMLHttpRequest()
    request.open('PUT', `/api/shoots/${shootId}/uploads/${uploadId}`)
    request.responseType = 'text'
    request.upload.onprogress = (event) => {
      if (event.lengthComputable && event.total > 0) onProgress(event.loaded / event.total)
    }
    const away = () =>
      reject(
        new ApiError(
          'OFFLINE',
          'Sconce cannot be reached. The picture is kept on this device and will be sent by itself.',
        ),
      )
    request.onerror = away
    request.onabort = away
    request.ontimeout = away
    request.onload = () => {
      try {
        const answer: unknown = JSON.parse(request.responseText)
        if (request.status === 200) return resolve(uploadSchema.parse(answer))
        const { code, message } = errorEnvelopeSchema.parse(answer).error
        reject(new ApiError(code, message))
      } catch {
        reject(
          new ApiError('INTERNAL', 'Sconce answered with something it should not. The picture is kept on this device.'),
        )
      }
    }
    signal.addEventListener('abort', () => request.abort(), { once: true })
    const form = new FormData()
    form.append('file', blob, name)
    request.send(form)
  })
