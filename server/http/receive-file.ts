import type { Request, RequestHandler } from 'express'
import multer, { MulterError } from 'multer'
import { MAX_UPLOAD_BYTES } from '#shared/api/uploads.ts'
import { AppError } from '#server/errors.ts'

/** Boundaries and headers around the one file. */
const ENVELOPE_BYTES = 64 * 1024
/** Files in memory at the same time, of everybody together and of one person. The others wait unread. */
const FILES_AT_ONCE = 16
const FILES_OF_ONE_PERSON = 4

const oneFile = multer({
  storage: multer.memoryStorage(),
  limits: { fileSize: MAX_UPLOAD_BYTES, files: 1, fields: 4, parts: 6 },
  defParamCharset: 'utf8',
}).single('file')

/** Reads the one file of a multipart request into memory and keeps its place there until the answer has gone. */
export function receiveFile(whoOf: (req: Request) => string): RequestHandler {
  const places = placesOf(FILES_AT_ONCE, FILES_OF_ONE_PERSON)
  return (req, res, next) => {
    if (Number(req.headers['content-length'] ?? 0) > MAX_UPLOAD_BYTES + ENVELOPE_BYTES) throw tooLarge()
    const leave = places.enter(whoOf(req), () => {
      oneFile(req, res, (error: unknown) => {
        next(error === undefined || error === null ? undefined : toAppError(error))
      })
    })
    // Answered, or gone away while it waited in line.
    res.once('close', leave)
  }
}

function toAppError(error: unknown): AppError {
  if (error instanceof MulterError && error.code === 'LIMIT_FILE_SIZE') return tooLarge()
  if (error instanceof MulterError)
    return new AppError('BAD_REQUEST', 'One request carries one picture in the field “file”. Nothing was kept.')
  return new AppError('BAD_REQUEST', 'The picture broke off on its way. Nothing was kept; it can be sent again.', {
    cause: error,
  })
}

function tooLarge(): AppError {
  const limitMb = MAX_UPLOAD_BYTES / 1024 / 1024
  return new AppError(
    'TOO_LARGE',
    `This file is larger than ${limitMb} MB, the most that can be kept. Nothing was kept. Save the picture smaller and add that.`,
  )
}

type Waiting = { who: string; start: () => void }

/** Places in memory; `enter` starts at once or when a place is free, and returns how to leave (also while waiting). */
export function placesOf(inAll: number, ofOne: number): { enter: (who: string, start: () => void) => () => void } {
  const inside: Waiting[] = []
  let line: Waiting[] = []
  const fits = (one: Waiting) => inside.length < inAll && inside.filter((other) => other.who === one.who).length < ofOne
  const letIn = () => {
    for (const one of [...line]) {
      if (!fits(one)) continue
      line = line.filter((other) => other !== one)
      inside.push(one)
      one.start()
    }
  }
  return {
    enter(who, start) {
      const one = { who, start }
      line.push(one)
      letIn()
      return () => {
        line = line.filter((other) => other !== one)
        const at = inside.indexOf(one)
        if (at >= 0) inside.splice(at, 1)
        letIn()
      }
    },
  }
}
