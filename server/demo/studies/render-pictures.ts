import { mkdir, writeFile } from 'node:fs/promises'
import { studyFile } from './render-study.ts'
import { STUDIES } from './studies.ts'

/**
 * Renders the pictures of the demo's wall into server/demo/pictures, where they are committed:
 * `npm run demo:pictures` makes all of them (about half an hour), `npm run demo:pictures -- globe hem` these.
 */
const wanted = process.argv.slice(2)
const folder = new URL('../pictures/', import.meta.url)
await mkdir(folder, { recursive: true })
for (const study of STUDIES) {
  if (wanted.length > 0 && !wanted.includes(study.name)) continue
  const file = await studyFile(study, 'fine')
  await writeFile(new URL(`${study.name}.webp`, folder), file)
  process.stdout.write(`${study.name} ${study.size.join(' × ')}, ${Math.round(file.length / 1024)} kB\n`)
}
