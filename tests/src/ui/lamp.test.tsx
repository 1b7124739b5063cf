// @vitest-environment jsdom
import { cleanup, render, screen } from '@testing-library/react'
import { afterEach, describe, expect, it } from 'vitest'
import { Lamp, LampRow } from '#src/ui/lamp.tsx'

afterEach(cleanup)

describe('Lamp', () => {
  it('has a name where no text stands beside it, and is silent where one does', () => {
    render(
      <>
        <Lamp state="lit" label="Signed off" />
        <Lamp state="half" />
      </>,
    )
    expect(screen.getAllByRole('img').map((lamp) => lamp.getAttribute('aria-label'))).toEqual(['Signed off'])
  })
})

describe('LampRow', () => {
  it('says its sum in words', () => {
    render(<LampRow states={['lit', 'lit', 'half', 'unlit']} />)
    expect(screen.getByText('2 of 4 ready')).toBeTruthy()
  })
})
