import * as Y from 'yjs'
import type { Need } from '#shared/domain/board/schema.ts'
import { moveId } from '#shared/domain/plan/read-plan.ts'
import type { ShotPlan } from '#shared/domain/plan/schema.ts'
import { putItems, upsertItem } from '#shared/realtime/collection.ts'
import { days, moves, rules, sets, shotPlans } from '#shared/realtime/documents.ts'
import type { NamedIds } from './named-ids.ts'

export type DemoShot = {
  name: string
  title: string
  note: string
  need: Need
  set: string
  setup: string
  looks: readonly string[]
  minutes: number
  frames: number
  lens: string
  orientation: ShotPlan['orientation']
  cover: string
}

/** The twelve shots in the order in which they were thought of, which is not the shortest. */
export const DEMO_SHOTS: readonly DemoShot[] = [
  {
    name: 'shot-seated',
    title: 'The Clockmaker, seated',
    note: 'Hands still, eyes to the window.',
    need: 'must',
    set: 'set-gallery',
    setup: 'setup-octa',
    looks: ['look-work'],
    minutes: 25,
    frames: 60,
    lens: '85 mm',
    orientation: 'upright',
    cover: 'ochre-slate',
  },
  {
    name: 'shot-hands',
    title: 'Hands on the escapement',
    note: 'Brass sharp, face falls away.',
    need: 'should',
    set: 'set-gallery',
    setup: 'setup-close',
    looks: ['look-work'],
    minutes: 20,
    frames: 50,
    lens: '85 mm',
    orientation: 'across',
    cover: 'ochre-head',
  },
  {
    name: 'shot-open',
    title: 'The Clockmaker, coat open',
    note: 'The day is over; one cup.',
    need: 'must',
    set: 'set-gallery',
    setup: 'setup-octa',
    looks: ['look-open'],
    minutes: 25,
    frames: 60,
    lens: '85 mm',
    orientation: 'upright',
    cover: 'undyed-brass',
  },
  {
    name: 'shot-cases',
    title: 'The Botanist among the cases',
    note: 'One line from neck to floor.',
    need: 'must',
    set: 'set-dome',
    setup: 'setup-window',
    looks: ['look-line'],
    minutes: 30,
    frames: 70,
    lens: '85 mm',
    orientation: 'upright',
    cover: 'long-line',
  },
  {
    name: 'shot-two',
    title: 'Astronomer and Clockmaker',
    note: 'Heads close over the loupe.',
    need: 'must',
    set: 'set-gallery',
    setup: 'setup-octa',
    looks: ['look-night', 'look-open'],
    minutes: 30,
    frames: 70,
    lens: '85 mm',
    orientation: 'across',
    cover: 'two-heads',
  },
  {
    name: 'shot-bench',
    title: 'Tea at the bench',
    note: 'Steam against the dark edge.',
    need: 'should',
    set: 'set-gallery',
    setup: 'setup-close',
    looks: ['look-open'],
    minutes: 20,
    frames: 40,
    lens: '85 mm',
    orientation: 'square',
    cover: 'brass-edge',
  },
  {
    name: 'shot-leaf',
    title: 'Leaf and loupe',
    note: 'The packet picture: leaf in the palm.',
    need: 'must',
    set: 'set-gallery',
    setup: 'setup-close',
    looks: ['look-line'],
    minutes: 20,
    frames: 50,
    lens: '85 mm',
    orientation: 'square',
    cover: 'green-bust',
  },
  {
    name: 'shot-eyepiece',
    title: 'The Astronomer at the eyepiece',
    note: 'Blue behind, brass before.',
    need: 'must',
    set: 'set-dome',
    setup: 'setup-window',
    looks: ['look-night'],
    minutes: 30,
    frames: 70,
    lens: '85 mm',
    orientation: 'upright',
    cover: 'eyepiece',
  },
  {
    name: 'shot-letters',
    title: 'Letters by the lamp',
    note: 'Only if the morning was kind.',
    need: 'could',
    set: 'set-dome',
    setup: 'setup-window',
    looks: ['look-sleeves'],
    minutes: 20,
    frames: 40,
    lens: '85 mm',
    orientation: 'upright',
    cover: 'undyed',
  },
  {
    name: 'shot-field',
    title: 'The Botanist, in from the hill',
    note: 'Caddy under the arm.',
    need: 'must',
    set: 'set-dome',
    setup: 'setup-broad',
    looks: ['look-field'],
    minutes: 25,
    frames: 60,
    lens: '50 mm',
    orientation: 'upright',
    cover: 'warm-cool',
  },
  {
    name: 'shot-star',
    title: 'First star through the slit',
    note: 'Slit open, dusk outside. Watch the edge of the platform.',
    need: 'must',
    set: 'set-dome',
    setup: 'setup-window',
    looks: ['look-cape'],
    minutes: 25,
    frames: 60,
    lens: '85 mm',
    orientation: 'upright',
    cover: 'cold-light',
  },
  {
    name: 'shot-toast',
    title: 'All three, the toast',
    note: 'Cups up, and hold.',
    need: 'must',
    set: 'set-dome',
    setup: 'setup-broad',
    looks: ['look-cape', 'look-sunday', 'look-field'],
    minutes: 30,
    frames: 90,
    lens: '50 mm',
    orientation: 'across',
    cover: 'dusk-distance',
  },
]

/** One day, two sets, the way between the rooms, what each shot needs, and three rules. */
export function demoPlan(id: NamedIds, room: (name: string) => string, date: string, random: () => number): Uint8Array {
  const doc = new Y.Doc()
  putItems(
    doc,
    days,
    [
      {
        id: id('day'),
        date,
        lightsOnMin: 510,
        hardOutMin: 1140,
        meal: { minutes: 45, latestAfterMin: 300 },
        hands: 2,
        chairs: 1,
      },
    ],
    random,
  )
  putItems(
    doc,
    sets,
    [
      {
        id: id('set-gallery'),
        name: 'Clock wall',
        roomId: room('Long gallery'),
        background: 'Ochre lime plaster with the clock faces taken down',
        colour: '#8a6f56',
        dressMin: 6,
        strikeMin: 4,
        note: 'Bench, stool, tray of escapements.',
      },
      {
        id: id('set-dome'),
        name: 'Under the dome',
        roomId: room('Dome'),
        background: 'Grey distemper, the brass armillary before it',
        colour: '#6b7076',
        dressMin: 8,
        strikeMin: 5,
        note: 'Specimen cases along the drum; keep the pier clear.',
      },
    ],
    random,
  )
  putItems(doc, moves, [{ id: moveId(room('Long gallery'), room('Dome')), minutes: 12 }], random)
  for (const shot of DEMO_SHOTS) {
    upsertItem(doc, shotPlans, {
      id: id(shot.name),
      setId: id(shot.set),
      setupId: id(shot.setup),
      minutes: shot.minutes,
      frames: shot.frames,
      lens: shot.lens,
      orientation: shot.orientation,
    })
  }
  putItems(
    doc,
    rules,
    [
      { id: id('rule-toast'), rule: { kind: 'pin-place', shotId: id('shot-toast'), index: -1 } },
      { id: id('rule-open'), rule: { kind: 'after', shotId: id('shot-open'), afterShotId: id('shot-seated') } },
      { id: id('rule-star'), rule: { kind: 'window', shotId: id('shot-star'), fromMin: 960, toMin: 1095 } },
    ],
    random,
  )
  return Y.encodeStateAsUpdate(doc)
}
