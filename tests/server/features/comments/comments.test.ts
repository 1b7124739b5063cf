import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { commentIdSchema } from '#shared/ids.ts'
import { addComment } from '#server/features/comments/add-comment.ts'
import { listComments } from '#server/features/comments/list-comments.ts'
import { removeComment } from '#server/features/comments/remove-comment.ts'
import { removePerson } from '#server/features/people/remove-person.ts'
import { type TestApp, startTestApp } from '#tests/support/app.ts'
import { clockAt } from '#tests/support/clock.ts'
import { type World, makeWorld } from '#tests/support/factories.ts'

const clock = clockAt()
let app: TestApp
let world: World
beforeAll(async () => {
  app = await startTestApp({ clock })
})
afterAll(() => app.close())
beforeEach(async () => {
  world = await makeWorld(app)
})
const subjectId = '0f4f0a0e-51a4-4a3c-8f0e-6f1f0b6f9d11'
const say = (actor: World['client'], text: string) =>
  addComment(app.ctxOf(actor), { shootId: world.shootId, subject: 'frame', subjectId, text })

describe('addComment', () => {
  it('is the last of the list, with who and when, and screens hear of it', async () => {
    await say(world.client, 'Warmer?')
    clock.advanceMs(1000)
    app.documents.announced.length = 0
    const { comments } = await say(world.crew, 'A quarter cut')
    expect(comments.map(({ name, initials, text, atMs }) => [name, initials, text, atMs])).toEqual([
      ['Cleo Marsh', 'CM', 'Warmer?', clock.now().getTime() - 1000],
      ['Cy Dorn', 'CD', 'A quarter cut', clock.now().getTime()],
    ])
    expect(app.documents.announced).toEqual([
      { shootId: world.shootId, queryKeys: [['shoots', world.shootId, 'comments']] },
    ])
  })
})

describe('listComments', () => {
  it('keeps the words and the name of who left the shoot', async () => {
    await say(world.client, 'Lovely')
    await removePerson(app.ctxOf(world.client), { shootId: world.shootId, userId: world.client.userId })
    expect((await listComments(app.ctxOf(world.crew), world.shootId)).comments).toMatchObject([
      { name: 'Cleo Marsh', text: 'Lovely' },
    ])
  })
})

describe('removeComment', () => {
  it('takes back one’s own and nobody else’s', async () => {
    const { comments } = await say(world.client, 'Oh')
    const commentId = comments[0]?.id ?? commentIdSchema.parse('')
    const remove = (actor: World['client']) => removeComment(app.ctxOf(actor), { shootId: world.shootId, commentId })
    await expect(remove(world.photographer)).rejects.toMatchObject({
      code: 'FORBIDDEN',
      message: 'This comment is somebody else’s, so it stays. Only who wrote it can take it back.',
    })
    expect(await remove(world.client)).toEqual({ comments: [] })
    expect(await remove(world.client)).toEqual({ comments: [] })
  })
})
