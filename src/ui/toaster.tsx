import { X } from 'lucide-react'
import { useEffect, useState, useSyncExternalStore } from 'react'
import { cn } from '#src/lib/cn.ts'
import { type ToastMessage, toast, toastStore } from './toast.ts'

const SHOWN_MS = 6000

/** Shows what `toast` is told; an error stays until it is put away, a hand or the focus on it stops the clock. */
export function Toaster() {
  const messages = useSyncExternalStore(toastStore.subscribe, toastStore.read)
  return (
    <div
      role="region"
      aria-label="Messages"
      className="no-print pointer-events-none fixed right-4 bottom-4 z-60 flex w-[min(24rem,calc(100vw-2rem))] flex-col gap-2 max-md:bottom-24"
    >
      {messages.map((message) => (
        <Toast key={message.id} message={message} />
      ))}
    </div>
  )
}

function Toast({ message }: { message: ToastMessage }) {
  const [held, setHeld] = useState(false)
  const stays = held || message.kind === 'error'
  useEffect(() => {
    if (stays) return
    const timer = setTimeout(() => toast.dismiss(message.id), SHOWN_MS)
    return () => clearTimeout(timer)
  }, [message.id, stays])
  return (
    <div
      role={message.kind === 'error' ? 'alert' : 'status'}
      onMouseEnter={() => setHeld(true)}
      onMouseLeave={() => setHeld(false)}
      onFocus={() => setHeld(true)}
      onBlur={() => setHeld(false)}
      className={cn(
        'on-night rise-in pointer-events-auto flex items-center gap-3 rounded-r border-l-3 bg-night py-2 pr-1 pl-3.5 text-sm text-bone shadow-over',
        message.kind === 'error' ? 'border-[#d98a97]' : 'border-glow-lit',
      )}
    >
      <span className="min-w-0 flex-1 py-1">{message.text}</span>
      {message.action && (
        <button
          type="button"
          className="rounded-r px-2.5 py-1.5 font-semibold text-glow-lit hover:bg-night-3 max-md:min-h-11"
          onClick={() => {
            message.action?.onPress()
            toast.dismiss(message.id)
          }}
        >
          {message.action.label}
        </button>
      )}
      <button
        type="button"
        aria-label="Put this message away"
        className="grid size-9 flex-none place-items-center rounded-r text-bone-soft hover:bg-night-3 hover:text-bone max-md:size-11"
        onClick={() => toast.dismiss(message.id)}
      >
        <X size={16} aria-hidden />
      </button>
    </div>
  )
}
