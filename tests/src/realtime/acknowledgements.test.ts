import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { countAcknowledgements } from '#src/realtime/acknowledgements.ts'

describe('countAcknowledgements', () => {
  it('counts an edit as unsent until the message that carries it is called durable', () => {
    const acks = countAcknowledgements(0)
    acks.connected()
    acks.sent() // the step 2 that answers the server
    acks.saved(1)
    expect(acks.settled()).toBe(true)
    acks.edited()
    acks.sent()
    expect([acks.unsent(), acks.settled()]).toEqual([1, false])
    acks.saved(2)
    expect([acks.unsent(), acks.settled()]).toEqual([0, true])
  })

  it('covers edits made while offline by the step 2 after reconnecting', () => {
    const acks = countAcknowledgements(2)
    acks.edited()
    expect(acks.unsent()).toBe(3)
    acks.connected()
    acks.sent()
    acks.saved(1)
    expect(acks.unsent()).toBe(0)
  })

  it('does not carry acknowledgements of an old connection over', () => {
    const acks = countAcknowledgements(0)
    acks.connected()
    acks.sent()
    acks.edited()
    acks.sent()
    acks.connected()
    acks.saved(2)
    expect(acks.unsent()).toBe(1)
  })

  it('never calls an edit safe that no acknowledged message covers, over random histories', () => {
    const event = fc.constantFrom('edit', 'sent', 'connect', 'save')
    fc.assert(
      fc.property(fc.array(event, { maxLength: 60 }), (events) => {
        const acks = countAcknowledgements(0)
        let edits = 0
        let durable = 0
        let messages: number[] = []
        let saved = 0
        for (const kind of events) {
          if (kind === 'edit') {
            edits++
            acks.edited()
          } else if (kind === 'sent') {
            messages.push(edits)
            acks.sent()
          } else if (kind === 'connect') {
            messages = []
            saved = 0
            acks.connected()
          } else if (saved < messages.length) {
            saved++
            durable = Math.max(durable, messages[saved - 1] ?? 0)
            acks.saved(saved)
          }
        }
        expect(acks.unsent()).toBe(edits - durable)
      }),
    )
  })
})
