// @vitest-environment jsdom
import { cleanup, fireEvent, screen, waitFor, within } from '@testing-library/react'
import { Suspense } from 'react'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import type { Role } from '#shared/access/roles.ts'
import { frameIdSchema, noteIdSchema, shotIdSchema, uploadIdSchema } from '#shared/ids.ts'
import { putItems, removeItems } from '#shared/realtime/collection.ts'
import { frames, notes, shots } from '#shared/realtime/documents.ts'
import { BoardVersionScreen } from '#src/features/board/components/versions/board-version-screen.tsx'
import { SHOOT_ID, USER_ID, shootScreen } from '#tests/support/shoot-screen.tsx'

const uuid = (n: number) => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`
const FRAME = frameIdSchema.parse(uuid(1))
const ID = uuid(50)

/** A board whose frame has been removed and which has a new note since `First idea` was kept. */
async function open(role: Role) {
  const version = {
    id: ID,
    name: 'First idea',
    userId: USER_ID,
    by: 'Ines Marlow',
    atMs: Date.UTC(2027, 9, 14, 17),
    takingBack: null,
  }
  const states = { board: '', plan: '' }
  const shoot = shootScreen(role, {
    'GET /api/session': () => ({ status: 401, body: { error: { code: 'SIGNED_OUT', message: 'Signed out.' } } }),
    [`GET /api/shoots/${SHOOT_ID}/versions`]: () => ({ body: { versions: [{ ...version, name: 'The first idea' }] } }),
    [`GET /api/shoots/${SHOOT_ID}/versions/${ID}`]: () => ({ body: { version, ...states } }),
  })
  const { board, plan } = shoot.docs
  const uploadId = uploadIdSchema.parse(uuid(60))
  const picture = { uploadId, state: 'stored' as const, widthPx: 800, heightPx: 1000 }
  putItems(board, frames, [{ id: FRAME, box: [0, 0, 212, 286], picture, caption: 'Collar high' }], () => 0.5)
  putItems(board, shots, [{ id: shotIdSchema.parse(uuid(2)), title: 'Dusk', place: ['loose', 'a0'] }], () => 0.5)
  const base64 = (doc: Y.Doc) => Buffer.from(Y.encodeStateAsUpdate(doc)).toString('base64')
  Object.assign(states, { board: base64(board), plan: base64(plan) })
  removeItems(board, frames, [FRAME], 5)
  putItems(board, notes, [{ id: noteIdSchema.parse(uuid(3)), box: [0, 0, 80, 40], text: 'Later' }], () => 0.5)
  const before = base64(board)
  shoot.show(
    <Suspense fallback="Fetching">
      <BoardVersionScreen versionId={ID} />
    </Suspense>,
  )
  return {
    band: within(await screen.findByRole('region', { name: 'Kept version' })),
    isUntouched: () => base64(board) === before,
  }
}

beforeEach(() => {
  localStorage.clear()
  sessionStorage.clear()
})
afterEach(cleanup)

describe('BoardVersionScreen', () => {
  it('shows the wall and the shots as they stood, under the name the version has now', async () => {
    const { band } = await open('photographer')
    await waitFor(() => expect(band.getByRole('status').textContent).toContain('“The first idea”, kept by Ines Marlow'))
    expect(band.getByRole('status').textContent).toContain('Thu 14 Oct, 18:00')
    const frame = await screen.findByRole('button', { name: 'Frame Collar high' })
    expect(frame.querySelector('img')?.getAttribute('src')).toMatch(`/api/uploads/${uuid(60)}/`)
    expect(screen.queryByRole('button', { name: 'Note Later' })).toBeNull()
    expect(await screen.findByText('Dusk')).toBeTruthy()
  })

  it('has nothing that writes, by pointer or by key', async () => {
    const { isUntouched } = await open('photographer')
    const frame = await screen.findByRole('button', { name: 'Frame Collar high' })
    await screen.findByText('Dusk')
    expect(
      screen.queryByRole('button', { name: /Write a note|Hang a tag|Add pictures|Undo|Add a shot|Move shot/ }),
    ).toBeNull()
    frame.focus()
    fireEvent.keyDown(frame, { key: 'Enter' })
    for (const key of ['Delete', 'F2', 'ArrowRight']) fireEvent.keyDown(frame, { key })
    fireEvent.keyDown(frame, { key: 'z', ctrlKey: true })
    expect(screen.getByRole('button', { name: 'Frame Collar high' })).toBe(frame)
    expect(within(screen.getByRole('complementary', { name: 'Inspector' })).queryByRole('textbox')).toBeNull()
    expect(isUntouched()).toBe(true)
  })

  it('lets crew look and go back, and take nothing back', async () => {
    const { band } = await open('crew')
    expect(band.getByRole('link', { name: 'Back to the board' }).getAttribute('href')).toBe(`/shoots/${SHOOT_ID}/board`)
    expect(band.queryByRole('button')).toBeNull()
  })

  it('says in the words of the server that a version was removed, and leads back', async () => {
    const message = 'This version is not kept any more.'
    const shoot = shootScreen('stylist', {
      [`GET /api/shoots/${SHOOT_ID}/versions/${ID}`]: () => ({
        status: 404,
        body: { error: { code: 'NOT_FOUND', message } },
      }),
    })
    shoot.show(<BoardVersionScreen versionId={ID} />)
    expect(await screen.findByText(message)).toBeTruthy()
    expect(screen.getByRole('link', { name: 'Back to the board' }).getAttribute('href')).toBe(
      `/shoots/${SHOOT_ID}/board`,
    )
  })
})
