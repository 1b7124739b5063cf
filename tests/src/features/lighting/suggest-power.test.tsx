// @vitest-environment jsdom
import 'fake-indexeddb/auto'
import { cleanup, fireEvent, screen, waitFor, within } from '@testing-library/react'
import { IDBFactory } from 'fake-indexeddb'
import { useState } from 'react'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { powerLabel } from '#shared/domain/lighting/words.ts'
import { readAll } from '#shared/realtime/collection.ts'
import { lights } from '#shared/realtime/documents.ts'
import { SuggestPower } from '#src/features/lighting/components/power/suggest-power.tsx'
import { useSetupWriter } from '#src/features/lighting/use-setup-writer.ts'
import { putSetup } from '#src/features/lighting/write-setups.ts'
import { usePlan } from '#src/realtime/use-plan.ts'
import { OCTA, id, light, whole } from '#tests/support/lighting-sample.ts'
import { shootScreen } from '#tests/support/shoot-screen.tsx'

beforeEach(() => {
  globalThis.indexedDB = new IDBFactory()
})
afterEach(cleanup)

const face: [number, number, number] = [0, 1.5, 0]
// Main and fill stand alike, so a stop of power is a stop of reading between them.
const sample = whole({
  lights: [
    light(11, { purpose: 'main', at: [-1.2, 1.9, 1.2], aim: face, modifier: OCTA, group: 'A', power: 1 / 8 }),
    light(12, { purpose: 'fill', at: [1.2, 1.9, 1.2], aim: face, modifier: OCTA, power: 1 / 16 }),
    light(13, { purpose: 'rim', at: [0.8, 2, -1], aim: face, isOn: false }),
  ],
  camera: { fNumber: 11 },
})

function Parts({ setup }: { setup: NonNullable<ReturnType<ReturnType<typeof usePlan>['setups']['get']>> }) {
  const writer = useSetupWriter(setup)
  const [isOpen, setIsOpen] = useState(true)
  return (
    <>
      <button type="button" onClick={writer.undo.undo}>
        Undo
      </button>
      <SuggestPower whole={setup} writer={writer} open={isOpen} onOpenChange={setIsOpen} />
    </>
  )
}
function Screen() {
  const setup = usePlan().setups.get(id(1))
  return setup ? <Parts setup={setup} /> : <p>No setup</p>
}

function show() {
  const shoot = shootScreen('photographer', {})
  putSetup(shoot.docs.lighting, sample)
  shoot.show(<Screen />)
  const powers = () => {
    const all = [...readAll(shoot.docs.lighting, lights).items.values()]
    return [11, 12, 13].map((n) => powerLabel(all.find((one) => one.id === id(n))?.power ?? 0))
  }
  return { ...shoot, powers }
}

const suggested = (name: string) => screen.findByRole('status', { name: `Suggested for the ${name}` })
const wish = async (name: RegExp, label: string) => {
  const select = within(await screen.findByRole('listitem', { name })).getByRole('combobox')
  const option = within(select).getByRole<HTMLOptionElement>('option', { name: label })
  fireEvent.change(select, { target: { value: option.value } })
}

describe('SuggestPower', () => {
  it('begins with the camera’s f-number for the main and what the others are now', async () => {
    show()
    const main = within(await screen.findByRole('listitem', { name: 'Main' })).getByLabelText('Shall read')
    expect(main).toHaveProperty('value', '21')
    const fill = within(screen.getByRole('listitem', { name: 'Fill' })).getByLabelText('Against the main')
    expect(fill).toHaveProperty('value', '-3')
    expect((await suggested('rim')).textContent).toBe('is off and stays so')
  })

  it('shows the nearest power at once, and sets all of them as one step of undo', async () => {
    const { powers } = show()
    await wish(/^Fill$/, '−1')
    expect((await suggested('main')).textContent).toMatch(
      /^1\/4 instead of 1\/8reads f\/11; (as wished|[+−]0\.[12] stop off)$/,
    )
    expect((await suggested('fill')).textContent).toMatch(/^1\/8 instead of 1\/16reads f\/8, −1 against the main; /)
    const before = powers()
    fireEvent.click(screen.getByRole('button', { name: 'Set these powers' }))
    await waitFor(() => expect(powers()).toEqual(['1/4', '1/8', before[2]]))
    expect(screen.queryByRole('dialog')).toBeNull()
    fireEvent.click(screen.getByText('Undo'))
    await waitFor(() => expect(powers()).toEqual(before))
  })

  it('says plainly when a unit cannot reach the wish', async () => {
    show()
    await wish(/^Main$/, 'f/45')
    expect((await suggested('main')).textContent).toMatch(
      /At full power the main stays \d\.\d stops under: move it to about \d\.\d m, or raise the ISO\.$/,
    )
  })

  it('has nothing to set when every light stays as it is', async () => {
    show()
    await wish(/^Main$/, 'as it is')
    await wish(/^Fill$/, 'as it is')
    expect((await suggested('main')).textContent).toBe('stays at 1/8')
    expect(screen.getByRole('button', { name: 'Set these powers' })).toHaveProperty('disabled', true)
  })
})
