import { checkNode } from './start/packages.mjs'
import { Plain, say, stopWithNpm } from './start/say.mjs'

// Everything from a fresh clone to a running Sconce. This file and ./start import nothing but Node's own
// modules until the packages are in place.

/** @type {(() => Promise<void>)[]} what has to be stopped, in the order it was started */
const toStop = []
let isStopping = false
let stopAskedAtMs = 0

/** @param {number} exitCode */
async function stopEverything(exitCode) {
  if (isStopping) return
  isStopping = true
  for (const stop of toStop.reverse()) {
    try {
      await stop()
    } catch (error) {
      say(error instanceof Error ? error.message : String(error))
      exitCode = 1
    }
  }
  process.exit(exitCode)
}

/** @param {unknown} error */
function fail(error) {
  if (isStopping) return
  process.stderr.write(
    `\n${error instanceof Plain ? error.message : error instanceof Error ? error.stack : String(error)}\n`,
  )
  void stopEverything(1)
}

// npm passes on the signal that the terminal has already sent to us, so a second one at once is not a wish.
for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM', 'SIGHUP'])) {
  process.on(signal, () => {
    if (!isStopping) {
      stopAskedAtMs = performance.now()
      void stopEverything(0)
    } else if (performance.now() - stopAskedAtMs > 2000) {
      stopAskedAtMs = performance.now()
      say('Still finishing what is under way, so that nothing is lost.')
    }
  })
}

stopWithNpm(() => void stopEverything(0))

/** @type {{ toStop: (stop: () => Promise<void>) => void, fail: (error: unknown) => void }} */
const life = { toStop: (stop) => void toStop.push(stop), fail }

try {
  checkNode()
  const [option, file] = process.argv.slice(2)
  if (option === '--backup' || option === '--restore') {
    const { backup } = await import('./start/backup.mjs')
    const { restore } = await import('./start/restore.mjs')
    await (option === '--backup' ? backup(file, life) : restore(file, life))
    await stopEverything(0)
  } else if (option === undefined || option === '--dev') {
    const { start } = await import('./start/up.mjs')
    await start({ isDev: option === '--dev', ...life })
  } else {
    throw new Plain(`There is no option ${option}. Known are --dev, --backup FILE and --restore FILE.`)
  }
} catch (error) {
  fail(error)
}
