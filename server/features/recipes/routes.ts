import { Router } from 'express'
import { z } from 'zod'
import { recipeIdSchema, shootIdSchema, studioIdSchema } from '#shared/ids.ts'
import { keepRecipeSchema, recipesSchema, renameRecipeSchema } from '#shared/api/recipes.ts'
import { endpoint } from '#server/http/endpoint.ts'
import { keepRecipe } from './keep-recipe.ts'
import { listRecipes } from './list-recipes.ts'
import { listShootRecipes } from './list-shoot-recipes.ts'
import { removeRecipe } from './remove-recipe.ts'
import { renameRecipe } from './rename-recipe.ts'

const inStudio = z.object({ studioId: studioIdSchema })
const ofRecipe = inStudio.extend({ recipeId: recipeIdSchema })

export function recipesRoutes(): Router {
  const router = Router()
  router.get(
    '/studios/:studioId/recipes',
    endpoint({
      params: inStudio,
      response: recipesSchema,
      handle: (ctx, { params }) => listRecipes(ctx, params.studioId),
    }),
  )
  router.post(
    '/studios/:studioId/recipes',
    endpoint({
      params: inStudio,
      body: keepRecipeSchema,
      response: recipesSchema,
      handle: (ctx, { params, body }) => keepRecipe(ctx, { ...params, content: body.recipe }),
    }),
  )
  router.patch(
    '/studios/:studioId/recipes/:recipeId',
    endpoint({
      params: ofRecipe,
      body: renameRecipeSchema,
      response: recipesSchema,
      handle: (ctx, { params, body }) => renameRecipe(ctx, { ...params, ...body }),
    }),
  )
  router.delete(
    '/studios/:studioId/recipes/:recipeId',
    endpoint({ params: ofRecipe, response: recipesSchema, handle: (ctx, { params }) => removeRecipe(ctx, params) }),
  )
  router.get(
    '/shoots/:shootId/recipes',
    endpoint({
      params: z.object({ shootId: shootIdSchema }),
      response: recipesSchema,
      handle: (ctx, { params }) => listShootRecipes(ctx, params.shootId),
    }),
  )
  return router
}
