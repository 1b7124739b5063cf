import { desc } from 'drizzle-orm'
import type { Letters } from '#shared/api/mail.ts'
import type { Ctx } from '#server/context.ts'
import { mail } from '#server/db/schema/mail.ts'

const MOST = 100

/** The newest letters with the addresses in them, for the local catcher's page. No right guards it: it exists on loopback only. */
export async function listLetters(ctx: Ctx): Promise<Letters> {
  const rows = await ctx.db.select().from(mail).orderBy(desc(mail.createdAt), desc(mail.id)).limit(MOST)
  return {
    letters: rows.map(({ id, to, subject, text, createdAt }) => ({
      id,
      to,
      subject,
      text,
      atMs: createdAt.getTime(),
      links: text.match(/https?:\/\/\S+/g) ?? [],
    })),
  }
}
