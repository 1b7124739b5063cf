// Node starts a thread only from a file it can read itself: this one teaches the new thread TypeScript first.
import { register } from 'tsx/esm/api'

register()
await import('./sheet-worker.ts')
