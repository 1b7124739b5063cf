import { existsSync, readFileSync, readdirSync } from 'node:fs'
import { dirname, join, posix } from 'node:path'
import { fileURLToPath } from 'node:url'

export const rootDir = dirname(dirname(dirname(fileURLToPath(import.meta.url))))

/** Path from the root, with forward slashes -> text. A plain object of strings, so that a planted tree is one too. */
export type Tree = ReadonlyMap<string, string>

/** Every file below these folders whose name matches, with its text. */
export function readTree(folders: readonly string[], pattern: RegExp): Tree {
  const files = new Map<string, string>()
  const waiting = folders.filter((folder) => existsSync(join(rootDir, folder)))
  for (let folder = waiting.pop(); folder !== undefined; folder = waiting.pop()) {
    for (const entry of readdirSync(join(rootDir, folder), { withFileTypes: true })) {
      const path = posix.join(folder, entry.name)
      if (entry.isDirectory()) {
        if (entry.name !== 'node_modules') waiting.push(path)
      } else if (pattern.test(entry.name)) files.set(path, readFileSync(join(rootDir, path), 'utf8'))
    }
  }
  return files
}
