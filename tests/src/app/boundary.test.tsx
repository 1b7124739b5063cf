// @vitest-environment jsdom
import { cleanup, fireEvent, render, screen } from '@testing-library/react'
import { useState } from 'react'
import { Link, MemoryRouter, Route, Routes } from 'react-router-dom'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { Boundary } from '#src/app/boundary.tsx'

beforeEach(() => void vi.spyOn(console, 'error').mockImplementation(() => undefined))
afterEach(() => {
  cleanup()
  vi.restoreAllMocks()
})

let mounted = 0
function Counted() {
  const [number] = useState(() => ++mounted)
  return <p>mounted {number}</p>
}

function Broken(): never {
  throw new Error('broken')
}

function show(inFrame: boolean) {
  mounted = 0
  render(
    <MemoryRouter initialEntries={['/a']}>
      <Link to="/b">to b</Link>
      <Link to="/broken">to what is broken</Link>
      <Boundary inFrame={inFrame}>
        <Counted />
        <Routes>
          <Route path="/broken" element={<Broken />} />
          <Route path="*" element={null} />
        </Routes>
      </Boundary>
    </MemoryRouter>,
  )
}

const go = (name: string) => fireEvent.click(screen.getByRole('link', { name }))

describe('Boundary', () => {
  it('around everything lets what is below outlast a change of address', () => {
    show(false)
    go('to b')
    expect(screen.getByText('mounted 1')).toBeTruthy()
  })

  it('in a frame makes every address a screen of its own', () => {
    show(true)
    go('to b')
    expect(screen.getByText('mounted 2')).toBeTruthy()
  })

  it.each([true, false])('says what went wrong, and tries again at another address (in a frame: %s)', (inFrame) => {
    show(inFrame)
    go('to what is broken')
    expect(screen.getByRole('heading', { name: 'Something on this page went wrong' })).toBeTruthy()
    go('to b')
    expect(screen.queryByRole('heading')).toBeNull()
    expect(screen.getByText(/^mounted/)).toBeTruthy()
  })
})
