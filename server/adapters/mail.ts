import { createTransport } from 'nodemailer'

export type OutgoingLetter = { id: string; to: string; subject: string; text: string; html: string }

/** Hands letters to a mail server. `send` rejects when the letter was not taken. */
export type Mailer = { send(letter: OutgoingLetter): Promise<void>; close(): void }

const TIMEOUT_MS = 20_000

/** Over SMTP, from no-reply at the host of our public address. */
export function createMailer(smtpUrl: string, publicUrl: string): Mailer {
  const host = new URL(publicUrl).hostname
  const transport = createTransport({
    url: smtpUrl,
    connectionTimeout: TIMEOUT_MS,
    greetingTimeout: TIMEOUT_MS,
    socketTimeout: TIMEOUT_MS,
    disableFileAccess: true,
    disableUrlAccess: true,
  })
  return {
    send: async ({ id, to, subject, text, html }) => {
      await transport.sendMail({
        from: { name: 'Sconce', address: `no-reply@${host}` },
        // As an object, so that a comma or a bracket in it never makes a second address.
        to: { name: '', address: to },
        subject,
        text,
        html,
        // The same on every try, so that a letter sent twice is seen once.
        messageId: `<${id}@${host}>`,
        headers: { 'Auto-Submitted': 'auto-generated' },
      })
    },
    close: () => transport.close(),
  }
}
