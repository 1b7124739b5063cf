import { parentPort } from 'node:worker_threads'
import { type RecipeSheetContent, renderRecipeSheet } from './recipe-sheet.tsx'

export type SheetAnswer = { pdf: Uint8Array } | { failed: string }

function answer(message: SheetAnswer): void {
  parentPort?.postMessage(message)
}

parentPort?.on('message', (content: RecipeSheetContent) => {
  renderRecipeSheet(content).then(
    (pdf) => answer({ pdf }),
    (error: unknown) => answer({ failed: error instanceof Error ? (error.stack ?? error.message) : String(error) }),
  )
})
