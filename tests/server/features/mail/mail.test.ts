import { eq, isNull } from 'drizzle-orm'
import { pino } from 'pino'
import { afterAll, afterEach, beforeAll, describe, expect, it, vi } from 'vitest'
import { type LetterCatcher, createLetterCatcher } from '#server/adapters/letter-catcher.ts'
import { type Mailer, createMailer } from '#server/adapters/mail.ts'
import { connectDatabase } from '#server/db/client.ts'
import { mail } from '#server/db/schema/mail.ts'
import { escapeHtml, invitationLetter, resetLetter, signInLetter } from '#server/features/mail/letters.ts'
import { listLetters } from '#server/features/mail/list-letters.ts'
import { startMailWorker } from '#server/features/mail/mail-worker.ts'
import { queueLetter } from '#server/features/mail/queue-letter.ts'
import { MOST_TRIES, sendDue, waitMs } from '#server/features/mail/send-due.ts'
import { type TestApp, startTestApp } from '#tests/support/app.ts'
import { clockAt } from '#tests/support/clock.ts'

const clock = clockAt('2027-01-01T00:00:00Z')
let app: TestApp
let catcher: LetterCatcher
let mailer: Mailer
beforeAll(async () => {
  app = await startTestApp({ clock })
  catcher = await createLetterCatcher()
  mailer = createMailer(catcher.smtpUrl, 'https://sconce.example')
})
afterAll(async () => {
  mailer.close()
  await catcher.close()
  await app.close()
})
afterEach(async () => {
  await app.db.delete(mail)
})

const LONG_URL = `https://sconce.example/join/${'aB3_-'.repeat(24)}`
const about = {
  to: 'gwen@example.com',
  name: 'Gwen',
  inviter: 'Pia Lund',
  title: 'Salt and Linen',
  role: 'client',
  kind: 'shoot' as const,
  url: LONG_URL,
  days: 7,
}
const settings = { now: clock.now, keepsText: true }
const refusing: Mailer = { send: () => Promise.reject(new Error('mailbox on fire')), close: () => undefined }
const rows = () => app.db.select().from(mail)

describe('invitationLetter', () => {
  it('escapes in its HTML what people typed', () => {
    const letter = invitationLetter({
      ...about,
      inviter: '<img src=x onerror=alert(1)>',
      title: '"Tea" & <b>Stars</b>',
    })
    expect(letter.html).not.toContain('<img')
    expect(letter.html).not.toContain('<b>')
    expect(letter.html).toContain('&quot;Tea&quot; &amp; &lt;b&gt;Stars&lt;/b&gt;')
    expect(letter.text).toContain('“"Tea" & <b>Stars</b>”')
  })

  it('never breaks a header, whatever was typed', () => {
    const letter = invitationLetter({ ...about, inviter: 'Pia\r\nBcc: all@example.com', title: 'a\u2028b' })
    expect(letter.subject).toBe('Pia Bcc: all@example.com invites you to a b')
  })

  it('says what the part in the shoot is', () => {
    expect(invitationLetter(about).text).toContain('sign off the looks you are happy with')
    expect(invitationLetter({ ...about, kind: 'studio', role: 'member' }).text).toContain('the studio “Salt and Linen”')
    expect(invitationLetter({ ...about, name: ' ' }).text).toMatch(/^Hello,\n/)
  })
})

describe('signInLetter and resetLetter', () => {
  it('carry one link each and say how long it works', () => {
    for (const [letter, time] of [
      [signInLetter(about), '15 minutes'],
      [resetLetter(about), 'an hour'],
    ] as const) {
      expect(letter.text.match(/https?:\/\/\S+/g)).toEqual([LONG_URL])
      expect(letter.text).toContain(time)
    }
  })
})

describe('escapeHtml', () => {
  it('leaves nothing that opens a tag or an attribute', () => {
    expect(escapeHtml(`<a href="x" id='y'>&`)).toBe('&lt;a href=&quot;x&quot; id=&#39;y&#39;&gt;&amp;')
  })
})

