// @vitest-environment jsdom
import { cleanup, fireEvent, render, screen, within } from '@testing-library/react'
import { afterEach, describe, expect, it, vi } from 'vitest'
import { cautionsOf } from '#shared/domain/lighting/cautions.ts'
import { lightUnitSchema } from '#shared/domain/lighting/schema.ts'
import { readSetup } from '#shared/domain/lighting/readings.ts'
import { CautionList } from '#src/features/lighting/components/readings/caution-list.tsx'
import { Figures } from '#src/features/lighting/components/readings/figures.tsx'
import { KitGroups } from '#src/features/lighting/components/readings/kit-groups.tsx'
import { LightGroups } from '#src/features/lighting/components/readings/light-groups.tsx'
import { LightTable } from '#src/features/lighting/components/readings/light-table.tsx'
import { useOpenGroups } from '#src/features/lighting/components/readings/use-open-groups.ts'
import { chooseLengthUnit, lengthUnit } from '#src/lib/length-unit.ts'
import { KitSelect } from '#src/features/lighting/components/editors/kit-select.tsx'
import { BOOM, HALF_BLUE, OCTA, light, unit, whole } from '#tests/support/lighting-sample.ts'

afterEach(cleanup)

const face: [number, number, number] = [0, 1.5, 0]
const main = light(1, { purpose: 'main', at: [-1.2, 1.9, 1.2], aim: face, modifier: OCTA, group: 'A', power: 1 })
const fill = light(2, { purpose: 'fill', at: [1.2, 1.9, 1.2], aim: face, modifier: OCTA, power: 0.25 })
const setup = whole({ lights: [main, fill] })

describe('LightTable', () => {
  it('shows group, power, reading and stops against the main, and chooses a light by its row', () => {
    const onChoose = vi.fn()
    render(<LightTable whole={setup} reading={readSetup(setup)} chosenKey={null} onChoose={onChoose} />)
    const rows = screen.getAllByRole('row')
    expect(within(rows[1] ?? document.body).getByRole('img', { name: 'group A' })).toBeTruthy()
    expect(rows[2]?.textContent).toContain('−2')
    fireEvent.click(screen.getByRole('button', { name: /^Fill 90 cm octa/ }))
    expect(onChoose).toHaveBeenCalledWith(fill.id)
  })

  it('opens a reading to its formula, inputs and assumption', () => {
    render(<LightTable whole={setup} reading={readSetup(setup)} chosenKey={null} onChoose={vi.fn()} />)
    fireEvent.click(screen.getByRole('button', { name: 'Main reads: how it is worked out' }))
    const dialog = screen.getByRole('dialog', { name: 'How Main reads is worked out' })
    expect(dialog.textContent).toContain('√(H · ISO / 250)')
    expect(dialog.textContent).toContain('assumed: sample')
  })

  it('marks a light that is off, turns it on by its switch, and says at its row what nothing can be worked out from', () => {
    const onSwitch = vi.fn()
    const behind = light(3, { purpose: 'rim', at: [0, 2, -3], aim: face })
    const other = whole({ lights: [main, { ...fill, isOn: false }, behind] })
    render(
      <LightTable whole={other} reading={readSetup(other)} chosenKey={null} onChoose={vi.fn()} onSwitch={onSwitch} />,
    )
    const row = (name: RegExp) => within(screen.getByRole('row', { name }))
    expect(row(/Fill/).getByText('off')).toBeTruthy()
    expect(row(/Fill/).queryByRole('button', { name: /Fill reads/ })).toBeNull()
    const turn = screen.getByRole('switch', { name: 'Fill on/off' })
    expect(turn.getAttribute('aria-checked')).toBe('false')
    fireEvent.click(turn)
    expect(onSwitch).toHaveBeenCalledWith(fill.id, true)
    expect(row(/Rim/).getByText(/stands behind the wall, which keeps its light off/)).toBeTruthy()
    expect(row(/Main/).queryByText(/wall/)).toBeNull()
  })

  it('has no switches for those who only read', () => {
    render(<LightTable whole={setup} reading={readSetup(setup)} chosenKey={null} onChoose={vi.fn()} />)
    expect(screen.queryByRole('switch')).toBeNull()
  })

  it('says that a number is measured, and how', () => {
    const source = 'f/5.6 at 2 m, full power, ISO 100, with 90 cm octa'
    const metered = [{ modifierKitId: OCTA.kitId, zoomMm: null, guideNumberM: 30, source }]
    const other = whole({ lights: [light(1, { ...main, unit: unit(undefined, { metered }) }), fill] })
    render(<LightTable whole={other} reading={readSetup(other)} chosenKey={null} onChoose={vi.fn()} />)
    expect(screen.getByRole('button', { name: /^Main 90 cm octa · 1\.7 m · measured$/ })).toBeTruthy()
    fireEvent.click(screen.getByRole('button', { name: 'Main reads: how it is worked out' }))
    expect(screen.getByRole('dialog').textContent).toContain(`measured: ${source}`)
    expect(screen.getByText(/^Assumed numbers in fill:/)).toBeTruthy()
  })

  it('opens the difference to the main, what a panel gives and what all give together', () => {
    const other = whole({ lights: [main], props: [{ at: [0.8, 1.4, 0.8], turnDeg: -135, colour: '#ffffff' }] })
    render(<LightTable whole={other} reading={readSetup(other)} chosenKey={null} onChoose={vi.fn()} />)
    for (const name of ['Main vs main', 'White panel reads', 'White panel vs main', 'All together']) {
      fireEvent.click(screen.getByRole('button', { name: `${name}: how it is worked out` }))
      expect(screen.getByRole('dialog', { name: `How ${name} is worked out` }).textContent).toMatch(/N|E = ρ/)
      fireEvent.keyDown(screen.getByRole('dialog'), { key: 'Escape' })
    }
    expect(screen.getByRole('row', { name: /White panel/ }).textContent).toContain('from A')
  })
})

