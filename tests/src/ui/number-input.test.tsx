// @vitest-environment jsdom
import { cleanup, fireEvent, render, screen } from '@testing-library/react'
import { useState } from 'react'
import { afterEach, describe, expect, it } from 'vitest'
import { Field } from '#src/ui/field.tsx'
import { NumberInput, parseTypedNumber } from '#src/ui/number-input.tsx'

afterEach(cleanup)

function Height({ given }: { given: (value: number) => void }) {
  const [value, setValue] = useState(1.5)
  return (
    <Field label="Height" hint="above the floor">
      <NumberInput
        value={value}
        min={0}
        max={4}
        step={0.1}
        unit="m"
        onChange={(next) => {
          setValue(next)
          given(next)
        }}
      />
    </Field>
  )
}

function setUp() {
  const given: number[] = []
  render(<Height given={(value) => given.push(value)} />)
  const input = screen.getByLabelText<HTMLInputElement>('Height')
  return { given, input }
}

describe('parseTypedNumber', () => {
  it.each([
    ['1.5', 1.5],
    ['1,5', 1.5],
    ['−2', -2],
    ['–0.25', -0.25],
    ['.5', 0.5],
    ['1 200', 1200],
  ])('reads %s as %d', (text, value) => {
    expect(parseTypedNumber(text)).toBe(value)
  })

  it.each(['', 'two', '1.2.3', '1e5', '0x10'])('reads “%s” as no number', (text) => {
    expect(parseTypedNumber(text)).toBeUndefined()
  })
})

describe('NumberInput', () => {
  it('is named by its label and described by its hint', () => {
    const { input } = setUp()
    const hint = document.getElementById(input.getAttribute('aria-describedby') ?? '')
    expect(hint?.textContent).toBe('above the floor')
  })

  it('gives what was typed on leaving, not before', () => {
    const { given, input } = setUp()
    fireEvent.change(input, { target: { value: '2,25' } })
    expect(given).toEqual([])
    fireEvent.blur(input)
    expect(given).toEqual([2.25])
    expect(input.value).toBe('2.25')
  })

  it('gives what was typed on Enter', () => {
    const { given, input } = setUp()
    fireEvent.change(input, { target: { value: '3' } })
    fireEvent.keyDown(input, { key: 'Enter' })
    expect(given).toEqual([3])
  })

  it('brings the old number back on Escape', () => {
    const { given, input } = setUp()
    fireEvent.change(input, { target: { value: '3' } })
    fireEvent.keyDown(input, { key: 'Escape' })
    fireEvent.blur(input)
    expect(given).toEqual([])
    expect(input.value).toBe('1.5')
  })

  it('stops at the limit and says so', () => {
    const { given, input } = setUp()
    fireEvent.change(input, { target: { value: '9' } })
    fireEvent.blur(input)
    expect(given).toEqual([4])
    expect(screen.getByRole('status').textContent).toBe('4 is the most.')
  })

  it('keeps the old number when no number was typed, and says so', () => {
    const { given, input } = setUp()
    fireEvent.change(input, { target: { value: 'tall' } })
    fireEvent.blur(input)
    expect(given).toEqual([])
    expect(input.value).toBe('1.5')
    expect(screen.getByRole('status').textContent).toContain('not a number')
  })

  it('moves by a step with the arrow keys, by ten with Shift, without rounding dust', () => {
    const { given, input } = setUp()
    fireEvent.keyDown(input, { key: 'ArrowUp' })
    fireEvent.keyDown(input, { key: 'ArrowUp' })
    fireEvent.keyDown(input, { key: 'ArrowDown', shiftKey: true })
    expect(given).toEqual([1.6, 1.7, 0.7])
  })

  it('gives nothing when a number that may be empty is emptied only by leaving it as it was', () => {
    const given: (number | null)[] = []
    render(<NumberInput aria-label="Width" allowEmpty value={null} onChange={(value) => given.push(value)} />)
    const input = screen.getByLabelText('Width')
    fireEvent.change(input, { target: { value: ' ' } })
    fireEvent.blur(input)
    expect(given).toEqual([])
  })
})
