import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { redCautions } from '#shared/domain/lighting/cautions.ts'
import { problemsOf } from '#shared/domain/lighting/problems.ts'
import { setupUse } from '#shared/domain/lighting/setup-use.ts'
import { orderProblem } from '#shared/domain/order/problem.ts'
import { schedule } from '#shared/domain/order/schedule.ts'
import { readAll } from '#shared/realtime/collection.ts'
import { COLLECTIONS, DOCUMENT_KINDS, frames, looks, setups, shots } from '#shared/realtime/documents.ts'
import { DEMO_PEOPLE } from '#server/demo/people.ts'
import { listShootRecipes } from '#server/features/recipes/list-shoot-recipes.ts'
import { listShoots } from '#server/features/shoots/list-shoots.ts'
import { readShootPlan } from '#server/features/plan/read-shoot-plan.ts'
import { listSignOffs } from '#server/features/sign-off/list-sign-offs.ts'
import { type DemoSite, putDemo } from '#tests/support/demo-site.ts'

let site: DemoSite

beforeAll(async () => {
  site = await putDemo()
})
afterAll(() => site.close())

describe('ensureDemo', () => {
  it('puts in four people with a role each, once', async () => {
    expect(site.put).toBe(true)
    expect(await site.putAgain()).toBe(false)
    for (const { role } of DEMO_PEOPLE) {
      const { shoots: cards } = await listShoots(site.ctx(role))
      expect(cards).toMatchObject([{ title: 'Leaf, Brass & Star', role, shots: 12 }])
    }
  })

  it('has twenty frames, eight looks, four setups and twelve shots, and nothing that does not parse', async () => {
    const documents = site.ctx('photographer').documents
    for (const kind of DOCUMENT_KINDS) {
      const unreadable = await documents.read(site.shootId, kind, (doc) =>
        Object.values(COLLECTIONS[kind]).flatMap((c) => readAll(doc, c).unreadable),
      )
      expect(unreadable).toEqual([])
    }
    const board = await documents.read(site.shootId, 'board', (doc) => [
      readAll(doc, frames).items.size,
      readAll(doc, shots).items.size,
    ])
    expect(board).toEqual([20, 12])
    expect(await documents.read(site.shootId, 'looks', (doc) => readAll(doc, looks).items.size)).toBe(8)
    expect(await documents.read(site.shootId, 'lighting', (doc) => readAll(doc, setups).items.size)).toBe(4)
  })

  it('has a day that works as it stands: no rule broken, out before the hard out', async () => {
    const plan = await readShootPlan(site.ctx('photographer'), site.shootId)
    const [day] = plan.days
    if (!day) throw new Error('the demo has a day')
    expect(day.shots.flatMap((shot) => shot.missing)).toEqual([])
    const stands = schedule(
      orderProblem(plan, day.day.id),
      day.shots.map(({ shot }) => shot.id),
    )
    expect(stands.broken.map(({ words }) => words)).toEqual([])
    expect(stands.wrapMin).toBeLessThanOrEqual(day.day.hardOutMin)
  })

  it('keeps two setups as recipes of the studio', async () => {
    const { recipes } = await listShootRecipes(site.ctx('photographer'), site.shootId)
    expect(recipes.map(({ name }) => name).sort()).toEqual(['Octa left, soft fill', 'Window side, cool wall'])
  })

  it('has setups without a red caution or a problem, none of them a main from above with a warm wall and a narrow fill', async () => {
    const plan = await readShootPlan(site.ctx('photographer'), site.shootId)
    for (const whole of plan.setups.values()) {
      expect(redCautions(whole, setupUse(plan, whole.setup.id)), whole.setup.name).toEqual([])
      expect(problemsOf(whole)).toEqual([])
      const fromAbove = whole.lights.some(
        ({ purpose, support }) => purpose === 'main' && support?.numbers.kind === 'boom',
      )
      const warmWall = whole.lights.some(
        ({ purpose, gels }) => purpose === 'background' && gels.some((gel) => gel.numbers.miredShift.value > 0),
      )
      expect(fromAbove && warmWall).toBe(false)
    }
  })

  it('has a look that changed after the client signed it off', async () => {
    const { signOffs, current } = await listSignOffs(site.ctx('client'), site.shootId)
    expect(signOffs).toHaveLength(4)
    const night = signOffs.find(({ frozen }) => frozen.name === 'Night coat')
    expect(current.find(({ lookId }) => lookId === night?.lookId)?.fingerprint).not.toBe(night?.fingerprint)
  })
})
