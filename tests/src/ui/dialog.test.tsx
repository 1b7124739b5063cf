// @vitest-environment jsdom
import { cleanup, fireEvent, render, screen, waitFor } from '@testing-library/react'
import { useState } from 'react'
import { afterEach, describe, expect, it } from 'vitest'
import { Button } from '#src/ui/button.tsx'
import { Confirm } from '#src/ui/confirm.tsx'
import { Dialog } from '#src/ui/dialog.tsx'

afterEach(cleanup)

function Asking() {
  const [open, setOpen] = useState(false)
  return (
    <>
      <Button onClick={() => setOpen(true)}>Add a room</Button>
      <Dialog open={open} onOpenChange={setOpen} title="A room" description="Its size decides what fits.">
        <input aria-label="Name" />
      </Dialog>
    </>
  )
}

async function open() {
  render(<Asking />)
  const button = screen.getByRole('button', { name: 'Add a room' })
  button.focus()
  fireEvent.click(button)
  return { button, dialog: await screen.findByRole('dialog', { name: 'A room' }) }
}

describe('Dialog', () => {
  it('is named by its title and described by its description', async () => {
    const { dialog } = await open()
    expect(document.getElementById(dialog.getAttribute('aria-describedby') ?? '')?.textContent).toBe(
      'Its size decides what fits.',
    )
  })

  it('takes the focus in', async () => {
    const { dialog } = await open()
    await waitFor(() => expect(dialog.contains(document.activeElement)).toBe(true))
  })

  it('begins in its first field and gives the focus back to what opened it', async () => {
    const { button, dialog } = await open()
    await waitFor(() => expect(document.activeElement).toBe(screen.getByLabelText('Name')))
    fireEvent.keyDown(dialog, { key: 'Escape' })
    await waitFor(() => expect(document.activeElement).toBe(button))
  })

  it('closes on Escape', async () => {
    const { dialog } = await open()
    fireEvent.keyDown(dialog, { key: 'Escape' })
    await waitFor(() => expect(screen.queryByRole('dialog')).toBeNull())
  })

  it('closes by its button and hides what is behind it while open', async () => {
    const { button } = await open()
    expect(button.closest('[aria-hidden="true"]')).not.toBeNull()
    fireEvent.click(screen.getByRole('button', { name: 'Close' }))
    await waitFor(() => expect(screen.queryByRole('dialog')).toBeNull())
  })
})

describe('Confirm', () => {
  it('puts the focus on the safe answer and acts only on the other', async () => {
    const done: string[] = []
    render(
      <Confirm
        open
        onOpenChange={() => done.push('closed')}
        title="Remove it?"
        action="Remove"
        onConfirm={() => done.push('removed')}
      >
        It is gone then.
      </Confirm>,
    )
    await screen.findByRole('alertdialog', { name: 'Remove it?' })
    await waitFor(() => expect(document.activeElement?.textContent).toBe('Keep it'))
    expect(done).toEqual([])
    fireEvent.click(screen.getByRole('button', { name: 'Remove' }))
    expect(done).toEqual(['removed'])
  })
})
