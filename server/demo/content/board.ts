import * as Y from 'yjs'
import type { Box, Made } from '#shared/domain/board/schema.ts'
import { fitPrint } from '#shared/domain/board/print.ts'
import { keyBetween } from '#shared/realtime/order-keys.ts'
import { putItems } from '#shared/realtime/collection.ts'
import { areas, frames, notes, palettes, shots, tags } from '#shared/realtime/documents.ts'
import type { NamedIds } from './named-ids.ts'
import { DEMO_SHOTS } from './plan.ts'

/** What an upload told of itself. */
export type DemoUpload = { id: string; widthPx: number; heightPx: number; palette: string[] }

type FrameRow = [
  picture: string,
  x: number,
  y: number,
  width: number,
  caption: string,
  by: 'IM' | 'SO' | 'CW',
  look?: string | undefined,
  shot?: string,
]

const FRAMES: readonly FrameRow[] = [
  ['warm-cool', 24, 44, 216, 'One side warm, one cool', 'IM', 'look-field', 'shot-field'],
  ['undyed-brass', 262, 44, 172, 'Brass catches the edge', 'SO', 'look-open', 'shot-open'],
  ['one-light', 24, 362, 150, 'Main alone', 'IM'],
  ['cold-light', 190, 362, 150, 'Cold light, cold nose', 'IM', 'look-cape', 'shot-star'],
  ['with-fill', 356, 362, 150, 'And with a little fill', 'IM'],
  ['cool-shoulder', 24, 596, 196, 'Shoulder goes cool', 'SO'],
  ['two-heads', 238, 596, 268, 'Heads close, one light', 'CW', undefined, 'shot-two'],
  ['collar-high', 560, 44, 200, 'Collar high, cloth matte', 'CW', 'look-night'],
  ['eyepiece', 560, 360, 170, 'Blue behind, brass before', 'SO', 'look-night', 'shot-eyepiece'],
  ['ochre-slate', 560, 640, 178, 'Ochre against slate', 'CW', 'look-work', 'shot-seated'],
  ['ochre-head', 756, 640, 140, 'Knot high, jaw clear', 'SO', 'look-work', 'shot-hands'],
  ['undyed', 914, 640, 112, 'Undyed, creased', 'SO', 'look-sleeves', 'shot-letters'],
  ['long-line', 1080, 44, 172, 'Long line, no clutter', 'CW', 'look-line', 'shot-cases'],
  ['green-bust', 1270, 44, 190, 'Green against grey', 'SO', 'look-line', 'shot-leaf'],
  ['dusk-distance', 1080, 340, 260, 'Brass, dusk, distance', 'SO', 'look-sunday', 'shot-toast'],
  ['hem', 1358, 340, 200, 'The hem pools', 'SO', 'look-line'],
  ['room-tone', 1080, 590, 180, 'The room’s own tone', 'IM'],
  ['globe', 1278, 704, 140, 'Brass, softly dented', 'IM', undefined, 'shot-bench'],
  ['brass-edge', 1436, 704, 122, 'Edge light on metal', 'IM'],
  ['knit', 1358, 522, 200, 'Cloth with a hand in it', 'SO', 'look-work'],
]

/** Everything on the wall and the strip of shots below it. */
export function demoBoard(
  id: NamedIds,
  upload: (picture: string) => DemoUpload,
  made: (initials: 'IM' | 'SO' | 'CW') => Made,
  random: () => number,
): Uint8Array {
  const doc = new Y.Doc()
  putItems(
    doc,
    areas,
    [
      { id: id('area-light'), box: [24, 8, 500, 24], title: 'Light and air', made: made('IM') },
      { id: id('area-wear'), box: [560, 8, 470, 24], title: 'What they wear', made: made('SO') },
      { id: id('area-place'), box: [1080, 8, 480, 24], title: 'Cloth, brass and place', made: made('SO') },
    ],
    random,
  )
  putItems(
    doc,
    frames,
    FRAMES.map(([picture, x, y, width, caption, by, look, shot], index) => {
      const file = upload(picture)
      return {
        id: id(`frame-${picture}`),
        box: fitPrint([x, y, width, 100], file.widthPx, file.heightPx),
        z: index,
        picture: { uploadId: file.id, state: 'stored' as const, widthPx: file.widthPx, heightPx: file.heightPx },
        caption,
        credit: 'Studio test',
        rights: 'ours' as const,
        palette: file.palette,
        lookId: look === undefined ? null : id(look),
        shotId: shot === undefined ? null : id(shot),
        exposure: by === 'IM' ? 'f/5.6 · 1/160 · 85 mm · ISO 100' : '',
        made: made(by),
      }
    }),
    random,
  )
  const tag = (
    name: string,
    look: string,
    x: number,
    y: number,
    h: number,
  ): { id: string; box: Box; z: number; title: string; lookId: string; made: Made } => ({
    id: id(name),
    box: [x, y, 186, h],
    z: 30,
    title: '',
    lookId: id(look),
    made: made('SO'),
  })
  putItems(
    doc,
    tags,
    [
      tag('tag-night', 'look-night', 780, 52, 224),
      tag('tag-work', 'look-work', 780, 292, 196),
      tag('tag-line', 'look-line', 1478, 52, 178),
      {
        id: id('tag-free'),
        box: [780, 504, 186, 112],
        z: 30,
        title: 'Before the fitting',
        text: 'Steam the cape. Felt for the collar comes Friday.',
        made: made('SO'),
      },
    ],
    random,
  )
  putItems(
    doc,
    notes,
    [
      {
        id: id('note-comet'),
        box: [262, 288, 230, 64],
        z: 31,
        text: 'Everyone is waiting for the same comet.',
        made: made('IM'),
      },
      {
        id: id('note-tea'),
        box: [756, 852, 270, 60],
        z: 31,
        text: 'The tea is poured, never drunk.',
        made: made('CW'),
      },
      {
        id: id('note-quiet'),
        box: [1080, 842, 180, 84],
        z: 31,
        text: 'Quiet pictures. No one smiles before the toast.',
        made: made('IM'),
      },
    ],
    random,
  )
  putItems(
    doc,
    palettes,
    [
      {
        id: id('palette-all'),
        box: [986, 52, 60, 190],
        z: 32,
        title: 'From five frames',
        colours: ['#23304a', '#8e6a22', '#6e7c84', '#b7a98f', '#3a1f12'],
        made: made('SO'),
      },
    ],
    random,
  )
  let key: string | null = null
  putItems(
    doc,
    shots,
    DEMO_SHOTS.map((shot) => {
      key = keyBetween(key, null, random)
      return {
        id: id(shot.name),
        title: shot.title,
        note: shot.note,
        need: shot.need,
        place: [id('day'), key] as [string, string],
        coverFrameId: id(`frame-${shot.cover}`),
        lookIds: shot.looks.map(id),
      }
    }),
    random,
  )
  return Y.encodeStateAsUpdate(doc)
}
