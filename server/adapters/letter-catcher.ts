import { type ParsedMail, simpleParser } from 'mailparser'
import { SMTPServer } from 'smtp-server'

export type LetterCatcher = { smtpUrl: string; letters: readonly ParsedMail[]; close(): Promise<void> }

const MOST_LETTERS = 200

/** A mail server on loopback that keeps what it is given in memory and sends nothing on: for work without a mail account. */
export async function createLetterCatcher(): Promise<LetterCatcher> {
  const letters: ParsedMail[] = []
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS', 'AUTH'],
    disableReverseLookup: true,
    onData: (stream, _session, done) => {
      simpleParser(stream).then(
        (letter) => {
          letters.push(letter)
          if (letters.length > MOST_LETTERS) letters.shift()
          done()
        },
        (error: unknown) => done(error instanceof Error ? error : new Error(String(error))),
      )
    },
  })
  // A client that hangs up is no reason to stop.
  server.on('error', () => undefined)
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', () => resolve()))
  const address = server.server.address()
  const port = typeof address === 'object' && address !== null ? address.port : 0
  return {
    smtpUrl: `smtp://127.0.0.1:${port}`,
    letters,
    close: () => new Promise((resolve) => server.close(() => resolve())),
  }
}
