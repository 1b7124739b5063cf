import { type WallControl, announce } from '../wall-control.ts'
import { handleWallKey } from './keys.ts'

/** Whether keys typed here belong to a field. */
export function isTyping(target: EventTarget | null): boolean {
  return target instanceof HTMLElement && (target.isContentEditable || /^(INPUT|TEXTAREA|SELECT)$/.test(target.tagName))
}

/** Whether a dialog or menu lies over the board: its keys are its own. */
function isElsewhere(element: HTMLElement, target: EventTarget | null): boolean {
  return !(target instanceof Node) || (target !== document.body && !element.contains(target))
}

/** Keys of the wall, and undo and redo anywhere on the board outside of fields. */
export function attachKeyboard(element: HTMLElement, control: WallControl): () => void {
  const { state } = control
  let spaceUsed = false

  const handleDown = (event: KeyboardEvent) => {
    if (isTyping(event.target) || event.defaultPrevented) return
    const command = event.ctrlKey || event.metaKey
    const key = event.key.toLowerCase()
    if (command && (key === 'z' || key === 'y')) {
      event.preventDefault()
      if (!control.mayWrite()) return
      const isRedo = key === 'y' || event.shiftKey
      if (isRedo) control.redo()
      else control.undo()
      announce(control, isRedo ? 'Done again' : 'Taken back')
      return
    }
    if (isElsewhere(element, event.target)) return
    if (event.key === ' ') {
      event.preventDefault()
      if (!event.repeat) spaceUsed = false
      state.panning.set(!state.lifted.get())
      return
    }
    if (handleWallKey(control, event)) event.preventDefault()
  }

  // Space held and dragged pans; pressed alone it is the key that picks up and drops.
  const handleUp = (event: KeyboardEvent) => {
    if (event.key !== ' ') return
    const wasPanning = state.panning.get()
    state.panning.set(false)
    if (isTyping(event.target) || isElsewhere(element, event.target) || (wasPanning && spaceUsed)) return
    if (handleWallKey(control, event)) event.preventDefault()
  }
  const handlePress = () => {
    if (state.panning.get()) spaceUsed = true
  }
  const handleBlur = () => state.panning.set(false)

  document.addEventListener('keydown', handleDown)
  document.addEventListener('keyup', handleUp)
  element.addEventListener('pointerdown', handlePress, true)
  window.addEventListener('blur', handleBlur)
  return () => {
    document.removeEventListener('keydown', handleDown)
    document.removeEventListener('keyup', handleUp)
    element.removeEventListener('pointerdown', handlePress, true)
    window.removeEventListener('blur', handleBlur)
  }
}
