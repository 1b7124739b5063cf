// @ts-check
import { Session } from 'node:inspector/promises'
import { setTimeout } from 'node:timers/promises'

// Loaded into every server that is measured (`--import`), so that all are asked the same way, over IPC:
// what they hold after a collection of garbage (`--expose-gc`), and where their time goes.

const session = new Session()

/** @type {Record<string, () => unknown>} */
const answers = {
  memory: async () => {
    // Buffers are given back beside the collection, and only counted as gone by the next one.
    for (let i = 0; i < 3; i++) {
      globalThis.gc?.()
      await setTimeout(50)
    }
    return process.memoryUsage()
  },
  'profile start': async () => {
    session.connect()
    await session.post('Profiler.enable')
    await session.post('Profiler.setSamplingInterval', { interval: 500 })
    await session.post('Profiler.start')
  },
  'profile stop': async () => {
    const { profile } = await session.post('Profiler.stop')
    session.disconnect()
    return profile
  },
}

process.on('message', (/** @type {string} */ question) => {
  void Promise.resolve(answers[question]?.()).then((answer) => process.send?.({ question, answer }))
})
// The channel is no reason to stay.
process.channel?.unref()
// Whoever measures is gone: nobody else would end this.
process.on('disconnect', () => process.exit())
