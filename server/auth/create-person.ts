import { eq } from 'drizzle-orm'
import { type UserId, userIdSchema } from '#shared/ids.ts'
import type { Db } from '#server/db/client.ts'
import { user } from '#server/db/schema/auth.ts'
import type { Auth } from './auth.ts'

/** Makes an account with a password for somebody who does not sign up by themselves (the demo's people), its address taken as theirs. */
export async function createPerson(
  auth: Auth,
  db: Db,
  person: { name: string; email: string; password: string },
): Promise<UserId> {
  const made = await auth.api.signUpEmail({ body: person })
  await db.update(user).set({ emailVerified: true }).where(eq(user.id, made.user.id))
  return userIdSchema.parse(made.user.id)
}
