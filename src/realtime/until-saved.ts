import type { SaveState } from './save-state.ts'
import type { Store } from './store.ts'

/** How long a save may take until whoever waits for it is told no. */
const PATIENCE_MS = 15_000

/** Whether the server has all of one's own edits in these documents; waits while they are on their way. */
export async function untilSaved(
  documents: readonly { save: Pick<Store<SaveState>, 'get' | 'subscribe'> }[],
): Promise<boolean> {
  const saved = await Promise.all(documents.map(({ save }) => settled(save)))
  return saved.every(Boolean)
}

function settled({ get, subscribe }: Pick<Store<SaveState>, 'get' | 'subscribe'>): Promise<boolean> {
  return new Promise((resolve) => {
    const end = (isSaved: boolean) => {
      stop()
      clearTimeout(timer)
      resolve(isSaved)
    }
    const look = () => {
      const { kind } = get()
      if (kind !== 'saving') end(kind === 'saved')
    }
    const stop = subscribe(look)
    const timer = setTimeout(() => end(false), PATIENCE_MS)
    look()
  })
}
