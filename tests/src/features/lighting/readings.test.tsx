// @vitest-environment jsdom
import { cleanup, fireEvent, render, screen, within } from '@testing-library/react'
import { afterEach, describe, expect, it, vi } from 'vitest'
import { cautionsOf } from '#shared/domain/lighting/cautions.ts'
import { lightUnitSchema } from '#shared/domain/lighting/schema.ts'
import { readSetup } from '#shared/domain/lighting/readings.ts'
import { CautionList } from '#src/features/lighting/components/readings/caution-list.tsx'
import { LightTable } from '#src/features/lighting/components/readings/light-table.tsx'
import { KitSelect } from '#src/features/lighting/components/editors/kit-select.tsx'
import { OCTA, light, unit, whole } from '#tests/support/lighting-sample.ts'

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
