import { describe, expect, it } from 'vitest'
import { type SaveFacts, gravest, saveStateOf } from '#src/realtime/save-state.ts'

const facts: SaveFacts = { connected: true, settled: true, unsent: 0, kept: true, refused: null, outdated: false }

describe('saveStateOf', () => {
  it('says saved only when connected, settled and nothing is unsent', () => {
    expect(saveStateOf(facts).kind).toBe('saved')
    expect(saveStateOf({ ...facts, settled: false }).kind).toBe('saving')
    expect(saveStateOf({ ...facts, unsent: 1 }).kind).toBe('saving')
    expect(saveStateOf({ ...facts, connected: false }).kind).toBe('offline')
  })

  it('says not saved when the server refused or nothing keeps the edits', () => {
    expect(saveStateOf({ ...facts, unsent: 1, refused: 'read only' })).toEqual({ kind: 'not-saved', why: 'read only' })
    expect(saveStateOf({ ...facts, connected: false, unsent: 2, kept: false }).kind).toBe('not-saved')
    expect(saveStateOf({ ...facts, connected: false, unsent: 2 })).toEqual({ kind: 'offline', unsent: 2 })
  })

  it('asks for a reload before anything else', () => {
    expect(saveStateOf({ ...facts, outdated: true, connected: false }).kind).toBe('reload')
  })
})

describe('gravest', () => {
  it('takes the worst and adds up what is unsent', () => {
    expect(gravest([{ kind: 'saved' }, { kind: 'saving' }])).toEqual({ kind: 'saving' })
    expect(gravest([{ kind: 'offline', unsent: 2 }, { kind: 'offline', unsent: 3 }, { kind: 'saved' }])).toEqual({
      kind: 'offline',
      unsent: 5,
    })
    expect(gravest([])).toEqual({ kind: 'saved' })
  })
})
