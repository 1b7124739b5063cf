import { AlertDialog } from 'radix-ui'
import type { ReactNode } from 'react'
import { Button } from './button.tsx'
import { useReturnFocus } from './use-return-focus.ts'

export type ConfirmProps = {
  open: boolean
  onOpenChange: (open: boolean) => void
  title: ReactNode
  /** What will happen and what is kept. */
  children: ReactNode
  /** The verb on the button: "Remove", "Leave". */
  action: string
  onConfirm: () => void
  keep?: string
  busy?: boolean
}

/** Asks before something that is hard to take back. The safe answer has the focus. */
export function Confirm({
  open,
  onOpenChange,
  title,
  children,
  action,
  onConfirm,
  keep = 'Keep it',
  busy = false,
}: ConfirmProps) {
  const focus = useReturnFocus()
  return (
    <AlertDialog.Root open={open} onOpenChange={onOpenChange}>
      <AlertDialog.Portal>
        <AlertDialog.Overlay className="fade-in fixed inset-0 z-50 bg-night/55" />
        <AlertDialog.Content
          {...focus}
          className="rise-in fixed inset-x-4 bottom-4 z-50 mx-auto max-w-md rounded-r bg-paper p-6 text-ink shadow-over outline-none md:inset-0 md:m-auto md:h-fit"
        >
          <AlertDialog.Title className="text-xl">{title}</AlertDialog.Title>
          <AlertDialog.Description asChild>
            <div className="mt-2 text-base text-ink-soft">{children}</div>
          </AlertDialog.Description>
          <div className="mt-5 flex flex-wrap justify-end gap-2">
            <AlertDialog.Cancel asChild>
              <Button variant="plain">{keep}</Button>
            </AlertDialog.Cancel>
            <Button variant="danger" busy={busy} onClick={onConfirm}>
              {action}
            </Button>
          </div>
        </AlertDialog.Content>
      </AlertDialog.Portal>
    </AlertDialog.Root>
  )
}
