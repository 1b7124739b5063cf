import { describe, expect, it } from 'vitest'
import { levelOf, pathWithoutTokens } from '#server/http/log-requests.ts'

describe('pathWithoutTokens', () => {
  it.each([
    ['/api/invitations/abcDEF_-123/accept', '/api/invitations/…/accept'],
    ['/join/abcDEF_-123', '/join/…'],
    ['/link/abcDEF_-123?x=1', '/link/…'],
    ['/sign-in?letter=abcDEF', '/sign-in'],
    [
      '/api/shoots/6072f48f-8394-4118-9865-53c729706f8b/invitations/79d2dcb0-b576-4735-b5ac-0139f75d602d/resend',
      '/api/shoots/6072f48f-8394-4118-9865-53c729706f8b/invitations/79d2dcb0-b576-4735-b5ac-0139f75d602d/resend',
    ],
  ])('makes of %s %s', (url, path) => {
    expect(pathWithoutTokens(url)).toBe(path)
  })
})

describe('levelOf', () => {
  it.each([
    ['PUT', 500, 'error'],
    ['PUT', 413, 'warn'],
    ['POST', 401, 'warn'],
    ['GET', 404, 'warn'],
    ['GET', 401, 'debug'],
    ['GET', 200, 'debug'],
  ] as const)('gives a %s that ends with %i the level %s', (method, status, level) => {
    expect(levelOf(method, status)).toBe(level)
  })
})
