import { randomUUID } from 'node:crypto'
import type { SignOff, SignOffInput } from '#shared/api/sign-off.ts'
import { differences } from '#shared/domain/sign-off/differences.ts'
import { fingerprintOf, freezeLook } from '#shared/domain/sign-off/fingerprint.ts'
import type { FrozenLook, LookDifference } from '#shared/domain/sign-off/schema.ts'
import { type LookId, type ShootId, signOffIdSchema } from '#shared/ids.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { withTransaction } from '#server/db/client.ts'
import { signOff } from '#server/db/schema/sign-off.ts'
import { AppError } from '#server/errors.ts'
import { readLookVersions } from './look-version-rows.ts'
import { listAnswers, toSignOff } from './sign-off-rows.ts'

export type AnswerLook = SignOffInput & { shootId: ShootId; lookId: LookId }

/**
 * Keeps a client's answer to one exact version of a look, with name, time and the version itself.
 *
 * @throws AppError CONFLICT with `{ fingerprint, differences }` when the look is no longer what the person saw.
 */
export async function answerLook(ctx: Ctx, input: AnswerLook): Promise<SignOff> {
  const { actor } = await requireShoot(ctx, input.shootId, 'sign-off.answer')
  const { shootId, lookId, answer, words } = input
  const { seq, looks, pictureHashes } = await readLookVersions(ctx, shootId)
  const planned = looks.get(lookId)
  if (!planned)
    throw new AppError(
      'NOT_FOUND',
      'This look was taken out meanwhile. Your answer was not kept; what you typed is still here.',
    )
  const frozen = freezeLook(planned, pictureHashes)
  const fingerprint = fingerprintOf(frozen)
  if (fingerprint !== input.fingerprint) {
    throw new AppError(
      'CONFLICT',
      'This look changed while you had it open. Your answer was not kept; what you typed is still here. Look at what changed and answer again.',
      {
        details: { fingerprint, differences: await sinceSeen(ctx, input, frozen) },
      },
    )
  }
  const kept = await withTransaction(ctx.db, async (tx) => {
    const [row] = await tx
      .insert(signOff)
      .values({
        id: signOffIdSchema.parse(randomUUID()),
        shootId,
        lookId,
        answer,
        words,
        fingerprint,
        frozen,
        seq,
        userId: actor.userId,
        name: actor.name,
        at: ctx.now(),
      })
      .returning()
    if (!row) throw new Error('an insert returns its row')
    return toSignOff(row)
  })
  ctx.documents.announce(shootId, [['shoots', shootId, 'sign-offs']])
  return kept
}

/** From what the person saw to what stands now: their own copy, a version on record, or the newest answer's. */
async function sinceSeen(
  ctx: Ctx,
  { saw, fingerprint, shootId, lookId }: AnswerLook,
  now: FrozenLook,
): Promise<LookDifference[]> {
  if (saw && fingerprintOf(saw) === fingerprint) return differences(saw, now)
  const history = await listAnswers(ctx.db, shootId, lookId)
  const seen = history.find((answer) => answer.fingerprint === fingerprint) ?? history[0]
  return seen ? differences(seen.frozen, now) : []
}
