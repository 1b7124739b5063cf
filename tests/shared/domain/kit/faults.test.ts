import { describe, expect, it } from 'vitest'
import { faultsOf } from '#shared/domain/kit/faults.ts'
import { type KitBody, kitBodySchema } from '#shared/domain/kit/schema.ts'
import { STARTER_KIT } from '#shared/domain/kit/starter.ts'

const stated = (value: number) => ({ value, from: 'assumed', source: '' })

/** The first starter item of a kind with some numbers changed. */
function bodyWith(kind: KitBody['kind'], numbers: Record<string, unknown>): KitBody {
  const item = STARTER_KIT.find((candidate) => candidate.body.kind === kind)
  return kitBodySchema.parse({ kind, numbers: { ...item?.body.numbers, ...numbers } })
}

describe('faultsOf', () => {
  it('has nothing against the starter kit', () => {
    for (const { body, name } of STARTER_KIT) expect(faultsOf(body), name).toEqual([])
  })

  it.each<[KitBody['kind'], string, Record<string, unknown>, string]>([
    ['unit', 'guideNumberM.value', { guideNumberM: stated(0) }, 'put in the maker’s figure or measure it'],
    ['unit', 'guideNumberM.value', { guideNumberM: stated(-40) }, 'put in the maker’s figure or measure it'],
    ['unit', 'guideNumberM.value', { guideNumberM: stated(5800) }, 'check the unit'],
    ['unit', 'fullPops.value', { fullPops: stated(0) }, 'cannot be less than 1'],
    ['unit', 'fullRecycleS.value', { fullRecycleS: stated(0) }, 'more than 0 s'],
    ['unit', 'massKg.value', { massKg: stated(-1) }, 'more than 0 kg'],
    ['unit', 'flashColourK.value', { flashColourK: stated(0) }, 'cannot be less than 1000 K'],
    ['unit', 'mainsWatts.value', { mainsWatts: stated(0) }, 'more than 0 W'],
    [
      'unit',
      'zoom.1.focalMm',
      {
        zoom: [
          { focalMm: 50, guideNumberM: 30 },
          { focalMm: 50, guideNumberM: 31 },
        ],
      },
      '50 mm is there twice',
    ],
    [
      'unit',
      'metered.0.guideNumberM',
      { metered: [{ modifierKitId: null, guideNumberM: 1e300 }] },
      'more than 500 m is not taken',
    ],
    ['lamp', 'luxAtMetre.value', { luxAtMetre: stated(0) }, 'measure it'],
    ['lamp', 'watts.value', { watts: stated(-60) }, 'more than 0 W'],
    ['lamp', 'beamDeg.value', { beamDeg: stated(400) }, 'more than 360 degrees'],
    ['modifier', 'widthM', { widthM: 0, heightM: 0.6 }, 'a width and a height'],
    ['modifier', 'heightM', { widthM: 0.6, heightM: 0 }, 'a width and a height'],
    ['gel', 'transmission.value', { transmission: stated(0) }, 'is a flag'],
    ['gel', 'transmission.value', { transmission: stated(47) }, 'more than 1'],
    ['gel', 'colour', { colour: 'red' }, 'six hexadecimal digits'],
    ['support', 'minHeightM.value', { minHeightM: stated(3), maxHeightM: stated(2.4) }, 'swap them'],
    ['support', 'maxLoadKg.value', { maxLoadKg: stated(0) }, 'more than 0 kg'],
    ['support', 'counterReachM.value', { counterReachM: stated(-0.5) }, 'more than 0 m'],
    ['panel', 'massKg.value', { massKg: stated(-1) }, 'less than 0 kg'],
  ])('refuses a %s by its %s', (kind, path, numbers, words) => {
    const faults = faultsOf(bodyWith(kind, numbers))
    expect(faults.map((fault) => fault.path.join('.'))).toEqual([path])
    expect(faults[0]?.message).toContain(words)
  })

  it('says everything that is wrong at once', () => {
    expect(faultsOf(bodyWith('unit', { guideNumberM: stated(0), massKg: stated(0) }))).toHaveLength(2)
  })
})
