import { type RequestHandler, Router } from 'express'
import { z } from 'zod'
import { recipeIdSchema, setupIdSchema, shootIdSchema, studioIdSchema } from '#shared/ids.ts'
import {
  MOST_SHEET_FRAMES,
  SHEET_FRAME_MAX_BYTES,
  keepRecipeSchema,
  recipeSheetSchema,
  recipesSchema,
  renameRecipeSchema,
} from '#shared/api/recipes.ts'
import { AppError } from '#server/errors.ts'
import { endpoint } from '#server/http/endpoint.ts'
import { HTTP_LIMITS, limitPerMin } from '#server/http/limits.ts'
import { receiveFiles } from '#server/http/receive-files.ts'
import { ctxOf } from '#server/http/request-ctx.ts'
import { keepRecipe } from './keep-recipe.ts'
import { listRecipes } from './list-recipes.ts'
import { listShootRecipes } from './list-shoot-recipes.ts'
import { makeRecipeSheet } from './make-recipe-sheet.ts'
import { removeRecipe } from './remove-recipe.ts'
import { renameRecipe } from './rename-recipe.ts'
import { requireSetup } from './require-setup.ts'

const inStudio = z.object({ studioId: studioIdSchema })
const ofSetup = z.object({ shootId: shootIdSchema, setupId: setupIdSchema })
const ofRecipe = inStudio.extend({ recipeId: recipeIdSchema })

/** Before pictures are read into memory. */
const mayRead: RequestHandler = async (req, _res, next) => {
  const params = ofSetup.safeParse(req.params)
  if (!params.success) throw new AppError('NOT_FOUND', 'There is nothing at this address.')
  await requireSetup(ctxOf(req), params.data)
  next()
}

const sheetFiles = { field: 'frames', most: MOST_SHEET_FRAMES, bytesEach: SHEET_FRAME_MAX_BYTES, fieldBytes: 16 * 1024 }
/** The words of the sheet come as JSON in one field. */
const sheetBodySchema = z.object({
  sheet: z
    .string()
    .transform((text, context): unknown => {
      try {
        return JSON.parse(text)
      } catch {
        context.addIssue({ code: 'custom', message: 'this is not JSON' })
        return z.NEVER
      }
    })
    .pipe(recipeSheetSchema),
})

export function recipesRoutes(sheetsPerMin: number = HTTP_LIMITS.sheetsPerMin): Router {
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
  router.post(
    '/shoots/:shootId/setups/:setupId/recipe-sheet',
    limitPerMin(sheetsPerMin, 'Too many sheets at once'),
    mayRead,
    receiveFiles(sheetFiles, (req) => ctxOf(req).actor?.userId ?? ''),
    endpoint({
      params: ofSetup,
      body: sheetBodySchema,
      handle: async (ctx, { params, body, req, res }) => {
        const files = Array.isArray(req.files) ? req.files : []
        const { pdf, fileName } = await makeRecipeSheet(ctx, {
          ...params,
          ...body.sheet,
          frames: files.map((file) => file.buffer),
        })
        res.attachment(fileName).type('application/pdf').send(pdf)
      },
    }),
  )
  return router
}
