// @vitest-environment jsdom
import { cleanup, fireEvent, screen, waitFor, within } from '@testing-library/react'
import { afterEach, describe, expect, it } from 'vitest'
import { pieceCostsSchema, sitterPrivatesSchema } from '#shared/api/private.ts'
import type { Role } from '#shared/access/roles.ts'
import { putItems, readAll } from '#shared/realtime/collection.ts'
import { looks, pieces, sitters } from '#shared/realtime/documents.ts'
import { LooksScreen } from '#src/features/looks/components/looks-screen.tsx'
import { type ShootScreen, SHOOT_ID, shootScreen } from '#tests/support/shoot-screen.tsx'

const uuid = (digit: number) => `00000000-0000-4000-8000-${String(digit).padStart(12, '0')}`
const [COAT_LOOK, OPEN_LOOK, SITTER, COAT, LOUPE] = [uuid(1), uuid(2), uuid(3), uuid(4), uuid(5)]
const COSTS = `GET /api/shoots/${SHOOT_ID}/piece-costs`
const SIZES = `GET /api/shoots/${SHOOT_ID}/sizes`

function fill({ docs }: ShootScreen) {
  putItems(
    docs.looks,
    sitters,
    [{ id: SITTER, name: 'Idris Vane', character: 'The Clockmaker', hours: [540, 900], chairMin: 40 }],
    () => 0.5,
  )
  putItems(
    docs.looks,
    pieces,
    [
      { id: COAT, name: 'Work coat, ochre', status: 'fitted' },
      { id: LOUPE, name: 'Brass loupe', status: 'to buy' },
    ],
    () => 0.5,
  )
  putItems(
    docs.looks,
    looks,
    [
      { id: COAT_LOOK, sitterId: SITTER, name: 'Work coat', rank: 'a0', changeMin: 12, pieceIds: [COAT, LOUPE] },
      { id: OPEN_LOOK, sitterId: SITTER, name: 'Coat open', rank: 'a1', pieceIds: [COAT] },
    ],
    () => 0.5,
  )
}

function open(role: Role, isFilled = true): ShootScreen {
  const shoot = shootScreen(role, {
    [COSTS]: () => ({
      body: pieceCostsSchema.parse({ pieces: [{ pieceId: COAT, cost: { minor: 4000, currency: 'GBP' }, size: '38' }] }),
    }),
    [SIZES]: () => ({ body: sitterPrivatesSchema.parse({ sitters: [] }) }),
  })
  if (isFilled) fill(shoot)
  shoot.show(<LooksScreen signOffs={new Map()} />)
  return shoot
}

const living = (shoot: ShootScreen) => [...readAll(shoot.docs.looks, looks).items.values()]

afterEach(cleanup)

describe('LooksScreen', () => {
  it('hangs looks on their sitter’s rail, with minutes, pieces and what they share', async () => {
    open('stylist')
    const rail = within(await screen.findByRole('region', { name: 'The Clockmaker' }))
    expect(rail.getByText('here 09:00 to 15:00 · 40 min in the chair')).toBeTruthy()
    const first = within(rail.getByRole('article', { name: 'Work coat' }))
    expect(first.getByText('12 min to change · in no shot yet')).toBeTruthy()
    expect(first.getByText('fitted')).toBeTruthy()
    expect(within(rail.getByRole('article', { name: 'Coat open' })).getByText('also in Work coat')).toBeTruthy()
  })

  it('begins a shoot with its first look on a new sitter', async () => {
    const shoot = open('stylist', false)
    fireEvent.click(await screen.findByRole('button', { name: 'Begin with a look' }))
    fireEvent.change(screen.getByLabelText('Name of the look'), { target: { value: 'Night coat' } })
    fireEvent.click(screen.getByRole('button', { name: 'Hang it' }))
    expect(screen.getByText('Say who wears it.')).toBeTruthy()
    fireEvent.change(screen.getByLabelText('Sitter'), { target: { value: 'Maud Ferrier' } })
    fireEvent.click(screen.getByRole('button', { name: 'Hang it' }))
    expect(await screen.findByRole('complementary', { name: 'Night coat' })).toBeTruthy()
    await waitFor(() => expect(living(shoot).map(({ name }) => name)).toEqual(['Night coat']))
    expect([...readAll(shoot.docs.looks, sitters).items.values()].map(({ name }) => name)).toEqual(['Maud Ferrier'])
  })

  it('takes over what is typed in the panel, and shares a piece with another look', async () => {
    const shoot = open('stylist')
    fireEvent.click(await screen.findByRole('button', { name: 'Coat open' }))
    const panel = within(screen.getByRole('complementary', { name: 'Coat open' }))
    fireEvent.change(panel.getByLabelText('Hair'), { target: { value: 'Knotted high' } })
    fireEvent.blur(panel.getByLabelText('Hair'))
    fireEvent.change(panel.getByLabelText('Or a piece another look wears'), { target: { value: LOUPE } })
    await waitFor(() =>
      expect(living(shoot).find(({ id }) => id === OPEN_LOOK)).toMatchObject({
        hair: 'Knotted high',
        pieceIds: [COAT, LOUPE],
      }),
    )
  })

  it('keeps what was typed last when the panel closes at once', async () => {
    const shoot = open('stylist')
    fireEvent.click(await screen.findByRole('button', { name: 'Coat open' }))
    fireEvent.change(screen.getByLabelText('Make-up'), { target: { value: 'Matte' } })
    fireEvent.click(screen.getByRole('button', { name: 'Close' }))
    await waitFor(() => expect(living(shoot).find(({ id }) => id === OPEN_LOOK)?.makeUp).toBe('Matte'))
  })

  it('shows size and cost to a stylist', async () => {
    open('stylist')
    const table = within(await screen.findByRole('region', { name: 'Pieces' }))
    expect(await table.findByText('40.00 GBP')).toBeTruthy()
    expect(table.getByRole('columnheader', { name: 'Size' })).toBeTruthy()
  })

  it.each(['client', 'crew'] as const)(
    'lets a %s read without controls, and never asks for cost or sizes',
    async (role) => {
      const { sent } = open(role)
      const table = within(await screen.findByRole('region', { name: 'Pieces' }))
      expect(table.queryByRole('columnheader', { name: 'Cost' })).toBeNull()
      expect(screen.queryByRole('button', { name: 'Hang a look' })).toBeNull()
      fireEvent.click(screen.getByRole('button', { name: 'Work coat' }))
      const panel = within(screen.getByRole('complementary', { name: 'Work coat' }))
      expect(panel.getByLabelText('Name')).toHaveProperty('readOnly', true)
      expect(panel.queryByRole('button', { name: 'Add pictures' })).toBeNull()
      expect(sent.map(({ request }) => request).filter((request) => [COSTS, SIZES].includes(request))).toEqual([])
    },
  )
})
