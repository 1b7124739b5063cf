import { describe, expect, it } from 'vitest'
import { isFasterThanSync, syncOf } from '#shared/domain/lighting/sync.ts'
import { lampUnit } from '#tests/support/lamp-sample.ts'
import { light, unit, whole } from '#tests/support/lighting-sample.ts'

const flash = (more: object = {}) => light(1, { purpose: 'main', at: [-1, 2, 1], aim: [0, 1.5, 0], ...more })

describe('isFasterThanSync', () => {
  it('is 1/400 s with a sync speed of 1/200 s, and not 1/200 s itself or its exact neighbour', () => {
    // openphotographicsociety.org on x-sync; scantips.com: part of the frame is dark.
    expect(isFasterThanSync(0.0025, 0.005)).toBe(true)
    expect(isFasterThanSync(0.005, 0.005)).toBe(false)
    // 1/256 s is what is printed as 1/250.
    expect(isFasterThanSync(1 / 256, 1 / 250)).toBe(false)
  })
})

describe('syncOf', () => {
  it('takes 1/200 s where the camera’s own is not known, and says so', () => {
    const sync = syncOf(whole({ lights: [flash()], camera: { shutterS: 1 / 250 } }))
    expect(sync).toMatchObject({ isTooFast: true, isAssumed: true, limitS: 0.005 })
  })
  it('takes the camera’s own, and what the units say, each once', () => {
    const withWords = unit(undefined, { sync: 'High-speed sync from 1/250 at a loss' })
    const lights = [
      flash({ unit: withWords }),
      light(2, { purpose: 'fill', at: [1, 2, 1], aim: [0, 1.5, 0], unit: withWords }),
    ]
    const sync = syncOf(whole({ lights, camera: { shutterS: 1 / 250, syncS: 1 / 250 } }))
    expect(sync).toMatchObject({ isTooFast: false, isAssumed: false })
    expect(sync?.units).toEqual(['Small flash: High-speed sync from 1/250 at a loss'])
  })
  it('asks nothing of lamps and of flashes that are off', () => {
    expect(syncOf(whole({ lights: [flash({ unit: lampUnit(3000) })] }))).toBeNull()
    expect(syncOf(whole({ lights: [flash({ isOn: false })] }))).toBeNull()
  })
})
