import { readFile } from 'node:fs/promises'
import { STUDIES } from './studies/studies.ts'

/** Names of the pictures on the demo's wall. */
export const DEMO_PICTURES: readonly string[] = STUDIES.map((study) => study.name)

/** One of them as somebody might have uploaded it: rendered from its study and kept beside this file. */
export async function demoPicture(name: string): Promise<Buffer> {
  return readFile(new URL(`./pictures/${name}.webp`, import.meta.url))
}
