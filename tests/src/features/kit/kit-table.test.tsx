// @vitest-environment jsdom
import { QueryClient, QueryClientProvider } from '@tanstack/react-query'
import { cleanup, fireEvent, render, screen, waitFor, within } from '@testing-library/react'
import { Suspense } from 'react'
import { afterEach, describe, expect, it, vi } from 'vitest'
import { type KitItem, kitItemSchema } from '#shared/api/kit.ts'
import { kitTable } from '#shared/domain/kit/kit-csv.ts'
import { STARTER_KIT } from '#shared/domain/kit/starter.ts'
import { KitTable } from '#src/features/kit/components/kit-table.tsx'
import { toCsv } from '#src/lib/csv.ts'
import { id } from '#tests/support/lighting-sample.ts'

afterEach(() => {
  cleanup()
  vi.unstubAllGlobals()
})

// A few of each kind: looking up roles in a long table takes its time here.
const NAMES = [
  'Small flash, guide number 58',
  '90 cm octa',
  'Full warm +167',
  'LED lamp 60 W',
  'Boom arm',
  'Black panel 1 × 2 m',
]
const KIT = STARTER_KIT.filter(({ name }) => NAMES.includes(name)).map((item, index) =>
  kitItemSchema.parse({ ...item, id: id(index + 1), version: 1 }),
)
const flash = KIT.find(({ name }) => name === 'Small flash, guide number 58')
if (!flash) throw new Error('the starter kit has it')

function show({ kit = KIT, mayChange = true }: { kit?: KitItem[]; mayChange?: boolean } = {}) {
  vi.stubGlobal('matchMedia', () => ({ matches: false, addEventListener: () => {}, removeEventListener: () => {} }))
  const sent: { request: string; body: unknown }[] = []
  vi.stubGlobal('fetch', (path: string, { method = 'GET', body }: { method?: string; body?: string } = {}) => {
    if (method !== 'GET') sent.push({ request: `${method} ${path}`, body: JSON.parse(body ?? 'null') })
    return Promise.resolve(new Response(JSON.stringify({ kit }), { status: 200 }))
  })
  render(
    <QueryClientProvider client={new QueryClient()}>
      <Suspense fallback={<p>Waiting</p>}>
        <KitTable studioId="s" mayChange={mayChange} />
      </Suspense>
    </QueryClientProvider>,
  )
  return sent
}

function type(field: HTMLElement, value: string) {
  fireEvent.focus(field)
  fireEvent.change(field, { target: { value } })
  fireEvent.blur(field)
}

async function openFlash() {
  fireEvent.click(await screen.findByRole('button', { name: 'Small flash, guide number 58' }))
  return within(screen.getByRole('dialog'))
}

async function importFile(text: string | Uint8Array<ArrayBuffer>) {
  fireEvent.click(await screen.findByRole('button', { name: 'Import a CSV' }))
  const file = new File([text], 'kit.csv', { type: 'text/csv' })
  fireEvent.change(screen.getByLabelText('File'), { target: { files: [file] } })
  return within(screen.getByRole('dialog'))
}

