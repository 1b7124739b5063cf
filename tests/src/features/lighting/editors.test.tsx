// @vitest-environment jsdom
import { act, cleanup, fireEvent, render, screen } from '@testing-library/react'
import { afterEach, describe, expect, it, vi } from 'vitest'
import type { Appearance, Point } from '#shared/domain/lighting/schema.ts'
import { appearanceSchema, sitterPlaceSchema } from '#shared/domain/lighting/schema.ts'
import { AppearanceFields } from '#src/features/lighting/components/editors/appearance-fields.tsx'
import { LengthInput } from '#src/features/lighting/components/editors/length-input.tsx'
import { PlaceFields } from '#src/features/lighting/components/editors/place-fields.tsx'
import { LightShape } from '#src/features/lighting/components/plan/light-shape.tsx'
import { NextStepLine } from '#src/features/lighting/components/next-step-line.tsx'
import { chooseLengthUnit } from '#src/lib/length-unit.ts'
import { Field } from '#src/ui/field.tsx'
import { OCTA, light, whole } from '#tests/support/lighting-sample.ts'

afterEach(() => {
  cleanup()
  chooseLengthUnit('m')
})

function type(label: string, text: string) {
  const field = screen.getByLabelText(label)
  fireEvent.change(field, { target: { value: text } })
  fireEvent.keyDown(field, { key: 'Enter' })
}

describe('LengthInput', () => {
  const draw = (onChange: (metres: number) => void) =>
    render(
      <Field label="Height">
        <LengthInput value={1.6764} min={0} max={12} onChange={onChange} />
      </Field>,
    )

  it('takes either unit, whatever the device shows', () => {
    const onChange = vi.fn()
    draw(onChange)
    type('Height', `6' 6"`)
    expect(onChange.mock.lastCall?.[0]).toBeCloseTo(1.9812, 9)
    act(() => chooseLengthUnit('ft'))
    expect(screen.getByLabelText('Height')).toHaveProperty('value', `5' 6"`)
    type('Height', '2 m')
    expect(onChange.mock.lastCall?.[0]).toBe(2)
    fireEvent.keyDown(screen.getByLabelText('Height'), { key: 'ArrowUp' })
    // One press is four inches: 5 ft 10 in.
    expect(onChange.mock.lastCall?.[0]).toBeCloseTo(70 * 0.0254, 6)
  })

  it('says what is wrong and gives the old length back', () => {
    const onChange = vi.fn()
    draw(onChange)
    type('Height', 'tall')
    expect(screen.getByRole('status').textContent).toContain('the old one is back')
    type('Height', '40')
    expect(screen.getByRole('status').textContent).toBe('12 is the most.')
    expect(onChange.mock.calls).toEqual([[12]])
  })
})

describe('PlaceFields', () => {
  it('changes only the number that was touched, from what somebody else has written meanwhile', () => {
    const onChange = vi.fn<(change: (written: Point) => Point) => void>()
    render(<PlaceFields point={[-1, 1.9, 1]} whole={whole({})} onChange={onChange} />)
    type('Height', '2.2')
    expect(onChange.mock.lastCall?.[0]([-3, 1.5, 0.5])).toEqual([-3, 2.2, 0.5])
  })

  it('keeps angle and height while the distance to the eyes changes', () => {
    const onChange = vi.fn<(change: (written: Point) => Point) => void>()
    render(<PlaceFields point={[-1, 1.5, 1]} whole={whole({})} onChange={onChange} />)
    fireEvent.change(screen.getByLabelText('Measured'), { target: { value: 'eyes' } })
    expect(screen.getByLabelText('Angle (left −)')).toHaveProperty('value', '-45')
    type('To the eyes', '2')
    const [x, y, z] = onChange.mock.lastCall?.[0]([-1, 1.5, 1]) ?? [NaN, NaN, NaN]
    expect([x, y, z].map((value) => Number(value.toFixed(6)))).toEqual([-1.414214, 1.5, 1.414214])
  })
})

describe('AppearanceFields', () => {
  const place = sitterPlaceSchema.parse({
    id: '00000000-0000-4000-8000-000000000801',
    setupId: '00000000-0000-4000-8000-000000000001',
    at: [0, 0],
    eyeHeightM: 1.5,
  })

  it('writes a whole appearance when one thing of the guess is changed', () => {
    const onChange = vi.fn<(appearance: Appearance | null) => void>()
    render(<AppearanceFields place={place} onChange={onChange} />)
    fireEvent.change(screen.getByLabelText('Hair'), { target: { value: 'knot' } })
    const written = onChange.mock.lastCall?.[0]
    expect(appearanceSchema.parse(written)).toEqual(written)
    expect(written?.hair).toBe('knot')
  })

  it('goes through the six skin tones by name, each within its bounds', () => {
    // Bounds by Chardon, Cretois and Hourseau (1991): 55, 41, 28, 10, −30°.
    const bounds = [-90, -30, 10, 28, 41, 55, 91]
    const onChange = vi.fn<(appearance: Appearance | null) => void>()
    render(<AppearanceFields place={place} onChange={onChange} />)
    const slider = screen.getByRole('slider', { name: /Skin/ })
    const now = Number(slider.getAttribute('value'))
    for (const step of [0, 1, 2, 3, 4, 5].filter((candidate) => candidate !== now)) {
      fireEvent.change(slider, { target: { value: String(step) } })
      const deg = onChange.mock.lastCall?.[0]?.skinItaDeg ?? NaN
      expect(deg).toBeGreaterThan(bounds[step] ?? NaN)
      expect(deg).toBeLessThanOrEqual(bounds[step + 1] ?? NaN)
    }
    expect(onChange).toHaveBeenCalledTimes(5)
  })
})

describe('NextStepLine', () => {
  it('offers the main to an empty setup, and a panel beside the fill', () => {
    const onAddLight = vi.fn()
    const onAddPanel = vi.fn()
    const { rerender } = render(<NextStepLine whole={whole({})} onAddLight={onAddLight} onAddPanel={onAddPanel} />)
    fireEvent.click(screen.getByRole('button', { name: 'Add the main' }))
    expect(onAddLight).toHaveBeenCalledWith('main')
    const aims: { at: Point; aim: Point } = { at: [1, 2, 1], aim: [0, 1.5, 0] }
    const both = whole({
      lights: [light(1, { ...aims, purpose: 'main' }), light(2, { ...aims, purpose: 'background' })],
    })
    rerender(<NextStepLine whole={both} onAddLight={onAddLight} onAddPanel={onAddPanel} />)
    fireEvent.click(screen.getByRole('button', { name: 'Add a panel' }))
    expect(onAddPanel).toHaveBeenCalledOnce()
  })
})

describe('LightShape', () => {
  it('is hollow when the light is switched off', () => {
    const draw = (isOn: boolean) => {
      const own = light(1, { purpose: 'main', at: [-1, 2, 1], aim: [0, 1.5, 0], modifier: OCTA, isOn })
      const { container } = render(
        <svg>
          <LightShape light={own} pxPerM={80} seen="plan" chosen={false} />
        </svg>,
      )
      return [...container.querySelectorAll('path')].map((path) => path.getAttribute('fill'))
    }
    expect(new Set(draw(false))).toEqual(new Set(['none']))
    expect(draw(true)).toHaveLength(3)
    expect(draw(true)).not.toContain('none')
  })
})
