import * as Y from 'yjs'
import type { Piece } from '#shared/domain/looks/schema.ts'
import { putItems } from '#shared/realtime/collection.ts'
import { looks, pieces, sitters } from '#shared/realtime/documents.ts'
import type { NamedIds } from './named-ids.ts'

type PieceRow = [
  name: string,
  label: string,
  kind: Piece['kind'],
  colour: string,
  status: Piece['status'],
  source: string,
  dueBackDays?: number,
]

const PIECES: readonly PieceRow[] = [
  ['night-coat', 'Night coat, boiled wool', 'garment', '#23304a', 'pulled', 'Studio store'],
  ['high-collar', 'High collar, felt', 'accessory', '#2c3a57', 'to make', 'Workroom'],
  ['gloves', 'Gloves', 'accessory', '#1d1b1a', 'pulled', 'Studio store'],
  ['loupe', 'Brass loupe on a cord', 'prop', '#8e6a22', 'pulled', 'Studio store'],
  ['shirt', 'Shirt, undyed linen', 'garment', '#d9d4c8', 'fitted', 'Workroom'],
  ['braces', 'Braces, oxblood', 'accessory', '#5b1e2c', 'pulled', 'Studio store'],
  ['star-chart', 'Star chart, rolled', 'prop', '#c9b68e', 'to make', 'Workroom'],
  ['cape', 'Travelling cape, slate', 'garment', '#56606b', 'hired', 'Theatre hire', 2],
  ['lantern', 'Hand lantern, unlit', 'prop', '#3a342c', 'pulled', 'Studio store'],
  ['work-coat', 'Work coat, ochre drill', 'garment', '#8e6a22', 'fitted', 'Workroom'],
  ['garters', 'Sleeve garters', 'accessory', '#2a1a12', 'pulled', 'Studio store'],
  ['linen-collar', 'Collar, linen', 'accessory', '#b7a98f', 'pulled', 'Studio store'],
  ['apron', 'Bench apron, waxed', 'garment', '#4a3b2a', 'to buy', 'Market'],
  ['escapement', 'Escapement in a tray', 'prop', '#a9812f', 'hired', 'Clock workshop', 5],
  ['waistcoat', 'Sunday waistcoat, moss', 'garment', '#4d5a3a', 'fitted', 'Workroom'],
  ['watch-chain', 'Watch chain', 'jewellery', '#b08a3c', 'pulled', 'Studio store'],
  ['gown', 'Gown, bottle green', 'garment', '#1f5a42', 'hired', 'Theatre hire', 2],
  ['satchel', 'Specimen satchel', 'prop', '#3a1f12', 'pulled', 'Studio store'],
  ['hair-comb', 'Comb, horn', 'hairpiece', '#7a5a34', 'pulled', 'Studio store'],
  ['field-jacket', 'Field jacket, lichen', 'garment', '#7d8468', 'to buy', 'Market'],
  ['boots', 'Walking boots', 'footwear', '#33261c', 'pulled', 'Own'],
  ['press', 'Flower press', 'prop', '#8c6f4d', 'to make', 'Workroom'],
  ['caddy', 'Tea caddy, the client’s', 'prop', '#6b2f2a', 'pulled', 'Client'],
  ['cups', 'Three cups, glazed', 'prop', '#b9b0a0', 'pulled', 'Client'],
]

/** Days after the shoot as a civil date. */
export type DaysAfter = (days: number) => string | null

