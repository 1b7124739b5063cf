export type ToastAction = { label: string; onPress: () => void }
export type ToastMessage = { id: number; kind: 'said' | 'error'; text: string; action?: ToastAction }

let messages: readonly ToastMessage[] = []
let lastId = 0
const listeners = new Set<() => void>()

function set(next: readonly ToastMessage[]) {
  messages = next
  for (const listener of listeners) listener()
}

function add(kind: ToastMessage['kind'], text: string, action?: ToastAction): number {
  const id = ++lastId
  const others = messages.filter((message) => message.text !== text || message.kind !== kind)
  set([...others, { id, kind, text, ...(action ? { action } : {}) }].slice(-4))
  return id
}

/** Short messages at the edge of the screen, for what no place on the screen itself can say. */
export const toast = {
  say: (text: string, action?: ToastAction) => add('said', text, action),
  error: (text: string, action?: ToastAction) => add('error', text, action),
  dismiss: (id: number) => set(messages.filter((message) => message.id !== id)),
}

export const toastStore = {
  subscribe: (listener: () => void) => {
    listeners.add(listener)
    return () => {
      listeners.delete(listener)
    }
  },
  read: () => messages,
}