describe('Figures', () => {
  it('open the wall’s colour to head and gels, each with where its number comes from', () => {
    const back = light(4, { purpose: 'background', at: [0.8, 0.6, -1], aim: [0, 1.4, -2], gels: [HALF_BLUE] })
    const other = whole({ lights: [main, back] })
    render(<Figures whole={other} reading={readSetup(other)} />)
    // 5500 K with −68 mired: 10⁶ / (181.8 − 68) = 8787 K.
    expect(screen.getByText('8800 K')).toBeTruthy()
    fireEvent.click(screen.getByRole('button', { name: 'Wall light: how it is worked out' }))
    expect(screen.getByRole('dialog').textContent).toMatch(/Small flash, Tassumed: sample5500 K.*−68 mired/)
  })
})

function Groups({ whole: shown, frames }: { whole: ReturnType<typeof whole>; frames: number | null }) {
  const groups = useOpenGroups()
  const use = { orientations: ['upright' as const], frames }
  const reading = readSetup(shown, { ...use, unit: lengthUnit() })
  return (
    <>
      <LightGroups whole={shown} reading={reading} groups={groups} />
      <KitGroups whole={shown} reading={reading} use={use} nameOfPlace={() => 'Astronomer'} groups={groups} />
    </>
  )
}

const TITLES = [
  'Ambient against flash',
  'Glow on the wall',
  'Height and softness of the main',
  'Lens and frame',
  'Pops and recycling',
  'Stands, booms and mains',
]
const press = (title: string) => fireEvent.click(screen.getByRole('button', { name: new RegExp(`^${title}`) }))