/** The three characters, their eight looks and every piece. `pictures` gives upload ids by their names. */
export function demoLooks(
  id: NamedIds,
  picture: (name: string) => string,
  daysAfter: DaysAfter,
  random: () => number,
): Uint8Array {
  const doc = new Y.Doc()
  putItems(
    doc,
    sitters,
    [
      {
        id: id('astronomer'),
        name: 'Maud Ferrier',
        character: 'The Astronomer',
        hours: [570, 1140],
        chairMin: 20,
        travelMin: 40,
      },
      {
        id: id('clockmaker'),
        name: 'Idris Vane',
        character: 'The Clockmaker',
        hours: [480, 1140],
        chairMin: 15,
        travelMin: 55,
      },
      {
        id: id('botanist'),
        name: 'Lena Osei',
        character: 'The Botanist',
        hours: [600, 1140],
        chairMin: 20,
        travelMin: 40,
      },
    ],
    random,
  )
  putItems(
    doc,
    pieces,
    PIECES.map(([name, label, kind, colour, status, source, dueBack]) => ({
      id: id(name),
      name: label,
      kind,
      colour,
      status,
      source,
      dueBack: dueBack === undefined ? null : daysAfter(dueBack),
      note:
        name === 'high-collar'
          ? 'Softer edge, asked by the client.'
          : name === 'loupe'
            ? 'Two sitters need it in the shot together.'
            : '',
    })),
    random,
  )
  const look = (
    name: string,
    sitter: string,
    label: string,
    rank: string,
    changeMin: number,
    hair: string,
    makeUp: string,
    note: string,
    pieceNames: readonly string[],
    pictureNames: readonly string[],
  ) => ({
    id: id(name),
    sitterId: id(sitter),
    name: label,
    rank,
    changeMin,
    hair,
    makeUp,
    note,
    pieceIds: pieceNames.map(id),
    pictureIds: pictureNames.map(picture),
  })
  putItems(
    doc,
    looks,
    [
      look(
        'look-night',
        'astronomer',
        'Night coat',
        'a0',
        9,
        'Loose under a fur band',
        'Bare skin, a little cold at the nose',
        'Buttoned to the chin. The coat is seen before the face.',
        ['night-coat', 'high-collar', 'gloves', 'loupe'],
        ['collar-high', 'eyepiece'],
      ),
      look(
        'look-sleeves',
        'astronomer',
        'Shirtsleeves',
        'a1',
        8,
        'Band off, brushed back',
        'Bare skin, ink on the fingers',
        'After a night of counting.',
        ['shirt', 'braces', 'star-chart'],
        ['undyed'],
      ),
      look(
        'look-cape',
        'astronomer',
        'Travelling cape',
        'a2',
        6,
        'Loose under a fur band',
        'Bare skin, a little cold at the nose',
        'Just arrived, or just leaving.',
        ['cape', 'lantern', 'high-collar'],
        ['cold-light'],
      ),
      look(
        'look-work',
        'clockmaker',
        'Work coat',
        'a0',
        12,
        'Knotted high',
        'Matte, brows left alone',
        'The ochre is the warmest thing in the gallery.',
        ['work-coat', 'garters', 'linen-collar'],
        ['ochre-slate', 'ochre-head'],
      ),
      look(
        'look-open',
        'clockmaker',
        'Coat open',
        'a1',
        6,
        'Knotted high',
        'Matte, brows left alone',
        'Same coat, undone: the day is over.',
        ['shirt', 'work-coat', 'loupe'],
        ['undyed-brass'],
      ),
      look(
        'look-sunday',
        'clockmaker',
        'Sunday waistcoat',
        'a2',
        10,
        'Knotted low',
        'Matte, a little lip',
        'For the toast.',
        ['waistcoat', 'watch-chain', 'linen-collar', 'cups'],
        ['dusk-distance'],
      ),
      look(
        'look-line',
        'botanist',
        'Long line',
        'a0',
        15,
        'Cropped, parted by hand',
        'Fresh, green at the lash',
        'One clean line from neck to floor.',
        ['gown', 'satchel', 'hair-comb'],
        ['long-line', 'green-bust'],
      ),
      look(
        'look-field',
        'botanist',
        'Field jacket',
        'a1',
        10,
        'Cropped, wind in it',
        'Fresh, freckles kept',
        'Mud is welcome.',
        ['field-jacket', 'boots', 'press', 'caddy'],
        ['warm-cool'],
      ),
    ],
    random,
  )
  return Y.encodeStateAsUpdate(doc)
}
