import express from 'express'
import { pino } from 'pino'
import request from 'supertest'
import { describe, expect, it } from 'vitest'
import { ERROR_CODES } from '#shared/api/errors.ts'
import { AppError, STATUS } from '#server/errors.ts'
import { errorHandler } from '#server/http/errors.ts'

function failing(error: unknown): { app: express.Express; lines: string[] } {
  const lines: string[] = []
  const app = express()
  app.get('/things/:id', () => {
    throw error
  })
  app.use(errorHandler(pino({}, { write: (line: string) => void lines.push(line) })))
  return { app, lines }
}

describe('errorHandler', () => {
  it.each(ERROR_CODES)('answers %s with its status and the one envelope', async (code) => {
    const { app } = failing(
      new AppError(code, 'A sentence.', { issues: [{ path: 'a', message: 'b' }], details: { c: 1 } }),
    )
    const answer = await request(app).get('/things/1')
    expect(answer.status).toBe(STATUS[code])
    expect(answer.body).toEqual({
      error: { code, message: 'A sentence.', issues: [{ path: 'a', message: 'b' }], details: { c: 1 } },
    })
  })

  it('tells nothing of what is not for people, and puts the cause into the log', async () => {
    const { app, lines } = failing(new Error('relation "secret_table" does not exist'))
    const answer = await request(app).get('/things/1?email=rosa@example.com')
    expect(answer.status).toBe(500)
    expect(answer.body).toEqual({
      error: { code: 'INTERNAL', message: 'Something went wrong on our side. Nothing was changed; try again.' },
    })
    expect(lines.join('')).toContain('secret_table')
    expect(lines.join('')).not.toContain('rosa@example.com')
  })

  it('keeps what people typed out of the log when a query fails', async () => {
    const failure = Object.assign(new Error('Failed query: insert … params: rosa@example.com'), {
      query: 'insert into "user"',
      params: ['rosa@example.com'],
      cause: Object.assign(new Error('value too long'), { code: '22001' }),
    })
    const { app, lines } = failing(failure)
    await request(app).get('/things/1')
    expect(lines.join('')).toContain('22001')
    expect(lines.join('')).toContain('value too long')
    expect(lines.join('')).not.toContain('rosa@example.com')
  })

  it.each(['ECONNREFUSED', '57P01', '08006'])('says that the database is away for %s', async (code) => {
    const { app } = failing(new Error('Failed query', { cause: Object.assign(new Error('away'), { code }) }))
    const answer = await request(app).get('/things/1')
    expect([answer.status, answer.body.error.code]).toEqual([503, 'STARTING'])
  })
})