describe('groups of readings', () => {
  afterEach(() => chooseLengthUnit('m'))
  const onBoom = light(3, { purpose: 'rim', at: [0.6, 2.2, -0.8], aim: face, support: BOOM })
  const back = light(4, { purpose: 'background', at: [0.8, 0.6, -1], aim: [0, 1.4, -2], gels: [HALF_BLUE] })
  const full = whole({ lights: [main, fill, onBoom, back], ambientLux: 100 })

  it('are closed to begin with, and open to numbers that each open their formula', () => {
    render(<Groups whole={full} frames={40} />)
    expect(screen.queryAllByRole('listitem')).toEqual([])
    for (const title of TITLES) press(title)
    const open = screen.getAllByRole('button', { name: /: how it is worked out$/ })
    expect(open.length).toBeGreaterThan(18)
    for (const button of open) {
      fireEvent.click(button)
      expect(screen.getByRole('dialog').querySelector('p')?.textContent).not.toBe('')
      fireEvent.keyDown(screen.getByRole('dialog'), { key: 'Escape' })
    }
    press('Lens and frame')
    expect(screen.queryByText('In focus')).toBeNull()
  })

  it('say ambient, glow, framing, pops and counterweight in words', () => {
    render(<Groups whole={full} frames={40} />)
    for (const title of TITLES) press(title)
    const text = screen.getAllByRole('listitem').map((line) => line.textContent)
    const has = (pattern: RegExp) => expect(text.filter((line) => pattern.test(line ?? ''))).toHaveLength(1)
    has(/^Ambient.*stops under the flash at 1\/160/)
    has(/^Its brightest point.*m up, .*(under|over) the main/)
    has(/^Its colour.*cooler than the camera is set/)
    has(/^At the shoulders.*shoulders/)
    has(/^Against the eye line.*above the eye line; its middle is 0\.4 m higher/)
    has(/^Upright frame.*0\.3 m above the head/)
    has(/^Astronomer.*free at the left/)
    // 40 frames at full and 150 pops in a charge, all of the sample's numbers.
    has(/^Mainfull pops for 40 frames; ready again in 3\.5 s40 of 150/)
    has(/^Counterweight of the rim.*bag/)
    has(/^Shutter against sync.*1\/200 \(assumed\)/)
  })

  it('say every length in feet when the person reads feet', () => {
    chooseLengthUnit('ft')
    render(<Groups whole={full} frames={null} />)
    for (const title of TITLES) press(title)
    const text = screen
      .getAllByRole('listitem')
      .map((line) => line.textContent)
      .join(' ')
    expect(text).toMatch(/\d′ \d+½?″/)
    expect(text.replaceAll('2.4 m stand', '').replaceAll('90 cm octa', '')).not.toMatch(/\d (m|cm|mm)\b/)
  })

  it('say what is missing instead of a number', () => {
    render(<Groups whole={whole({ lights: [{ ...main, isOn: false }] })} frames={null} />)
    for (const title of TITLES.filter((one) => one !== 'Pops and recycling')) press(title)
    expect(screen.getByText('The camera sees no lit wall.')).toBeTruthy()
    expect(screen.getByText(/^Not measured, so it is left out/)).toBeTruthy()
    expect(screen.getByText(/^There is no fill, panel or ambient/)).toBeTruthy()
  })
})

describe('CautionList', () => {
  it('says each caution with its reason one press away', () => {
    render(<CautionList cautions={cautionsOf(setup)} onChoose={vi.fn()} />)
    expect(screen.getByText('Bag the main stand')).toBeTruthy()
    fireEvent.click(screen.getByRole('button', { name: 'Why: Bag the main stand' }))
    expect(screen.getByRole('dialog').textContent).toContain('assumptions')
  })
})

describe('KitSelect', () => {
  const own = lightUnitSchema.parse(unit())
  const newer = lightUnitSchema.parse({
    ...unit(undefined, { guideNumberM: { value: 44, from: 'measured', source: 'meter' } }),
    version: 2,
  })
  const kit = {
    units: [],
    modifiers: [],
    panels: [],
    gels: [],
    supports: [],
    versions: new Map(),
    quantities: new Map(),
    state: 'there' as const,
  }

  it('offers newer numbers of the kit room and takes them over with one press', () => {
    const onChange = vi.fn()
    render(<KitSelect label="Unit" items={[newer]} value={own} kit={kit} onChange={onChange} />)
    fireEvent.click(screen.getByRole('button', { name: 'Take over the new numbers' }))
    expect(onChange).toHaveBeenCalledWith(newer)
  })

  it('keeps what is no longer in the kit room', () => {
    render(<KitSelect label="Unit" items={[]} value={own} kit={kit} onChange={vi.fn()} />)
    expect(screen.getByLabelText('Unit')).toHaveProperty('value', own.kitId)
    expect(screen.getByText(/No longer in the kit room/)).toBeTruthy()
  })
})
