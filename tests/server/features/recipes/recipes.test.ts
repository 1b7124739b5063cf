import { eq } from 'drizzle-orm'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { recipeIdSchema } from '#shared/ids.ts'
import { MOST_RECIPES, RECIPES_MAX_BYTES } from '#shared/api/recipes.ts'
import type { Ctx } from '#server/context.ts'
import { auditEvent } from '#server/db/schema/people.ts'
import { recipe } from '#server/db/schema/studios.ts'
import { keepRecipe } from '#server/features/recipes/keep-recipe.ts'
import { listRecipes } from '#server/features/recipes/list-recipes.ts'
import { listShootRecipes } from '#server/features/recipes/list-shoot-recipes.ts'
import { removeRecipe } from '#server/features/recipes/remove-recipe.ts'
import { renameRecipe } from '#server/features/recipes/rename-recipe.ts'
import { type TestApp, startTestApp } from '#tests/support/app.ts'
import { type World, makeWorld } from '#tests/support/factories.ts'
import { RECIPE } from '#tests/support/rights-world.ts'

let app: TestApp
let world: World
let ctx: Ctx
beforeAll(async () => {
  app = await startTestApp()
})
afterAll(() => app.close())
beforeEach(async () => {
  world = await makeWorld(app)
  ctx = app.ctxOf(world.photographer)
})
const keep = (name: string, by = ctx) =>
  keepRecipe(by, { studioId: world.studioId, content: { ...RECIPE, name, mood: 'unknown' } })

describe('keepRecipe', () => {
  it('keeps what a recipe is, under its name, with who and when', async () => {
    const { recipes } = await keep('Reading lamp', app.ctxOf(world.studioMember))
    expect(recipes).toEqual([
      {
        id: expect.any(String),
        name: 'Reading lamp',
        by: 'Mel Ward',
        atMs: app.clock.now().getTime(),
        recipe: { ...RECIPE, name: 'Reading lamp' },
        problem: null,
      },
    ])
  })

  it('notes who did it and tells the studio’s shoots', async () => {
    app.documents.announced.length = 0
    const { recipes } = await keep('Reading lamp')
    expect(app.documents.announced).toEqual([
      {
        shootId: world.shootId,
        queryKeys: [
          ['shoots', world.shootId, 'recipes'],
          ['studios', world.studioId, 'recipes'],
        ],
      },
    ])
    expect(
      await app.db
        .select()
        .from(auditEvent)
        .where(eq(auditEvent.subject, String(recipes[0]?.id))),
    ).toMatchObject([{ what: 'recipe.kept', studioId: world.studioId, userId: world.photographer.userId }])
  })

  it('says in a sentence what does not fit, and keeps nothing', async () => {
    const content = { ...RECIPE, lights: [{ ...RECIPE.lights[0], power: -1 }] }
    await expect(keepRecipe(ctx, { studioId: world.studioId, content })).rejects.toMatchObject({
      code: 'BAD_REQUEST',
      message: 'This recipe cannot be read: light 1, power is −1 and has to be more than 0. Nothing was changed.',
    })
    await expect(keepRecipe(ctx, { studioId: world.studioId, content: undefined })).rejects.toMatchObject({
      code: 'BAD_REQUEST',
    })
    expect((await listRecipes(ctx, world.studioId)).recipes).toEqual([])
  })

  it('keeps so many and no more', async () => {
    await app.db.insert(recipe).values(
      Array.from({ length: MOST_RECIPES }, (_, index) => ({
        id: recipeIdSchema.parse(crypto.randomUUID()),
        studioId: world.studioId,
        name: `Recipe ${index}`,
        content: RECIPE,
      })),
    )
    await expect(keep('One more')).rejects.toMatchObject({ code: 'CONFLICT' })
  })

  it('keeps so much and no more: every list carries all of it', async () => {
    const heavy = { ...RECIPE, lights: Array(60).fill({ ...RECIPE.lights[0], note: 'x'.repeat(500) }) }
    const bytes = JSON.stringify(heavy).length
    await app.db.insert(recipe).values(
      Array.from({ length: Math.floor(RECIPES_MAX_BYTES / bytes) }, (_, index) => ({
        id: recipeIdSchema.parse(crypto.randomUUID()),
        studioId: world.studioId,
        name: `Recipe ${index}`,
        content: heavy,
      })),
    )
    await expect(keepRecipe(ctx, { studioId: world.studioId, content: heavy })).rejects.toMatchObject({
      code: 'CONFLICT',
      message: expect.stringContaining('take 8 MB, as much as they can'),
    })
  })
})

