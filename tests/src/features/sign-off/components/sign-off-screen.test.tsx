// @vitest-environment jsdom
import { cleanup, fireEvent, screen, waitFor, within } from '@testing-library/react'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import type { Role } from '#shared/access/roles.ts'
import { type SignOff, signOffSchema, signOffsSchema, signedOffSchema } from '#shared/api/sign-off.ts'
import { fingerprintOf } from '#shared/domain/sign-off/fingerprint.ts'
import type { FrozenLook } from '#shared/domain/sign-off/schema.ts'
import { patchItem, putItems } from '#shared/realtime/collection.ts'
import { looks, pieces, sitters } from '#shared/realtime/documents.ts'
import { SignOffScreen } from '#src/features/sign-off/components/sign-off-screen.tsx'
import { type FakeApi, SHOOT_ID, USER_ID, shootScreen } from '#tests/support/shoot-screen.tsx'

const uuid = (digit: number) => `00000000-0000-4000-8000-${String(digit).padStart(12, '0')}`
const [LOOK, SITTER, GLOVES] = [uuid(1), uuid(2), uuid(3)]
const NIGHT_COAT: FrozenLook = {
  version: 1,
  sitter: 'Ada Finch',
  character: 'The Astronomer',
  name: 'Night coat',
  hair: '',
  makeUp: '',
  pieces: [{ id: GLOVES, kind: 'garment', name: 'Gloves, grey wool', colour: null }],
  pictures: [],
}
const BLACK_GLOVES = {
  ...NIGHT_COAT,
  pieces: [{ id: GLOVES, kind: 'garment', name: 'Gloves, black kid', colour: null }],
}
const LIST = `GET /api/shoots/${SHOOT_ID}/sign-offs`
const POST = `POST /api/shoots/${SHOOT_ID}/looks/${LOOK}/sign-offs`
const QUESTION = 'Anything to change? Say what and why.'

function answer(frozen: FrozenLook, more: Partial<SignOff> = {}): SignOff {
  return signOffSchema.parse({
    id: uuid(50),
    lookId: LOOK,
    answer: 'signed off',
    words: '',
    fingerprint: fingerprintOf(frozen),
    frozen,
    userId: USER_ID,
    name: 'Thea Quill',
    atMs: Date.UTC(2026, 8, 29, 10),
    ...more,
  })
}

function open(role: Role, history: SignOff[], api: FakeApi = {}) {
  const shoot = shootScreen(role, {
    [LIST]: () => ({ body: signOffsSchema.parse({ signOffs: history, current: [] }) }),
    ...api,
  })
  putItems(shoot.docs.looks, sitters, [{ id: SITTER, name: 'Ada Finch', character: 'The Astronomer' }], () => 0.5)
  putItems(shoot.docs.looks, pieces, [{ id: GLOVES, name: 'Gloves, grey wool' }], () => 0.5)
  putItems(shoot.docs.looks, looks, [{ id: LOOK, sitterId: SITTER, name: 'Night coat', pieceIds: [GLOVES] }], () => 0.5)
  shoot.show(<SignOffScreen />)
  return shoot
}

beforeEach(() => localStorage.clear())
afterEach(cleanup)

describe('SignOffScreen', () => {
  it('shows the client what changed since they signed off', async () => {
    open('client', [answer(BLACK_GLOVES)])
    const sheet = within(await screen.findByRole('article', { name: 'Night coat' }))
    expect(sheet.getByText(/Changed since you signed off/)).toBeTruthy()
    expect(sheet.getByText('black kid').tagName).toBe('DEL')
    expect(sheet.getByText('grey wool').tagName).toBe('INS')
  })

  it('signs off exactly the version on the screen', async () => {
    const history: SignOff[] = []
    const { sent } = open('client', history, {
      [POST]: () => {
        history.push(answer(NIGHT_COAT))
        return { body: signedOffSchema.parse({ signOff: answer(NIGHT_COAT) }) }
      },
    })
    fireEvent.click(await screen.findByRole('button', { name: 'Sign off this look' }))
    expect(await screen.findByText(/Signed off by you/)).toBeTruthy()
    expect(sent.find(({ request }) => request === POST)?.body).toEqual({
      answer: 'signed off',
      fingerprint: fingerprintOf(NIGHT_COAT),
      words: '',
      saw: NIGHT_COAT,
    })
  })

  it('wants words with a change, and sends none without', async () => {
    const { sent } = open('client', [])
    fireEvent.click(await screen.findByRole('button', { name: 'Ask for a change' }))
    expect(screen.getByText('Say what should change, and why.')).toBeTruthy()
    expect(sent.some(({ request }) => request === POST)).toBe(false)
  })

  it('shows the difference when the look changed meanwhile, and keeps what was typed, over a reload too', async () => {
    const message = 'This look changed while you had it open.'
    const differences = [{ what: 'Gloves', before: 'black kid', after: 'grey wool' }]
    const conflict = { error: { code: 'CONFLICT', message, details: { fingerprint: 'x', differences } } }
    open('client', [], { [POST]: () => ({ status: 409, body: conflict }) })
    fireEvent.change(await screen.findByLabelText(QUESTION), { target: { value: 'Softer edge, please.' } })
    fireEvent.click(screen.getByRole('button', { name: 'Ask for a change' }))
    expect(await screen.findByText(message)).toBeTruthy()
    expect(within(screen.getByRole('alert')).getByText('grey wool').tagName).toBe('INS')
    expect(screen.getByLabelText(QUESTION)).toHaveProperty('value', 'Softer edge, please.')
    cleanup()
    open('client', [])
    expect(await screen.findByLabelText(QUESTION)).toHaveProperty('value', 'Softer edge, please.')
  })

  it('follows a change as it is made', async () => {
    const { docs } = open('client', [answer(NIGHT_COAT)])
    expect(await screen.findByText(/Signed off by you/)).toBeTruthy()
    patchItem(docs.looks, looks, LOOK, { hair: 'pinned' })
    expect(await screen.findByText(/Changed since you signed off/)).toBeTruthy()
  })

  it.each(['photographer', 'stylist', 'crew'] as const)(
    'shows a %s where it stands, and no answers to give',
    async (role) => {
      open(role, [answer(BLACK_GLOVES, { userId: signOffSchema.shape.userId.parse('client-1') })])
      expect(await screen.findByText(/Changed since Thea Quill signed off/)).toBeTruthy()
      await waitFor(() => expect(screen.queryByRole('button', { name: 'Sign off this look' })).toBeNull())
      expect(screen.queryByLabelText(QUESTION)).toBeNull()
    },
  )
})
