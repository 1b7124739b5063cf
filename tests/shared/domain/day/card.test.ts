import { describe, expect, it } from 'vitest'
import { cardRows, nextWords } from '#shared/domain/day/card.ts'
import type { Changeover } from '#shared/domain/order/schedule-types.ts'
import { lookIdSchema, setIdSchema, sitterIdSchema } from '#shared/ids.ts'

const id = '00000000-0000-4000-8000-000000000001'
const nothing: Changeover = {
  fromShotId: null,
  minutes: 0,
  lighting: [],
  lightingMin: 0,
  changesLight: false,
  setMove: null,
  wardrobe: [],
  wardrobeWaitMin: 0,
  holdWaitMin: 0,
}
const full: Changeover = {
  ...nothing,
  minutes: 26,
  lightingMin: 8,
  changesLight: true,
  lighting: [
    { key: 'a:move', kind: 'move', group: 'A', what: 'Main to camera left, 1.6 m', detail: '0.4 m closer', minutes: 2 },
    { key: 'p:strike', kind: 'panel', group: null, what: 'White panel: strike', detail: '', minutes: 2 },
  ],
  setMove: {
    fromSetId: setIdSchema.parse(id),
    fromSetName: 'Clock wall',
    toSetId: setIdSchema.parse(id),
    toSetName: 'Under the dome',
    fromRoomName: 'Long gallery',
    toRoomName: 'Dome',
    otherRoom: true,
    moveMin: 12,
    strikeMin: 4,
    dressMin: 8,
  },
  wardrobe: [
    {
      sitterId: sitterIdSchema.parse(id),
      sitterName: 'The Astronomer',
      lookId: lookIdSchema.parse(id),
      lookName: 'Night coat',
      chairMin: 20,
      changeMin: 9,
      first: true,
      onClockMin: 0,
    },
  ],
}

describe('cardRows', () => {
  it('is empty when nothing changes', () => {
    expect(cardRows(nothing, undefined)).toEqual([])
  })

  it('has the set first, then lights by letter, then wardrobe', () => {
    expect(cardRows(full, undefined).map(({ key, sign, what }) => [key, sign.kind, what])).toEqual([
      [`set:${id}`, 'set', 'Move to Dome'],
      ['a:move', 'group', 'Main to camera left, 1.6 m'],
      ['p:strike', 'plain', 'White panel: strike'],
      [`look:${id}`, 'wardrobe', 'Night coat'],
    ])
    expect(cardRows(full, undefined)[0]?.detail).toBe('strike Clock wall, 4 min · dress Under the dome, 8 min')
    expect(cardRows(full, undefined)[3]?.detail).toBe('The Astronomer · 20 min in the chair')
  })
})

describe('nextWords', () => {
  it('says that lights stay, or how much light there is to do, and who sits down', () => {
    expect(nextWords(nothing)).toBe('Lights stay')
    expect(nextWords(full)).toBe('Move to Dome · 8 min of light · The Astronomer in the chair now')
  })
})