describe('listRecipes', () => {
  it('is in the order of names, numbers as numbers', async () => {
    for (const name of ['Dome 10', 'Dome 9', 'Attic']) await keep(name)
    const { recipes } = await listRecipes(app.ctxOf(world.studioMember), world.studioId)
    expect(recipes.map(({ name }) => name)).toEqual(['Attic', 'Dome 9', 'Dome 10'])
  })

  it('names one that cannot be read, with the reason', async () => {
    const id = recipeIdSchema.parse(crypto.randomUUID())
    await app.db.insert(recipe).values({ id, studioId: world.studioId, name: 'Old', content: { version: 7 } })
    expect((await listRecipes(ctx, world.studioId)).recipes).toMatchObject([
      { id, name: 'Old', by: null, recipe: null, problem: expect.stringContaining('not a recipe') },
    ])
  })
})

describe('listShootRecipes', () => {
  it('is the studio’s, read by every role of the shoot', async () => {
    await keep('Reading lamp')
    for (const actor of [world.photographer, world.stylist, world.client, world.crew]) {
      expect(await listShootRecipes(app.ctxOf(actor), world.shootId)).toEqual(await listRecipes(ctx, world.studioId))
    }
    await expect(listShootRecipes(app.ctxOf(world.studioMember), world.shootId)).rejects.toMatchObject({
      code: 'NOT_FOUND',
    })
  })
})

describe('renameRecipe', () => {
  it('is the name everywhere, the recipe’s own as well', async () => {
    const [kept] = (await keep('Reading lamp')).recipes
    const recipeId = kept?.id ?? recipeIdSchema.parse('')
    const { recipes } = await renameRecipe(ctx, { studioId: world.studioId, recipeId, name: 'Night desk' })
    expect(recipes).toMatchObject([{ id: recipeId, name: 'Night desk', recipe: { name: 'Night desk' } }])
  })

  it('does not know one of another studio', async () => {
    const other = await makeWorld(app)
    const [theirs] = (await keepRecipe(app.ctxOf(other.photographer), { studioId: other.studioId, content: RECIPE }))
      .recipes
    const recipeId = theirs?.id ?? recipeIdSchema.parse('')
    await expect(renameRecipe(ctx, { studioId: world.studioId, recipeId, name: 'Mine' })).rejects.toMatchObject({
      code: 'NOT_FOUND',
    })
    await removeRecipe(ctx, { studioId: world.studioId, recipeId })
    expect((await listRecipes(app.ctxOf(other.photographer), other.studioId)).recipes).toHaveLength(1)
  })
})

describe('removeRecipe', () => {
  it('takes it out, once', async () => {
    const [kept] = (await keep('Reading lamp')).recipes
    const one = { studioId: world.studioId, recipeId: kept?.id ?? recipeIdSchema.parse('') }
    expect(await removeRecipe(ctx, one)).toEqual({ recipes: [] })
    expect(await removeRecipe(ctx, one)).toEqual({ recipes: [] })
    const noted = await app.db.select().from(auditEvent).where(eq(auditEvent.subject, one.recipeId))
    expect(noted.map(({ what }) => what).sort()).toEqual(['recipe.kept', 'recipe.removed'])
  })
})
