// @vitest-environment jsdom
import { cleanup, fireEvent, render, screen } from '@testing-library/react'
import { afterEach, describe, expect, it } from 'vitest'
import { Picture } from '#src/ui/picture.tsx'

afterEach(cleanup)

describe('Picture', () => {
  it('offers every rendition of a stored picture, by width', () => {
    render(<Picture uploadId="u1" alt="Night coat" size={{ widthPx: 1000, heightPx: 2000 }} sizes="50vw" />)
    const image = screen.getByRole('img', { name: 'Night coat' })
    expect(image.getAttribute('srcset')).toBe(
      '/api/uploads/u1/320 160w, /api/uploads/u1/960 480w, /api/uploads/u1/2048 1024w',
    )
    expect(image.getAttribute('loading')).toBe('lazy')
  })

  it('shows the picture of this device while the server has not got it', () => {
    render(<Picture uploadId="u1" alt="Night coat" state="waiting" localUrl="blob:here" />)
    expect(screen.getByRole('img', { name: 'Night coat' }).getAttribute('src')).toBe('blob:here')
  })

  it('says that a picture is on its way, or was not kept and why', () => {
    render(<Picture uploadId="u1" alt="Night coat" state="waiting" />)
    expect(screen.getByRole('img', { name: 'Night coat: on its way' })).toBeTruthy()
    render(<Picture uploadId="u2" alt="Gloves" state="refused" why="This picture is broken." />)
    expect(screen.getByRole('img', { name: 'Gloves: not kept' }).textContent).toContain('This picture is broken.')
  })

  it('draws a picture that cannot be had as on its way, and tries again', () => {
    render(<Picture uploadId="u1" alt="Night coat" />)
    fireEvent.error(screen.getByRole('img', { name: 'Night coat' }))
    expect(screen.getByRole('img', { name: 'Night coat: on its way' })).toBeTruthy()
    fireEvent(window, new Event('online'))
    expect(screen.getByRole('img', { name: 'Night coat' }).tagName).toBe('IMG')
  })
})
