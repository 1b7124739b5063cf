import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { countAcknowledgements } from '#src/realtime/acknowledgements.ts'

describe('countAcknowledgements', () => {
  it('counts an edit as unsent until the message that carries it is called durable', () => {
    const acks = countAcknowledgements()
    acks.connected()
    acks.sent('all')
    acks.saved(1)
    expect(acks.settled()).toBe(true)
    acks.edited()
    acks.sent('update')
    expect([acks.unsent(), acks.settled()]).toEqual([1, false])
    acks.saved(2)
    expect([acks.unsent(), acks.settled()]).toEqual([0, true])
  })

  it('covers edits made while offline by the step 2 after reconnecting', () => {
    const acks = countAcknowledgements()
    acks.edited(2)
    acks.edited()
    expect(acks.unsent()).toBe(3)
    acks.connected()
    acks.sent('all')
    acks.saved(1)
    expect(acks.unsent()).toBe(0)
  })

  it('does not carry acknowledgements of an old connection over', () => {
    const acks = countAcknowledgements()
    acks.connected()
    acks.sent('all')
    acks.edited()
    acks.sent('update')
    acks.connected()
    acks.saved(2)
    expect(acks.unsent()).toBe(1)
  })

  it('calls nothing safe by the empty answer of somebody who may not write', () => {
    const acks = countAcknowledgements()
    acks.edited()
    acks.connected()
    acks.sent('nothing')
    acks.saved(1)
    expect([acks.unsent(), acks.settled()]).toEqual([1, true])
  })

  it('takes an acknowledgement past a refused message for what it is: the edit in it is not safe until a step 2', () => {
    const acks = countAcknowledgements()
    acks.connected()
    acks.sent('all')
    acks.saved(1)
    acks.edited()
    acks.sent('update')
    acks.refused(2)
    acks.edited()
    acks.sent('update')
    acks.saved(3)
    expect(acks.unsent()).toBe(2)
    acks.sent('all')
    acks.saved(4)
    expect(acks.unsent()).toBe(0)
  })

  it('believes a step 2 that was already on its way when the refusal came', () => {
    const acks = countAcknowledgements()
    acks.connected()
    acks.edited()
    acks.sent('update')
    acks.sent('all')
    acks.refused(1)
    acks.saved(2)
    expect(acks.unsent()).toBe(0)
  })

  it('never calls an edit safe that the server does not hold, over random histories', () => {
    const event = fc.constantFrom('edit', 'update', 'all', 'nothing', 'connect', 'take', 'refuse')
    fc.assert(
      fc.property(fc.array(event, { maxLength: 80 }), (events) => {
        const acks = countAcknowledgements()
        // Brute force: which edits the server really has.
        const held = new Set<number>()
        let edits = 0
        let carried = 0
        let messages: number[][] = []
        let answered = 0
        for (const kind of events) {
          if (kind === 'edit') {
            edits++
            acks.edited()
          } else if (kind === 'update' || kind === 'all' || kind === 'nothing') {
            const first = kind === 'update' ? carried : 0
            if (kind === 'update') carried = edits
            messages.push(kind === 'nothing' ? [] : Array.from({ length: edits - first }, (_, i) => first + i))
            acks.sent(kind)
            // Every edit leaves in an update of its own: what a step 2 held needs none any more.
            if (kind === 'all') carried = edits
          } else if (kind === 'connect') {
            messages = []
            answered = 0
            acks.connected()
            acks.sent('all')
            messages.push(Array.from({ length: edits }, (_, i) => i))
            carried = edits
          } else if (answered < messages.length) {
            const message = messages[answered] ?? []
            answered++
            if (kind === 'take') {
              for (const edit of message) held.add(edit)
              acks.saved(answered)
            } else acks.refused(answered)
          }
          // What is called safe is a beginning of all edits.
          for (let edit = 0; edit < edits - acks.unsent(); edit++) expect(held.has(edit)).toBe(true)
        }
      }),
    )
  })
})