describe('sendDue', () => {
  it('hands a letter over as it was written, its link unbroken in both parts', async () => {
    await queueLetter(app.db, invitationLetter({ ...about, title: 'Écume & Sel' }))
    expect(await sendDue(app.db, mailer, settings)).toBe(true)
    const letter = catcher.letters.at(-1)
    expect(letter?.subject).toBe('Pia Lund invites you to Écume & Sel')
    expect(letter?.from?.value).toEqual([{ name: 'Sconce', address: 'no-reply@sconce.example' }])
    expect([letter?.to].flat()[0]?.value).toMatchObject([{ address: 'gwen@example.com' }])
    expect(letter?.text).toContain(LONG_URL)
    expect(letter?.html).toContain(`href="${LONG_URL}"`)
    expect(await rows()).toMatchObject([{ sentAt: clock.now(), tries: 1, failed: null }])
    expect(await sendDue(app.db, mailer, settings)).toBe(false)
  })

  it('goes to one address only, even if that looks like several', async () => {
    await queueLetter(app.db, { to: 'gwen@example.com, all@example.com', subject: 'x', text: 'x', html: 'x' })
    await sendDue(app.db, mailer, settings)
    const [row] = await rows()
    const received = catcher.letters.at(-1)
    const addresses = row?.sentAt ? [received?.to].flat().flatMap((to) => to?.value ?? []) : []
    expect(addresses.length).toBeLessThanOrEqual(1)
  })

  it('forgets the words once they are sent for real', async () => {
    await queueLetter(app.db, invitationLetter(about))
    await sendDue(app.db, mailer, { ...settings, keepsText: false })
    expect(await rows()).toMatchObject([{ text: '', html: '', subject: 'Pia Lund invites you to Salt and Linen' }])
  })

  it('waits longer after each refusal and gives up after the eighth', async () => {
    await queueLetter(app.db, invitationLetter(about))
    const waits: number[] = []
    for (let i = 1; i <= MOST_TRIES; i++) {
      expect(await sendDue(app.db, refusing, settings)).toBe(true)
      expect(await sendDue(app.db, refusing, settings)).toBe(false)
      const [row] = await rows()
      expect(row).toMatchObject({ tries: i, sentAt: null, failed: i < MOST_TRIES ? null : 'mailbox on fire' })
      waits.push((row?.nextTryAt.getTime() ?? 0) - clock.now().getTime())
      clock.advanceMs(waits.at(-1) ?? 0)
    }
    expect(waits).toEqual([1, 2, 3, 4, 5, 6, 7, 8].map(waitMs))
    expect(waits.slice(0, 4)).toEqual([5_000, 20_000, 80_000, 320_000])
    expect(waits.at(-1)).toBe(3_600_000)
    expect(await sendDue(app.db, mailer, settings)).toBe(false)
  })

  it('gives each letter to one process when several look', async () => {
    for (let i = 0; i < 6; i++) await queueLetter(app.db, signInLetter({ ...about, to: `several.${i}@example.com` }))
    const sent: string[] = []
    const slow: Mailer = {
      send: async ({ to }) => {
        sent.push(to)
        await new Promise((resolve) => setTimeout(resolve, 20))
      },
      close: () => undefined,
    }
    await Promise.all(
      [1, 2, 3].map(async () => {
        while (await sendDue(app.db, slow, settings)) continue
      }),
    )
    expect([...sent].sort()).toEqual([0, 1, 2, 3, 4, 5].map((i) => `several.${i}@example.com`))
  })

  it('sends nothing of a transaction that failed', async () => {
    await expect(
      app.db.transaction(async (tx) => {
        await queueLetter(tx, signInLetter(about))
        throw new Error('changed my mind')
      }),
    ).rejects.toThrow('changed my mind')
    expect(await rows()).toEqual([])
  })
})

describe('listLetters', () => {
  it('has the newest first, with their links', async () => {
    await queueLetter(app.db, signInLetter({ ...about, to: 'first@example.com' }))
    await queueLetter(app.db, signInLetter({ ...about, to: 'second@example.com' }))
    const { letters } = await listLetters(app.ctxOf())
    expect(letters.map(({ to, links }) => [to, links])).toEqual([
      ['second@example.com', [LONG_URL]],
      ['first@example.com', [LONG_URL]],
    ])
  })
})

describe('startMailWorker', () => {
  it('sends what is waiting by itself, outlives a database that is away, and stops after the letter in hand', async () => {
    await queueLetter(app.db, signInLetter(about))
    const log = pino({ level: 'silent' })
    const worker = startMailWorker({ db: app.db, mailer, now: clock.now, log, keepsText: true })
    await vi.waitFor(async () => expect(await app.db.select().from(mail).where(isNull(mail.sentAt))).toEqual([]), {
      timeout: 5000,
    })
    await worker.stop()
    await queueLetter(app.db, signInLetter({ ...about, to: 'later@example.com' }))
    expect(await app.db.select().from(mail).where(eq(mail.to, 'later@example.com'))).toMatchObject([{ sentAt: null }])
    const { db, pool } = connectDatabase('postgres://nobody@127.0.0.1:1/none', () => undefined)
    const lonely = startMailWorker({ db, mailer, now: clock.now, log, keepsText: true })
    await lonely.stop()
    await pool.end()
  })
})
