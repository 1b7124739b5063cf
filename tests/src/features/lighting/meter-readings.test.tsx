// @vitest-environment jsdom
import 'fake-indexeddb/auto'
import { cleanup, fireEvent, screen, waitFor, within } from '@testing-library/react'
import { IDBFactory } from 'fake-indexeddb'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { kitItemSchema } from '#shared/api/kit.ts'
import { readSetup } from '#shared/domain/lighting/readings.ts'
import { isLamp } from '#shared/domain/lighting/schema.ts'
import { readAll } from '#shared/realtime/collection.ts'
import { lights } from '#shared/realtime/documents.ts'
import type { Role } from '#shared/access/roles.ts'
import { MeterReadings } from '#src/features/lighting/components/meter/meter-readings.tsx'
import { NewerNumbers } from '#src/features/lighting/components/meter/newer-numbers.tsx'
import { putSetup } from '#src/features/lighting/write-setups.ts'
import { useKit } from '#src/features/lighting/use-kit.ts'
import { useSetupWriter } from '#src/features/lighting/use-setup-writer.ts'
import { usePlan } from '#src/realtime/use-plan.ts'
import { FLASH_KIT, OCTA, id, light, unit, whole } from '#tests/support/lighting-sample.ts'
import { SHOOT_ID, shootScreen } from '#tests/support/shoot-screen.tsx'

beforeEach(() => {
  globalThis.indexedDB = new IDBFactory()
})
afterEach(cleanup)

const face: [number, number, number] = [0, 1.5, 0]
const sample = whole({
  lights: [
    light(11, { purpose: 'main', at: [-1.2, 1.9, 1.2], aim: face, modifier: OCTA, group: 'A', power: 0.5 }),
    light(12, { purpose: 'fill', at: [1.2, 1.9, 1.2], aim: face }),
  ],
})
const item = (version: number, more: Record<string, unknown> = {}) =>
  kitItemSchema.parse({
    id: FLASH_KIT,
    version,
    name: 'Small flash',
    body: { kind: 'unit', numbers: unit(undefined, more).numbers },
  })
const studioPath = `PUT /api/studios/00000000-0000-4000-8000-0000000000ab/kit/${FLASH_KIT}`

function Screen() {
  const plan = usePlan()
  const setup = plan.setups.get(id(1))
  return setup ? <Parts setup={setup} /> : <p>No setup</p>
}
function Parts({ setup }: { setup: NonNullable<ReturnType<ReturnType<typeof usePlan>['setups']['get']>> }) {
  const writer = useSetupWriter(setup)
  const kit = useKit()
  return (
    <>
      <p>kit {kit.state}</p>
      <p>{kit.units.length} units to pick</p>
      <NewerNumbers whole={setup} kit={kit} writer={writer} />
      <button type="button" onClick={writer.undo.undo}>
        Undo
      </button>
      <MeterReadings whole={setup} reading={readSetup(setup)} kit={kit} writer={writer} open onOpenChange={() => {}} />
    </>
  )
}

type Options = { role?: Role; inStudio?: boolean; date?: string; stored?: ReturnType<typeof item>; refuse?: boolean }

function show({ role = 'photographer', inStudio = true, date, stored = item(1), refuse = false }: Options = {}) {
  let kit = stored
  const shoot = shootScreen(
    role,
    {
      [`GET /api/shoots/${SHOOT_ID}/kit`]: () => ({ body: { kit: [kit] } }),
      [studioPath]: (body) => {
        if (refuse)
          return { status: 409, body: { error: { code: 'CONFLICT', message: 'Somebody changed this item.' } } }
        kit = kitItemSchema.parse({ ...kit, ...(body as object), version: kit.version + 1 })
        return { body: { kit: [kit] } }
      },
    },
    { inStudio, ...(date === undefined ? {} : { date }) },
  )
  putSetup(shoot.docs.lighting, sample)
  shoot.show(<Screen />)
  const unitOf = (n: number) => {
    const own = [...readAll(shoot.docs.lighting, lights).items.values()].find((one) => one.id === id(n))?.unit
    if (!own || isLamp(own.numbers)) throw new Error('a flash unit')
    return { version: own.version, guideNumberM: own.numbers.guideNumberM.value, metered: own.numbers.metered }
  }
  const sentToKit = () => shoot.sent.filter(({ request }) => request === studioPath)
  return { ...shoot, unitOf, sentToKit }
}

const row = async (name: string) => screen.findByRole('listitem', { name: new RegExp(`^(group A|no group)? ?${name}`) })
async function type(name: string, value: string) {
  await screen.findByText('kit there')
  const field = within(await row(name)).getByLabelText('The meter reads f/')
  fireEvent.focus(field)
  fireEvent.change(field, { target: { value } })
  fireEvent.blur(field)
}

