// @vitest-environment jsdom
import { cleanup, fireEvent, screen, waitFor, within } from '@testing-library/react'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import type { Role } from '#shared/access/roles.ts'
import { type Version, versionSchema } from '#shared/api/versions.ts'
import { noteIdSchema, shotIdSchema } from '#shared/ids.ts'
import { patchItem, putItems, readAll, upsertItem } from '#shared/realtime/collection.ts'
import { notes, shotPlans, shots } from '#shared/realtime/documents.ts'
import { VersionsDialog } from '#src/features/board/components/versions/versions-dialog.tsx'
import { useShootContext } from '#src/realtime/shoot-realtime.tsx'
import { useUndo } from '#src/realtime/use-undo.ts'
import { toast, toastStore } from '#src/ui/toast.ts'
import { Toaster } from '#src/ui/toaster.tsx'
import { type FakeApi, SHOOT_ID, USER_ID, type ShootScreen, shootScreen } from '#tests/support/shoot-screen.tsx'

const uuid = (n: number) => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`
const NOTE = noteIdSchema.parse(uuid(1))
const SHOT = shotIdSchema.parse(uuid(2))
const LIST = `/api/shoots/${SHOOT_ID}/versions`
const FIRST = uuid(50)

function version(n: number, more: Partial<Version> = {}): Version {
  return versionSchema.parse({
    id: uuid(50 + n),
    name: n === 0 ? 'First idea' : `Version ${n}`,
    userId: USER_ID,
    by: 'Ines Marlow',
    atMs: Date.UTC(2027, 9, 14, 17, n),
    takingBack: null,
    ...more,
  })
}

function base64(doc: Y.Doc): string {
  return Buffer.from(Y.encodeStateAsUpdate(doc)).toString('base64')
}

const text = ({ docs }: ShootScreen) => readAll(docs.board, notes).items.get(NOTE)?.text
const minutes = ({ docs }: ShootScreen) => readAll(docs.plan, shotPlans).items.get(SHOT)?.minutes

function Undo() {
  const { undo } = useUndo(['board'])
  return <button onClick={undo}>Undo of the board</button>
}

/** What a hand does outside of the dialog. */
function Meanwhile() {
  const { board, plan } = useShootContext().documents
  const leave = () => {
    board.destroy()
    plan.destroy()
  }
  return (
    <>
      <button onClick={() => patchItem(board.doc, notes, NOTE, { text: 'since then' })}>Write a note</button>
      <button onClick={leave}>Leave the shoot</button>
    </>
  )
}

/** A board that changed since `First idea` was kept, with its versions open. */
function open(role: Role, kept: Version[] = [version(0)], api: FakeApi = {}): ShootScreen {
  let versions = kept
  const states: { board: string; plan: string } = { board: '', plan: '' }
  const answer = () => ({ body: { versions } })
  const shoot = shootScreen(role, {
    [`GET ${LIST}`]: answer,
    [`POST ${LIST}`]: (body) => {
      versions = [version(7, { name: (body as { name: string }).name }), ...versions]
      return answer()
    },
    [`GET ${LIST}/${FIRST}`]: () => ({ body: { version: version(0), ...states } }),
    [`PATCH ${LIST}/${FIRST}`]: (body) => {
      versions = versions.map((one) => (one.id === FIRST ? { ...one, name: (body as { name: string }).name } : one))
      return answer()
    },
    [`DELETE ${LIST}/${FIRST}`]: () => {
      versions = versions.filter((one) => one.id !== FIRST)
      return answer()
    },
    [`POST ${LIST}/${FIRST}/take-back`]: () => {
      versions = [version(8, { name: 'Before taking back ‘First idea’', takingBack: 'First idea' }), ...versions]
      return answer()
    },
    ...api,
  })
  const { board, plan } = shoot.docs
  putItems(board, notes, [{ id: NOTE, box: [0, 0, 80, 40], text: 'as it was' }], () => 0.5)
  putItems(board, shots, [{ id: SHOT, title: 'Dusk', place: ['loose', 'a0'] }], () => 0.5)
  upsertItem(plan, shotPlans, { id: SHOT, minutes: 20 })
  Object.assign(states, { board: base64(board), plan: base64(plan) })
  patchItem(board, notes, NOTE, { text: 'as it is' })
  putItems(board, notes, [{ id: noteIdSchema.parse(uuid(9)), box: [0, 0, 80, 40], text: 'later' }], () => 0.5)
  upsertItem(plan, shotPlans, { id: SHOT, minutes: 45 })
  shoot.show(
    <>
      <VersionsDialog open onOpenChange={() => undefined} />
      <Undo />
      <Meanwhile />
      <Toaster />
    </>,
  )
  return shoot
}

/** Opens the menu of a version and presses one of its lines. */
async function choose(name: string, line: string): Promise<void> {
  fireEvent.keyDown(await screen.findByRole('button', { name: `More about ${name}` }), { key: 'Enter' })
  fireEvent.click(await screen.findByRole('menuitem', { name: line }))
}

beforeEach(() => {
  localStorage.clear()
  for (const { id } of toastStore.read()) toast.dismiss(id)
})
afterEach(cleanup)

describe('VersionsDialog', () => {
  it('says what it is for while nothing is kept, and proposes a name', async () => {
    open('client', [])
    expect(await screen.findByText(/No version is kept yet/)).toBeTruthy()
    const name = screen.getByLabelText('The board as it stands now')
    expect(name).toHaveProperty('value', expect.stringMatching(/^Board of \w{3} \d+ \w{3}/))
  })

  it('keeps the board under the name that was typed, and wants one', async () => {
    const { sent } = open('stylist')
    const name = await screen.findByLabelText('The board as it stands now')
    const keep = screen.getByRole('button', { name: 'Keep this version' })
    fireEvent.change(name, { target: { value: '  ' } })
    fireEvent.click(keep)
    expect(await screen.findByText('Give it a name to find it by.')).toBeTruthy()
    fireEvent.change(name, { target: { value: 'After the fitting' } })
    fireEvent.click(keep)
    expect(await screen.findByRole('link', { name: 'Look at After the fitting' })).toBeTruthy()
    expect(screen.getByText('“After the fitting” is kept.').getAttribute('role')).toBe('status')
    expect(sent.filter(({ request }) => request === `POST ${LIST}`).map(({ body }) => body)).toEqual([
      { name: 'After the fitting' },
    ])
  })

  it('shows the sentence of a refusal and keeps what was typed', async () => {
    const message = 'This shoot has 200 kept versions, as many as it can have.'
    open('photographer', [], {
      [`POST ${LIST}`]: () => ({ status: 409, body: { error: { code: 'CONFLICT', message } } }),
    })
    const name = await screen.findByLabelText('The board as it stands now')
    fireEvent.change(name, { target: { value: 'One more' } })
    fireEvent.click(screen.getByRole('button', { name: 'Keep this version' }))
    expect(await screen.findByText(message)).toBeTruthy()
    expect(name).toHaveProperty('value', 'One more')
  })

  it('says who kept a version and when, and leads to it', async () => {
    open('crew')
    expect(await screen.findByText('Ines Marlow, Thu 14 Oct, 18:00')).toBeTruthy()
    const look = screen.getByRole('link', { name: 'Look at First idea' })
    expect(look.getAttribute('href')).toBe(`/shoots/${SHOOT_ID}/board/versions/${FIRST}`)
  })

  it('gives crew nothing to change', async () => {
    open('crew')
    await screen.findByRole('link', { name: 'Look at First idea' })
    expect(screen.queryByRole('button', { name: /Keep|More about/ })).toBeNull()
  })

  it('stands in groups by day when it is long', async () => {
    const kept = Array.from({ length: 9 }, (_, n) => version(n, { atMs: Date.UTC(2027, 9, 14 - (n % 2), 12) }))
    open('photographer', kept)
    expect(await screen.findByRole('region', { name: 'Thu 14 Oct' })).toBeTruthy()
    expect(within(screen.getByRole('region', { name: 'Wed 13 Oct' })).getAllByRole('listitem')).toHaveLength(4)
  })

  it('renames and removes', async () => {
    open('photographer')
    await choose('First idea', 'Rename')
    fireEvent.change(screen.getByLabelText('Another name for First idea'), { target: { value: 'Before the fitting' } })
    fireEvent.click(screen.getByRole('button', { name: 'Save' }))
    await choose('Before the fitting', 'Remove')
    fireEvent.click(within(await screen.findByRole('alertdialog')).getByRole('button', { name: 'Remove' }))
    expect(await screen.findByText(/No version is kept yet/)).toBeTruthy()
  })
})

describe('taking back', () => {
  it('says what changes, keeps what is there, and is one step of undo for board and plan', async () => {
    const shoot = open('photographer')
    await choose('First idea', 'Take it back')
    const dialog = within(await screen.findByRole('dialog', { name: 'Take back “First idea”?' }))
    expect((await dialog.findByText('Taken off')).nextElementSibling?.textContent).toBe('1 note')
    expect(dialog.getByText('As it was then').nextElementSibling?.textContent).toBe('1 note and 1 shot')
    expect(dialog.queryByText(/because you may read/)).toBeNull()
    fireEvent.click(dialog.getByRole('button', { name: 'Take it back' }))
    await waitFor(() => expect([text(shoot), minutes(shoot)]).toEqual(['as it was', 20]))
    expect(readAll(shoot.docs.board, notes).items.size).toBe(1)
    expect(shoot.sent.filter(({ request }) => request.endsWith('/take-back'))).toHaveLength(1)
    expect(await screen.findByText('Before taking back ‘First idea’')).toBeTruthy()
    fireEvent.click(screen.getByText('Undo of the board'))
    await waitFor(() => expect([text(shoot), minutes(shoot)]).toEqual(['as it is', 45]))
    expect(readAll(shoot.docs.board, notes).items.size).toBe(2)
  })

  it('leaves the plan alone for a client, and says so beforehand', async () => {
    const shoot = open('client')
    await choose('First idea', 'Take it back')
    const dialog = within(await screen.findByRole('dialog', { name: 'Take back “First idea”?' }))
    expect(await dialog.findByText(/Days, sets and minutes stay as they are now/)).toBeTruthy()
    expect(dialog.getByText('As it was then').nextElementSibling?.textContent).toBe('1 note')
    fireEvent.click(dialog.getByRole('button', { name: 'Take it back' }))
    await waitFor(() => expect(text(shoot)).toBe('as it was'))
    expect(minutes(shoot)).toBe(45)
  })

  it('changes nothing when what is there cannot be kept', async () => {
    const message = 'This version is not kept any more.'
    const shoot = open('photographer', [version(0)], {
      [`POST ${LIST}/${FIRST}/take-back`]: () => ({ status: 404, body: { error: { code: 'NOT_FOUND', message } } }),
    })
    await choose('First idea', 'Take it back')
    const dialog = within(await screen.findByRole('dialog', { name: 'Take back “First idea”?' }))
    fireEvent.click(await dialog.findByRole('button', { name: 'Take it back' }))
    expect(await dialog.findByText(message)).toBeTruthy()
    expect([text(shoot), minutes(shoot)]).toEqual(['as it is', 45])
  })

  it('neither says nor does anything in a shoot that was left', async () => {
    const shoot = open('photographer')
    await choose('First idea', 'Take it back')
    const dialog = within(await screen.findByRole('dialog', { name: 'Take back “First idea”?' }))
    const takeBack = await dialog.findByRole('button', { name: 'Take it back' })
    fireEvent.click(screen.getByText('Leave the shoot'))
    fireEvent.click(takeBack)
    expect(await dialog.findByText('You left the shoot meanwhile. Nothing was changed.')).toBeTruthy()
    expect(shoot.sent.filter(({ request }) => request.endsWith('/take-back'))).toEqual([])
  })

  it('writes into no document that was closed while the server answered', async () => {
    const shoot = open('photographer', [version(0)], {
      [`POST ${LIST}/${FIRST}/take-back`]: () => {
        fireEvent.click(screen.getByText('Leave the shoot'))
        return { body: { versions: [version(0)] } }
      },
    })
    await choose('First idea', 'Take it back')
    const dialog = within(await screen.findByRole('dialog', { name: 'Take back “First idea”?' }))
    fireEvent.click(await dialog.findByRole('button', { name: 'Take it back' }))
    expect(await dialog.findByText('You left the shoot meanwhile. Nothing was changed.')).toBeTruthy()
    expect([text(shoot), minutes(shoot)]).toEqual(['as it is', 45])
  })

  it('is undone from its message as long as it is the newest step, and no other step is', async () => {
    const shoot = open('photographer')
    const takeBack = async () => {
      await choose('First idea', 'Take it back')
      const dialog = within(await screen.findByRole('dialog', { name: 'Take back “First idea”?' }))
      fireEvent.click(await dialog.findByRole('button', { name: 'Take it back' }))
      await screen.findByText('The board is as it was in “First idea”.')
    }
    await takeBack()
    fireEvent.click(screen.getByText('Undo'))
    await waitFor(() => expect([text(shoot), minutes(shoot)]).toEqual(['as it is', 45]))
    await takeBack()
    fireEvent.click(screen.getByText('Write a note'))
    fireEvent.click(screen.getByText('Undo'))
    expect(await screen.findByText(/More has happened since/)).toBeTruthy()
    expect([text(shoot), minutes(shoot)]).toEqual(['since then', 20])
  })

  it('has nothing to do where nothing differs', async () => {
    const shoot = open('photographer')
    patchItem(shoot.docs.board, notes, NOTE, { text: 'as it was' })
    patchItem(shoot.docs.plan, shotPlans, SHOT, { minutes: 20 })
    shoot.docs.board.transact(() => {
      const late = shoot.docs.board.getMap('notes').get(uuid(9))
      if (late instanceof Y.Map) late.set('deleted', 5)
    })
    await choose('First idea', 'Take it back')
    const dialog = within(await screen.findByRole('dialog', { name: 'Take back “First idea”?' }))
    expect(await dialog.findByText(/nothing to take back/)).toBeTruthy()
    expect(dialog.queryByRole('button', { name: 'Take it back' })).toBeNull()
  })
})
