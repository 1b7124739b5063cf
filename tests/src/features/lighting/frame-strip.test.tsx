// @vitest-environment jsdom
import { cleanup, fireEvent, render, screen, within } from '@testing-library/react'
import { afterEach, beforeAll, describe, expect, it, vi } from 'vitest'
import { frameStages } from '#shared/domain/lighting/frame-stages.ts'
import { readSetup } from '#shared/domain/lighting/readings.ts'
import type { Light } from '#shared/domain/lighting/schema.ts'
import { FrameStrip } from '#src/features/lighting/components/frames/frame-strip.tsx'
import type { TestFrame } from '#src/features/lighting/test-frame/use-test-frame.ts'
import { GRID, OCTA, light, whole } from '#tests/support/lighting-sample.ts'

const FACE: [number, number, number] = [0, 1.5, 0]
const RIM = light(13, { purpose: 'rim', at: [1.6, 1.5, -1.2], aim: FACE, modifier: GRID, isOn: false })
const MAIN = light(11, { purpose: 'main', at: [0, 1.5, 2], aim: FACE, modifier: OCTA })
const FILL = light(12, { purpose: 'fill', at: [0, 1.5, 4], aim: FACE })

function show(lights: Light[], more: { frame?: Partial<TestFrame>; chosenId?: string } = {}) {
  const setup = whole({ lights })
  const handlers = { onChoose: vi.fn(), onOpen: vi.fn() }
  const frame: TestFrame = { layers: null, isFine: false, failure: null, tryAgain: vi.fn(), ...more.frame }
  render(
    <FrameStrip
      setup={setup.setup}
      stages={frameStages(setup, readSetup(setup))}
      orientation="upright"
      frame={frame}
      chosenId={more.chosenId ?? null}
      {...handlers}
    />,
  )
  return { ...handlers, frame }
}

beforeAll(() => {
  vi.spyOn(HTMLCanvasElement.prototype, 'getContext').mockReturnValue(null)
})
afterEach(cleanup)

describe('FrameStrip', () => {
  it('has a picture for each light in the order they are built, with what it reads', () => {
    show([RIM, FILL, MAIN])
    const items = screen.getAllByRole('listitem').map((item) => item.textContent)
    expect(items).toEqual(['Mainf/10', '+ fill−2', '+ rimoff'])
  })

  it('opens the stage that is pressed and chooses its light', () => {
    const { onChoose, onOpen } = show([MAIN, FILL])
    fireEvent.click(screen.getByRole('button', { name: /\+ fill/ }))
    expect(onChoose).toHaveBeenCalledExactlyOnceWith(FILL.id)
    expect(onOpen).toHaveBeenCalledExactlyOnceWith(FILL.id)
  })

  it('goes from picture to picture by arrow keys, choosing and opening nothing', () => {
    const { onChoose, onOpen } = show([MAIN, FILL, RIM], { chosenId: FILL.id })
    const fill = screen.getByRole('button', { name: /\+ fill/ })
    expect(fill).toHaveProperty('tabIndex', 0)
    fill.focus()
    fireEvent.keyDown(fill, { key: 'ArrowRight' })
    expect(document.activeElement).toBe(screen.getByRole('button', { name: /\+ rim/ }))
    fireEvent.keyDown(screen.getByRole('button', { name: /\+ rim/ }), { key: 'ArrowRight' })
    fireEvent.keyDown(screen.getByRole('button', { name: /\+ rim/ }), { key: 'Home' })
    expect(document.activeElement).toBe(screen.getByRole('button', { name: /Main/ }))
    expect(onChoose.mock.calls).toEqual([[RIM.id], [MAIN.id]])
    expect(onOpen).not.toHaveBeenCalled()
  })

  it('says what belongs here when there is no light', () => {
    show([])
    expect(screen.getByText(/once there is a light/)).toBeTruthy()
  })

  it('says in a sentence when pictures cannot be computed, and keeps stages and numbers', () => {
    const { frame } = show([MAIN], { frame: { failure: 'Test frames cannot be computed here.' } })
    expect(screen.getByRole('status').textContent).toContain('Test frames cannot be computed here.')
    fireEvent.click(within(screen.getByRole('status')).getByRole('button', { name: 'Try again' }))
    expect(frame.tryAgain).toHaveBeenCalledTimes(1)
    expect(screen.getAllByRole('listitem')).toHaveLength(1)
  })
})
