import { Router } from 'express'
import { z } from 'zod'
import { deliverableIdSchema, roomIdSchema, shootIdSchema } from '#shared/ids.ts'
import {
  briefPatchSchema,
  briefResponseSchema,
  createShootSchema,
  createdShootSchema,
  deliverableBodySchema,
  locationInputSchema,
  roomBodySchema,
  shootCardsSchema,
  shootSchema,
} from '#shared/api/shoots.ts'
import { endpoint } from '#server/http/endpoint.ts'
import { addDeliverable } from './add-deliverable.ts'
import { addRoom } from './add-room.ts'
import { createShoot } from './create-shoot.ts'
import { getShoot } from './get-shoot.ts'
import { listShoots } from './list-shoots.ts'
import { removeDeliverable } from './remove-deliverable.ts'
import { removeRoom } from './remove-room.ts'
import { removeShoot } from './remove-shoot.ts'
import { setLocation } from './set-location.ts'
import { updateBrief } from './update-brief.ts'
import { updateDeliverable } from './update-deliverable.ts'
import { updateRoom } from './update-room.ts'

const inShoot = z.object({ shootId: shootIdSchema })
const ofRoom = inShoot.extend({ roomId: roomIdSchema })
const ofDeliverable = inShoot.extend({ deliverableId: deliverableIdSchema })
const response = briefResponseSchema

export function shootsRoutes(): Router {
  const router = Router()
  router.get('/shoots', endpoint({ response: shootCardsSchema, handle: (ctx) => listShoots(ctx) }))
  router.post(
    '/shoots',
    endpoint({
      body: createShootSchema,
      response: createdShootSchema,
      handle: (ctx, { body }) => createShoot(ctx, body),
    }),
  )
  router.get(
    '/shoots/:shootId',
    endpoint({ params: inShoot, response: shootSchema, handle: (ctx, { params }) => getShoot(ctx, params.shootId) }),
  )
  router.delete(
    '/shoots/:shootId',
    endpoint({ params: inShoot, handle: (ctx, { params }) => removeShoot(ctx, params.shootId) }),
  )

  router.patch(
    '/shoots/:shootId/brief',
    endpoint({
      params: inShoot,
      body: briefPatchSchema,
      response,
      handle: async (ctx, { params, body }) => ({ brief: await updateBrief(ctx, { ...params, patch: body }) }),
    }),
  )
  router.put(
    '/shoots/:shootId/location',
    endpoint({
      params: inShoot,
      body: locationInputSchema,
      response,
      handle: async (ctx, { params, body }) => ({ brief: await setLocation(ctx, { ...params, location: body }) }),
    }),
  )

  router.post(
    '/shoots/:shootId/rooms',
    endpoint({
      params: inShoot,
      body: roomBodySchema,
      response,
      handle: async (ctx, { params, body }) => ({ brief: await addRoom(ctx, { ...params, room: body }) }),
    }),
  )
  router.put(
    '/shoots/:shootId/rooms/:roomId',
    endpoint({
      params: ofRoom,
      body: roomBodySchema,
      response,
      handle: async (ctx, { params, body }) => ({ brief: await updateRoom(ctx, { ...params, room: body }) }),
    }),
  )
  router.delete(
    '/shoots/:shootId/rooms/:roomId',
    endpoint({
      params: ofRoom,
      response,
      handle: async (ctx, { params }) => ({ brief: await removeRoom(ctx, params) }),
    }),
  )

  router.post(
    '/shoots/:shootId/deliverables',
    endpoint({
      params: inShoot,
      body: deliverableBodySchema,
      response,
      handle: async (ctx, { params, body }) => ({ brief: await addDeliverable(ctx, { ...params, deliverable: body }) }),
    }),
  )
  router.put(
    '/shoots/:shootId/deliverables/:deliverableId',
    endpoint({
      params: ofDeliverable,
      body: deliverableBodySchema,
      response,
      handle: async (ctx, { params, body }) => ({
        brief: await updateDeliverable(ctx, { ...params, deliverable: body }),
      }),
    }),
  )
  router.delete(
    '/shoots/:shootId/deliverables/:deliverableId',
    endpoint({
      params: ofDeliverable,
      response,
      handle: async (ctx, { params }) => ({ brief: await removeDeliverable(ctx, params) }),
    }),
  )
  return router
}