describe('MeterReadings', () => {
  it('shows what was assumed against what was measured', async () => {
    show()
    await type('Main', '5')
    const assumed = readSetup(sample).lights[0]?.fNumber ?? 0
    expect(assumed).toBeGreaterThan(5)
    expect((await row('Main')).textContent).toMatch(/assumed f\/\d+(\.\d)?, measured f\/5 \(−/)
  })

  it('writes the kit room’s unit and this light, whose copy then is up to date', async () => {
    const shoot = show()
    await type('Main', '5')
    fireEvent.click(screen.getByRole('button', { name: 'Take 1 reading over' }))
    await waitFor(() => expect(shoot.unitOf(11).metered).toHaveLength(1))
    expect(shoot.unitOf(11)).toMatchObject({
      version: 2,
      metered: [{ modifierKitId: OCTA.kitId, source: expect.stringContaining('with 90 cm octa') }],
    })
    expect(shoot.sentToKit()).toMatchObject([{ body: { version: 1, name: 'Small flash' } }])
    expect(shoot.unitOf(12).metered).toEqual([])
    expect(await screen.findByText('1 light has newer numbers in the kit room')).toBeTruthy()
  })

  it('changes only the light’s copy for somebody who is not in the studio, and says so', async () => {
    const shoot = show({ role: 'crew', inStudio: false })
    expect(await screen.findByText(/You are not in the studio: readings go into this setup/)).toBeTruthy()
    await type('Fill', '8')
    fireEvent.click(screen.getByRole('button', { name: 'Take 1 reading over' }))
    await waitFor(() => expect(shoot.unitOf(12).metered).toMatchObject([{ modifierKitId: null }]))
    expect([shoot.unitOf(12).version, shoot.sentToKit().length]).toEqual([1, 0])
  })

  it('keeps the reading in the light and in its field when the kit room refuses it', async () => {
    const shoot = show({ refuse: true })
    await type('Main', '5')
    fireEvent.click(screen.getByRole('button', { name: 'Take 1 reading over' }))
    expect(
      await screen.findByText(/Somebody changed this item\. The lights of this setup have the readings\./),
    ).toBeTruthy()
    expect(shoot.unitOf(11)).toMatchObject({ version: 1, metered: [{}] })
    expect(within(await row('Main')).getByLabelText('The meter reads f/')).toHaveProperty('value', '5')
  })

  it('says what is wrong at the field and takes nothing over', async () => {
    show()
    await type('Main', '1000')
    expect(within(await row('Main')).getByText(/A meter reads between f\/0.7 and f\/128/)).toBeTruthy()
    expect(screen.getByRole('button', { name: 'Take readings over' })).toHaveProperty('disabled', true)
  })

  it('takes back what was wrong with the first key, so that nothing moves under a press', async () => {
    show()
    await type('Main', '1000')
    const main = within(await row('Main'))
    const field = main.getByLabelText('The meter reads f/')
    fireEvent.input(field, { target: { value: '4' } })
    expect(main.queryByText(/A meter reads between/)).toBeNull()
    fireEvent.blur(field)
    expect(screen.getByRole('button', { name: 'Take 1 reading over' })).toHaveProperty('disabled', false)
  })

  it('is only looked at by who may not change the light', async () => {
    show({ role: 'client' })
    await screen.findByText('kit there')
    expect(screen.queryByLabelText('The meter reads f/')).toBeNull()
    expect((await row('Main')).textContent).toContain('assumed f/')
  })
})

describe('NewerNumbers', () => {
  const newer = item(2, { guideNumberM: { value: 52, from: 'measured', source: 'meter' } })
  const offer = () => screen.findByText('2 lights have newer numbers in the kit room')

  it('takes all of them over as one step of undo', async () => {
    const shoot = show({ stored: newer, date: '2999-01-01' })
    await offer()
    expect(screen.getByText('Main A: GN 40 → 52 measured')).toBeTruthy()
    fireEvent.click(screen.getByText('Take them over'))
    await waitFor(() => expect([shoot.unitOf(11).guideNumberM, shoot.unitOf(12).guideNumberM]).toEqual([52, 52]))
    fireEvent.click(screen.getByText('Undo'))
    await waitFor(() => expect([shoot.unitOf(11).guideNumberM, shoot.unitOf(12).guideNumberM]).toEqual([40, 40]))
    await offer()
  })

  it('offers nothing to a shoot that is past, or to who may not change lights', async () => {
    show({ stored: newer, date: '2020-01-01' })
    await screen.findByText('kit there')
    expect(screen.queryByText(/newer numbers/)).toBeNull()
    cleanup()
    show({ stored: newer, role: 'client' })
    await screen.findByText('kit there')
    expect(screen.queryByText(/newer numbers/)).toBeNull()
  })
})

describe('useKit', () => {
  it('keeps a unit without a guide number out of what can be picked', async () => {
    show()
    expect(await screen.findByText('1 units to pick')).toBeTruthy()
    cleanup()
    show({ stored: item(2, { guideNumberM: { value: 0, from: 'assumed', source: '' } }) })
    await screen.findByText('kit there')
    expect(screen.getByText('0 units to pick')).toBeTruthy()
    expect(screen.queryByText(/newer numbers/)).toBeNull()
  })
})