describe('KitTable', () => {
  it('has a section for every kind, and says of every number where it comes from', async () => {
    show()
    for (const name of ['Flash units', 'Lamps', 'Modifiers', 'Gels', 'Supports', 'Panels and flags'])
      expect(await screen.findByRole('region', { name })).toBeTruthy()
    fireEvent.click(
      screen.getByRole('button', { name: /Zoom, sync, triggers, sources of Small flash, guide number 58/ }),
    )
    expect(screen.getByText('24 mm 28 m · 35 mm 36 m · 50 mm 42 m · 70 mm 50 m · 105 mm 58 m')).toBeTruthy()
    expect(screen.getAllByText(/^assumed: typical of this class of head/).length).toBeGreaterThan(3)
  })

  it('says at the field why a unit without a guide number is not taken, and keeps what was typed', async () => {
    const sent = show()
    const dialog = await openFlash()
    const field = dialog.getByLabelText('Guide number at ISO 100')
    type(field, '0')
    fireEvent.click(dialog.getByRole('button', { name: 'Save' }))
    const words = 'Without a guide number nothing can be worked out: put in the maker’s figure or measure it.'
    const sentence = dialog.getByText(words)
    expect(field.getAttribute('aria-describedby')).toBe(sentence.id)
    expect(dialog.getByText(/One number cannot be right/)).toBeTruthy()
    expect(sent).toEqual([])
    type(field, '52')
    fireEvent.click(dialog.getByRole('button', { name: 'Save' }))
    await waitFor(() => expect(sent).toHaveLength(1))
    expect(sent[0]).toMatchObject({ request: `PUT /api/studios/s/kit/${flash.id}`, body: { version: 1 } })
  })

  it('takes a meter reading in place of the assumption', async () => {
    const sent = show()
    const dialog = await openFlash()
    fireEvent.click(dialog.getByRole('button', { name: 'Add a meter reading' }))
    fireEvent.change(dialog.getByLabelText('What is on the head'), {
      target: { value: KIT.find(({ name }) => name === '90 cm octa')?.id },
    })
    type(dialog.getByLabelText('At a distance of'), '0')
    expect(dialog.getByText(/At no distance nothing can be worked out/)).toBeTruthy()
    expect(dialog.getByRole('button', { name: 'Take the reading' })).toHaveProperty('disabled', true)
    type(dialog.getByLabelText('At a distance of'), '2')
    fireEvent.click(dialog.getByRole('button', { name: 'Take the reading' }))
    // 5.6 · 2 m · √(1 + r²/4) with the disc of a round face 0.9 m wide, r = 0.45 m.
    expect(dialog.getByText(/90 cm octa, 105 mm: guide number 11\.5 m/)).toBeTruthy()
    fireEvent.click(dialog.getByRole('button', { name: 'Save' }))
    await waitFor(() => expect(sent).toHaveLength(1))
    expect(sent[0]).toMatchObject({ body: { body: { numbers: { metered: [{ zoomMm: 105, guideNumberM: 11.48 }] } } } })
  })

  it('shows what a file would do and writes it in one request once somebody agrees', async () => {
    const sent = show()
    const dialog = await importFile(
      'Kind;Name;Shift (mired);Lets through (of 1);Price\ngel;Full warm +167;170;0,47;1\ngel;New one;10;0,9;2\ngel;Bad one;warm;0,9;3',
    )
    expect(
      await dialog.findByText('1 new, 1 change to what is there, 0 as they are, 1 that cannot be taken'),
    ).toBeTruthy()
    expect(dialog.getByText(/Read with semicolons between the cells.*“Price”/)).toBeTruthy()
    expect(dialog.getByText('Line 4')).toBeTruthy()
    expect(dialog.getByText('Shift (mired): “warm” is not a number.')).toBeTruthy()
    expect(dialog.getByText(/Shift \(mired\): 167 → 170/)).toBeTruthy()
    expect(sent).toEqual([])
    fireEvent.click(dialog.getByRole('button', { name: 'Write 2 items' }))
    await waitFor(() => expect(sent).toHaveLength(1))
    expect(sent[0]?.body).toMatchObject({ rows: [{ version: 1 }, { version: null, input: { name: 'New one' } }] })
  })

  it('leaves what is there as it is when asked to', async () => {
    show()
    const dialog = await importFile('Kind,Name,Shift (mired)\ngel,Full warm +167,170')
    fireEvent.click(await dialog.findByLabelText(/Only add what is new/))
    expect(dialog.getByRole('button', { name: 'Write into the kit room' })).toHaveProperty('disabled', true)
  })

  it('finds nothing to do in its own export', async () => {
    show()
    const dialog = await importFile(toCsv(kitTable(KIT)))
    expect(
      await dialog.findByText(`0 new, 0 changes to what is there, ${KIT.length} as they are, 0 that cannot be taken`),
    ).toBeTruthy()
  })

  it('refuses a picture and an empty file with a sentence', async () => {
    show()
    const dialog = await importFile(new Uint8Array([0x89, 0x50, 0x4e, 0x47, 0, 0, 0, 0]))
    expect(await dialog.findByText(/such as a picture/)).toBeTruthy()
    fireEvent.change(dialog.getByLabelText('File'), { target: { files: [new File([''], 'x.csv')] } })
    expect(await dialog.findByText(/The file is empty/)).toBeTruthy()
  })

  it('keeps out of setups what is older than today’s rules, and offers nothing to who may only read', async () => {
    const old = kitItemSchema.parse({
      ...flash,
      body: { kind: 'unit', numbers: { ...flash.body.numbers, guideNumberM: { value: 0, from: 'assumed' } } },
    })
    show({ kit: [old], mayChange: false })
    expect(await screen.findByText(/Kept out of setups\. Without a guide number/)).toBeTruthy()
    expect(screen.queryByRole('button', { name: 'Import a CSV' })).toBeNull()
    expect(screen.getByRole('button', { name: 'Export as CSV' })).toBeTruthy()
  })
})
