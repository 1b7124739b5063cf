import type { Request, RequestHandler } from 'express'
import multer, { MulterError } from 'multer'
import { AppError } from '#server/errors.ts'
import { placesOf } from './receive-file.ts'

export type FilesLimits = { field: string; most: number; bytesEach: number; fieldBytes: number }

/** Requests whose files are in memory at the same time, of everybody together and of one person. */
const REQUESTS_AT_ONCE = 4
const REQUESTS_OF_ONE_PERSON = 1

/** Reads the files of one field of a multipart request into memory, and the words beside them; a request without any is one as well. */
export function receiveFiles(limits: FilesLimits, whoOf: (req: Request) => string): RequestHandler {
  const { field, most, bytesEach, fieldBytes } = limits
  const read = multer({
    storage: multer.memoryStorage(),
    limits: { fileSize: bytesEach, files: most, fields: 4, fieldSize: fieldBytes, parts: most + 4 },
    defParamCharset: 'utf8',
  }).array(field, most)
  const places = placesOf(REQUESTS_AT_ONCE, REQUESTS_OF_ONE_PERSON)
  return (req, res, next) => {
    const leave = places.enter(whoOf(req), () => {
      read(req, res, (error: unknown) => {
        next(error === undefined || error === null ? undefined : toAppError(error, limits))
      })
    })
    res.once('close', leave)
  }
}

function toAppError(error: unknown, { field, most, bytesEach }: FilesLimits): AppError {
  if (error instanceof MulterError && error.code === 'LIMIT_FILE_SIZE')
    return new AppError(
      'TOO_LARGE',
      `One of the pictures is larger than ${bytesEach / 1024 / 1024} MB. Nothing was changed; leave it out or make it smaller.`,
    )
  if (error instanceof MulterError)
    return new AppError(
      'BAD_REQUEST',
      `At most ${most} pictures go with this, in the field “${field}”. Nothing was changed.`,
    )
  return new AppError('BAD_REQUEST', 'The pictures broke off on their way. Nothing was changed; send them again.', {
    cause: error,
  })
}
