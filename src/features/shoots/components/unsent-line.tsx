import { count } from '#src/lib/format.ts'
import type { UnsentOfShoot } from '#src/realtime/use-unsent-by-shoot.ts'

/** Says what of a shoot only this device has: it is not sent before the shoot is opened again. */
export function UnsentLine({ unsent: { changes, pictures } }: { unsent: UnsentOfShoot }) {
  const things = [
    ...(changes > 0 ? [count(changes, 'change')] : []),
    ...(pictures > 0 ? [count(pictures, 'picture')] : []),
  ].join(' and ')
  const isOne = changes + pictures === 1
  return (
    <p className="mt-1 text-xs text-ink-soft">
      {things} {isOne ? 'is' : 'are'} still on this device. Open the shoot to send {isOne ? 'it' : 'them'}.
    </p>
  )
}
