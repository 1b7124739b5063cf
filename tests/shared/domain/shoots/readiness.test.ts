import { describe, expect, it } from 'vitest'
import { shotSchema, frameSchema } from '#shared/domain/board/schema.ts'
import { dayShotSchema } from '#shared/domain/day/schema.ts'
import { lightSchema, setupSchema } from '#shared/domain/lighting/schema.ts'
import { lookSchema } from '#shared/domain/looks/schema.ts'
import { DEFAULT_MINUTES } from '#shared/domain/plan/minutes.ts'
import { type ReadPlanInput, readPlan } from '#shared/domain/plan/read-plan.ts'
import { daySchema, shotPlanSchema } from '#shared/domain/plan/schema.ts'
import {
  type Readiness,
  type ReadinessInput,
  type Section,
  nextStep,
  readinessOf,
} from '#shared/domain/shoots/readiness.ts'
import { type Brief, briefSchema } from '#shared/domain/shoots/schema.ts'

const id = (n: number) => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`
const [DAY, SHOT, SECOND, LOOK, SETUP, SITTER, UPLOAD, FRAME] = [1, 2, 3, 4, 5, 6, 7, 8].map(id) as [
  string,
  string,
  string,
  string,
  string,
  string,
  string,
  string,
]

const assumed = (value: number) => ({ value, from: 'assumed' as const })
const unit = {
  kitId: id(20),
  version: 1,
  name: 'Small flash',
  numbers: {
    guideNumberM: assumed(58),
    flashColourK: assumed(5600),
    fullPops: assumed(150),
    fullRecycleS: assumed(3.5),
    massKg: assumed(0.5),
  },
}
const aMain = lightSchema.parse({
  id: id(9),
  setupId: SETUP,
  purpose: 'main',
  unit,
  power: 0.25,
  at: [-1, 2, 1],
  aim: [0, 1.5, 0],
})
const aSetup = setupSchema.parse({
  id: SETUP,
  name: 'Window side',
  camera: { at: [0, 1.5, 3], focalMm: 85, fNumber: 5.6, iso: 100, shutterS: 0.005, whiteBalanceK: 5600 },
  background: { zM: -3, widthM: 4, heightM: 3, colour: '#808080' },
})
const aLook = lookSchema.parse({ id: LOOK, sitterId: SITTER, name: 'Night coat' })
const aDay = daySchema.parse({ id: DAY, hardOutMin: 990 })
const aShot = shotSchema.parse({ id: SHOT, title: 'At the eyepiece', place: [DAY, 'a0'], lookIds: [LOOK] })
const aFrame = frameSchema.parse({
  id: FRAME,
  box: [0, 0, 100, 100],
  picture: { uploadId: UPLOAD, state: 'stored', widthPx: 10, heightPx: 10 },
  lookId: LOOK,
})

const fullBrief = briefSchema.parse({
  title: 'Leaf, Brass & Star',
  client: 'Hollin & Vane',
  date: '2027-10-14',
  zone: 'Europe/London',
  signOffByMs: Date.parse('2027-10-08T17:00Z'),
  location: { name: 'Tarn Fell Observatory' },
  rooms: [],
  deliverables: [{ id: id(30), title: 'Portraits', count: 3 }],
})
const emptyBrief = briefSchema.parse({
  title: 'Thaw',
  zone: 'Europe/London',
  location: {},
  rooms: [],
  deliverables: [],
})

const byId = <Item extends { id: string }>(...items: Item[]) => new Map(items.map((item) => [String(item.id), item]))

type Parts = Partial<Omit<ReadinessInput, 'plan'>> & {
  brief?: Brief
  board?: Partial<ReadPlanInput['board']>
  plan?: Partial<ReadPlanInput['plan']>
  looks?: Partial<ReadPlanInput['looks']>
  lighting?: Partial<ReadPlanInput['lighting']>
}

/** A shoot in which everything is ready, except what the parts say. */
function shoot(parts: Parts = {}): Readiness[] {
  const none = new Map()
  const frames = parts.frames ?? byId(aFrame)
  return readinessOf({
    plan: readPlan({
      brief: parts.brief ?? fullBrief,
      minutes: DEFAULT_MINUTES,
      board: { frames, shots: byId(aShot), ...parts.board },
      plan: {
        days: byId(aDay),
        sets: none,
        moves: none,
        shotPlans: byId(shotPlanSchema.parse({ id: SHOT, setupId: SETUP, frames: 40 })),
        rules: none,
        ...parts.plan,
      },
      looks: { sitters: none, looks: byId(aLook), pieces: none, ...parts.looks },
      lighting: { setups: byId(aSetup), lights: byId(aMain), sitterPlaces: none, props: none, ...parts.lighting },
    }),
    frames,
    signOffs: parts.signOffs ?? new Map([[LOOK, 'signed off' as const]]),
    dayShots: parts.dayShots ?? byId(got(SHOT)),
    redCautions: parts.redCautions ?? (() => []),
    schedule: parts.schedule ?? (() => ({ broken: [], wrapMin: 925 })),
  })
}

function got(shotId: string) {
  return dayShotSchema.parse({ id: shotId, event: { state: 'got', atMs: 0, by: 'u', name: 'Ines' } })
}

function of(section: Section, parts?: Parts): string {
  const { lamp, why } = shoot(parts).find((readiness) => readiness.section === section) ?? { lamp: '', why: '' }
  return `${lamp}: ${why}`
}

const nothing: Parts = {
  brief: emptyBrief,
  frames: new Map(),
  board: { shots: new Map() },
  plan: { shotPlans: new Map() },
  looks: { looks: new Map() },
  lighting: { setups: new Map(), lights: new Map() },
  signOffs: new Map(),
  dayShots: new Map(),
}

// What makes each lamp lit: the product's own rules, section by section.
describe('readinessOf', () => {
  it('lights every lamp of a shoot that is ready, in working order', () => {
    expect(shoot().map(({ section, lamp }) => `${section} ${lamp}`)).toEqual([
      'brief lit',
      'board lit',
      'looks lit',
      'lighting lit',
      'order lit',
      'day lit',
    ])
  })

  it('lights none of a shoot with nothing in it, and says what to begin with', () => {
    expect(shoot(nothing)).toEqual([
      { section: 'brief', lamp: 'unlit', why: 'Say who the client is' },
      { section: 'board', lamp: 'unlit', why: 'Hang the first pictures on the board' },
      { section: 'looks', lamp: 'unlit', why: 'Hang the first look' },
      { section: 'lighting', lamp: 'unlit', why: 'Light the first setup' },
      { section: 'order', lamp: 'unlit', why: 'Write down the first shot' },
      { section: 'day', lamp: 'unlit', why: 'The day has not begun' },
    ])
  })

  it.each([
    [{ ...fullBrief, client: ' ' }, 'Say who the client is'],
    [{ ...fullBrief, date: null }, 'Set a date with the client'],
    [{ ...fullBrief, location: emptyBrief.location }, 'Say where it happens'],
    [{ ...fullBrief, deliverables: [] }, 'Write down what is promised'],
  ])('half lights a brief that lacks one of its four', (brief, why) => {
    expect(of('brief', { brief })).toBe(`half: ${why}`)
  })

  it('half lights a board without a picture for a look', () => {
    expect(of('board', { frames: byId({ ...aFrame, lookId: null }) })).toBe(
      'half: No picture on the board for “Night coat”',
    )
  })

  it.each([
    ['waiting', 'One look waits for the client, by Friday 8 Oct, 18:00'],
    ['changed since', '“Night coat” changed since it was signed off'],
    ['change asked', 'The client asks for a change to “Night coat”'],
  ] as const)('half lights looks of which one is %s', (state, why) => {
    expect(of('looks', { signOffs: new Map([[LOOK, state]]) })).toBe(`half: ${why}`)
  })

  it('does not wait for a look that no shot uses', () => {
    const spare = lookSchema.parse({ id: id(40), sitterId: SITTER, name: 'Spare', rank: 'a1' })
    expect(of('looks', { looks: { looks: byId(aLook, spare) } })).toBe('lit: Every look in a shot is signed off')
  })

  it('half lights a setup without a main', () => {
    expect(of('lighting', { lighting: { lights: byId({ ...aMain, purpose: 'rim' as const }) } })).toBe(
      'half: “Window side” has no main',
    )
  })

  it('half lights a setup with a red caution, judged as its shots use it', () => {
    const asked: unknown[] = []
    const words = of('lighting', {
      redCautions: (setup, use) => {
        asked.push([setup.setup.name, use])
        return ['The main is in the frame']
      },
    })
    expect(words).toBe('half: “Window side”: The main is in the frame')
    expect(asked).toEqual([['Window side', { orientations: ['upright'], frames: 40 }]])
  })

  it('half lights a day with a shot that has no setup', () => {
    const second = shotSchema.parse({ id: SECOND, title: 'The toast', place: [DAY, 'a1'] })
    expect(of('lighting', { board: { shots: byId(aShot, second) } })).toBe('half: No setup yet for “The toast”')
  })

  it.each([
    [{ broken: ['Shot 1 must stay first'], wrapMin: 900 }, 'Shot 1 must stay first'],
    [{ broken: [], wrapMin: 1002.5 }, 'Wrap at 16:43 is after the hard out at 16:30'],
  ])('half lights an order that breaks a rule or ends too late', (schedule, why) => {
    expect(of('order', { schedule: () => schedule })).toBe(`half: ${why}`)
  })

  it('half lights an order that leaves a must-have shot out', () => {
    const loose = shotSchema.parse({ id: SECOND, title: 'The toast', place: ['loose', 'a0'] })
    expect(of('order', { board: { shots: byId(aShot, loose) } })).toBe(
      'half: “The toast” must be made and is in no day',
    )
    expect(of('order', { board: { shots: byId(aShot, { ...loose, need: 'could' as const }) } })).toMatch(/^lit/)
  })

  it('counts the must-have shots that are got', () => {
    const second = shotSchema.parse({ id: SECOND, title: 'The toast', place: [DAY, 'a1'] })
    expect(of('day', { board: { shots: byId(aShot, second) } })).toBe('half: 1 of 2 must-have shots got')
    expect(of('day', { board: { shots: byId(aShot, { ...second, need: 'should' as const }) } })).toBe(
      'lit: Every must-have shot is got',
    )
  })
})

describe('nextStep', () => {
  it('is the first section that is not ready, and null when all are', () => {
    expect(nextStep(shoot({ signOffs: new Map(), dayShots: new Map() }))?.section).toBe('looks')
    expect(nextStep(shoot())).toBeNull()
  })
})
