import { describe, expect, it } from 'vitest'
import { type SaveFacts, gravest, saveStateOf, sinceWords } from '#src/realtime/save-state.ts'

const facts: SaveFacts = {
  link: 'up',
  settled: true,
  unsent: 0,
  sinceMs: null,
  kept: true,
  refused: null,
  outdated: false,
}

describe('saveStateOf', () => {
  it('says saved only when all was acknowledged once and nothing is unsent', () => {
    expect(saveStateOf(facts).kind).toBe('saved')
    expect(saveStateOf({ ...facts, settled: false }).kind).toBe('saving')
    expect(saveStateOf({ ...facts, unsent: 1 }).kind).toBe('saving')
    expect(saveStateOf({ ...facts, link: 'down' }).kind).toBe('offline')
  })

  it('has no word for a connection that was lost a moment ago, and calls nothing saved that is not', () => {
    expect(saveStateOf({ ...facts, link: 'brief' }).kind).toBe('saved')
    expect(saveStateOf({ ...facts, link: 'brief', unsent: 1 }).kind).toBe('saving')
    expect(saveStateOf({ ...facts, link: 'brief', settled: false }).kind).toBe('saving')
  })

  it('says not saved when the server refused or nothing keeps the edits', () => {
    expect(saveStateOf({ ...facts, unsent: 1, refused: 'read only' })).toEqual({ kind: 'not-saved', why: 'read only' })
    expect(saveStateOf({ ...facts, link: 'down', unsent: 2, kept: false }).kind).toBe('not-saved')
    expect(saveStateOf({ ...facts, link: 'down', unsent: 2, sinceMs: 7 })).toEqual({
      kind: 'offline',
      unsent: 2,
      sinceMs: 7,
    })
  })

  it('asks for a reload before anything else', () => {
    expect(saveStateOf({ ...facts, outdated: true, link: 'down' }).kind).toBe('reload')
  })
})

describe('gravest', () => {
  it('takes the worst, adds up what is unsent and is as old as the oldest', () => {
    expect(gravest([{ kind: 'saved' }, { kind: 'saving', kept: true }])).toEqual({ kind: 'saving', kept: true })
    const unkept = { kind: 'saving', kept: false } as const
    expect(gravest([{ kind: 'saving', kept: true }, unkept])).toEqual(unkept)
    expect(
      gravest([
        { kind: 'offline', unsent: 2, sinceMs: 900 },
        { kind: 'offline', unsent: 3, sinceMs: 400 },
        { kind: 'offline', unsent: 0, sinceMs: null },
        { kind: 'saved' },
      ]),
    ).toEqual({ kind: 'offline', unsent: 5, sinceMs: 400 })
    expect(gravest([])).toEqual({ kind: 'saved' })
  })
})

describe('sinceWords', () => {
  it('is the time today and the day with it otherwise', () => {
    const at = new Date(2026, 11, 1, 14, 5).getTime()
    expect(sinceWords(at, new Date(2026, 11, 1, 18).getTime())).toBe('since 14:05')
    expect(sinceWords(at, new Date(2026, 11, 2, 9).getTime())).toBe('since Tue 1 Dec, 14:05')
  })
})
