import { randomUUID } from 'node:crypto'
import sharp from 'sharp'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type { SetupId } from '#shared/ids.ts'
import { type RecipeSheetInput, recipeSheetSchema } from '#shared/api/recipes.ts'
import { cautionsOf } from '#shared/domain/lighting/cautions.ts'
import { ratioLabel } from '#shared/domain/lighting/ratio.ts'
import { readSetup } from '#shared/domain/lighting/readings.ts'
import { fNumberLabel, powerLabel, stopsLabel } from '#shared/domain/lighting/words.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { fromRecipe, toRecipe } from '#shared/domain/recipes/recipe.ts'
import { SHEET_DEFERS } from '#shared/domain/recipes/sheet.ts'
import { makeRecipeSheet } from '#server/features/recipes/make-recipe-sheet.ts'
import { requireSetup } from '#server/features/recipes/require-setup.ts'
import { type TestApp, startTestApp } from '#tests/support/app.ts'
import { clockAt } from '#tests/support/clock.ts'
import { type World, makeWorld } from '#tests/support/factories.ts'
import { BOOM, FULL_WARM, GRID, HALF_BLUE, OCTA, SOFTBOX, light, whole } from '#tests/support/lighting-sample.ts'
import { readPdf } from '#tests/support/read-pdf.ts'
import { putWhole, sheetForm } from '#tests/support/rights-world.ts'

const face: [number, number, number] = [0, 1.5, 0]
const SETUP = whole({
  lights: [
    light(1, { purpose: 'main', group: 'A', at: [-1.2, 2.05, 1.2], aim: face, modifier: OCTA }),
    light(2, { purpose: 'fill', group: 'B', at: [1.3, 1.7, 1.9], aim: face, modifier: SOFTBOX, power: 1 / 16 }),
    light(3, {
      purpose: 'background',
      at: [1.1, 0.7, -1],
      aim: [0, 1.4, -2],
      modifier: GRID,
      gels: [HALF_BLUE],
      power: 2 ** (1 / 3) / 8,
      zoomMm: 50,
    }),
    light(4, { purpose: 'rim', at: [1.4, 2.3, -1.1], aim: face, gels: [FULL_WARM], power: 1 / 8, support: BOOM }),
  ],
  props: [{ at: [1, 1, 0.6], turnDeg: 57 }],
})

let app: TestApp
let world: World
beforeAll(async () => {
  app = await startTestApp({ clock: clockAt('2026-12-01T22:30:00.000Z') })
})
afterAll(() => app.close())
beforeEach(async () => {
  world = await makeWorld(app)
})

async function put(setup: WholeSetup, name = 'Clockmaker at the great gear', note = 'Begin with the room dark.') {
  const made = fromRecipe({ ...toRecipe(setup), note }, { newId: randomUUID, name })
  await app.documents.write(world.shootId, 'lighting', world.photographer.userId, (doc) => putWhole(doc, made))
  return made
}
const make = (setupId: SetupId, more: Partial<RecipeSheetInput> & { frames?: readonly Uint8Array[] } = {}) =>
  makeRecipeSheet(app.ctxOf(world.crew), {
    shootId: world.shootId,
    setupId,
    ...recipeSheetSchema.parse({ paper: 'A4', unit: 'm', ...more }),
    frames: more.frames ?? [],
  })
/** Words without what a line's end does to them. */
const flat = (text: string) => text.replace(/\s+/g, ' ')
async function textOf(pdf: Uint8Array): Promise<string> {
  return flat((await readPdf(pdf)).map((page) => page.text).join('\n'))
}
const picture = (width: number, height: number) =>
  sharp({ create: { width, height, channels: 3, background: '#7a5c3e' } })

describe('makeRecipeSheet', () => {
  it('is made for either paper, with its pages counted', async () => {
    const { setup } = await put(SETUP)
    // A4 is 210 × 297 mm (ISO 216), Letter 8.5 × 11 inches; a point is 1/72 inch.
    const sizes = { A4: [595.28, 841.89], Letter: [612, 792] } as const
    for (const paper of ['A4', 'Letter'] as const) {
      const { pdf, fileName } = await make(setup.id, { paper })
      expect(fileName).toBe('Clockmaker at the great gear.recipe.pdf')
      const pages = await readPdf(pdf)
      pages.forEach((page, index) => {
        expect(page.widthPt).toBeCloseTo(sizes[paper][0], 1)
        expect(page.heightPt).toBeCloseTo(sizes[paper][1], 1)
        expect(page.text).toContain(`${index + 1} of ${pages.length}`)
      })
    }
  })

  it('holds the numbers that the screen shows', async () => {
    const made = await put(SETUP)
    const text = await textOf((await make(made.setup.id)).pdf)
    const reading = readSetup(made)
    for (const one of made.lights) expect(text).toContain(powerLabel(one.power))
    for (const one of reading.lights) {
      expect(text).toContain(fNumberLabel(one.fNumber))
      if (one.underMainStops !== null) expect(text).toContain(stopsLabel(-one.underMainStops))
    }
    expect(text).toContain(ratioLabel(reading.ratio?.value ?? NaN))
    expect(text).toContain(fNumberLabel(reading.totalFNumber))
    expect(text).toContain(`${Math.round(reading.main?.elevationDeg ?? NaN)}° above`)
    for (const caution of cautionsOf(made)) {
      expect(text).toContain(flat(caution.title))
      expect(text).toContain(flat(caution.words))
    }
    expect(text).toContain(flat(SHEET_DEFERS))
  })

  it('says what is needed to build it again', async () => {
    const { setup } = await put(SETUP)
    const text = await textOf((await make(setup.id)).pdf)
    for (const words of [
      'Clockmaker at the great gear',
      'Salt and Linen',
      'Begin with the room dark.',
      '1 December 2026',
      '85 mm · f/8 · 1/160 · ISO 100 · 5500 K',
      '4 × Small flash',
      '1 × Boom arm',
      '1.2 m left, 1.2 m to the camera',
      '2.05 m up',
      '45° camera left',
      '50 mm zoom',
      '10° grid, half blue −68',
      'on the wall, 1.4 m up',
      'at the eyes',
      '1/8 + ⅓',
      'White panel',
    ])
      expect(text).toContain(words)
    expect(text).toMatch(/plan 1 : \d+, when printed at full size/)
  })

  it('says lengths in feet and inches when asked: 1.2 m is 3 ft 11 in, 2.05 m 6 ft 8½ in', async () => {
    const { setup } = await put(SETUP)
    const text = await textOf((await make(setup.id, { unit: 'ft' })).pdf)
    expect(text).toContain('3′ 11″ left')
    expect(text).toContain('6′ 8½″ up')
    expect(text).not.toMatch(/\d m (left|up)/)
  })

  it('dates by the zone of the shoot', async () => {
    const { setup } = await put(SETUP)
    const twoHoursMs = 2 * 3_600_000
    app.clock.advanceMs(twoHoursMs)
    const { pdf } = await make(setup.id).finally(() => app.clock.advanceMs(-twoHoursMs))
    expect(await textOf(pdf)).toContain('2 December 2026')
  })

  it('prints test frames with their captions', async () => {
    const { setup } = await put(SETUP)
    const frames = [
      await picture(240, 300).png().toBuffer(),
      await picture(240, 300).webp().toBuffer(),
      await picture(300, 240).jpeg().toBuffer(),
    ]
    const { pdf } = await make(setup.id, { captions: ['Main alone', 'With the fill', 'All of them'], frames })
    const text = await textOf(pdf)
    for (const caption of ['Main alone', 'With the fill', 'All of them']) expect(text).toContain(caption)
    expect(pdf.toString('latin1').match(/\/Subtype \/Image/g)).toHaveLength(3)
  })

  it('refuses what is no picture, and says which', async () => {
    const { setup } = await put(SETUP)
    const good = await picture(24, 30).png().toBuffer()
    await expect(make(setup.id, { frames: [good, Buffer.from('<svg/>')] })).rejects.toMatchObject({
      code: 'UNSUPPORTED',
      message: expect.stringContaining('Picture 2'),
    })
    await expect(make(setup.id, { frames: [good.subarray(0, 40)] })).rejects.toMatchObject({ code: 'BAD_REQUEST' })
    const huge = await picture(5000, 5000).png().toBuffer()
    await expect(make(setup.id, { frames: [huge] })).rejects.toMatchObject({ code: 'BAD_REQUEST' })
  })

  it('prints any text, twelve lights, no light and no sitter', async () => {
    const name = 'שלום مرحبا 😀 漢字 Ωμέγα Жук \u202E\u0007 Ł'
    const twelve = whole({
      lights: Array.from({ length: 12 }, (_, index) =>
        light(100 + index, {
          purpose: index % 2 ? 'accent' : 'fill',
          at: [Math.sin(index) * 3, 1 + index / 6, Math.cos(index) * 3],
          aim: face,
          note: `${'long'.repeat(40)} ${'x '.repeat(60)}`,
        }),
      ),
    })
    const many = await put(twelve, name, '🧵'.repeat(50))
    const pages = await readPdf((await make(many.setup.id, { paper: 'Letter', unit: 'ft' })).pdf)
    const text = flat(pages.map((page) => page.text).join('\n'))
    expect(text).toContain('Ωμέγα Жук')
    expect(text).toContain('Accent 6')
    expect(text).not.toContain('\u0000')
    const none = await put({ ...whole({}), places: [] }, 'Empty')
    expect(await textOf((await make(none.setup.id)).pdf)).toContain('No light yet.')
  })

  it('does not know a setup that is gone, nor a stranger', async () => {
    const { setup } = await put(SETUP)
    await expect(make(`${setup.id.slice(0, -2)}00` as SetupId)).rejects.toMatchObject({ code: 'NOT_FOUND' })
    const asked = { shootId: world.shootId, setupId: setup.id, ...recipeSheetSchema.parse({ paper: 'A4', unit: 'm' }) }
    await expect(makeRecipeSheet(app.ctxOf(world.stranger), { ...asked, frames: [] })).rejects.toMatchObject({
      code: 'NOT_FOUND',
    })
  })
})

describe('requireSetup', () => {
  it('lets every role of the shoot through to a setup that is there', async () => {
    const { setup } = await put(SETUP)
    const asked = { shootId: world.shootId, setupId: setup.id }
    for (const actor of [world.photographer, world.stylist, world.client, world.crew])
      await expect(requireSetup(app.ctxOf(actor), asked)).resolves.toBeUndefined()
    await expect(requireSetup(app.ctxOf(world.studioMember), asked)).rejects.toMatchObject({ code: 'NOT_FOUND' })
    const gone = { ...asked, setupId: fromRecipe(toRecipe(SETUP), { newId: randomUUID }).setup.id }
    await expect(requireSetup(app.ctxOf(world.crew), gone)).rejects.toMatchObject({ code: 'NOT_FOUND' })
  })
})

describe('POST …/recipe-sheet', () => {
  const send = async (form: unknown, setupId: string) =>
    (await app.clientOf(world.crew)).send('POST', `/api/shoots/${world.shootId}/setups/${setupId}/recipe-sheet`, form)

  it('answers with a PDF to keep, under the name of the setup', async () => {
    const { setup } = await put(SETUP, 'Dome, ½ warm')
    const form = sheetForm({ captions: ['Main'] })
    form.append('frames', new Blob([new Uint8Array(await picture(24, 30).png().toBuffer())]), 'main.png')
    const answer = await send(form, setup.id)
    expect(answer.status).toBe(200)
    expect(answer.headers.get('content-type')).toBe('application/pdf')
    expect(answer.headers.get('content-disposition')).toContain('attachment; filename=')
    expect(answer.text.startsWith('%PDF-')).toBe(true)
  })

  it('refuses what does not fit with a sentence', async () => {
    const { setup } = await put(SETUP)
    expect(await send(sheetForm({ paper: 'A5' }), setup.id)).toMatchObject({ status: 400 })
    const noJson = new FormData()
    noJson.set('sheet', '{')
    expect(await send(noJson, setup.id)).toMatchObject({
      status: 400,
      body: { error: { code: 'BAD_REQUEST', issues: [{ path: 'sheet', message: 'this is not JSON' }] } },
    })
    const nine = sheetForm()
    for (let index = 0; index < 9; index++) nine.append('frames', new Blob(['x']), 'x.png')
    expect(await send(nine, setup.id)).toMatchObject({ status: 400, body: { error: { message: /At most 8/ } } })
    expect(await send({ paper: 'A4' }, setup.id)).toMatchObject({ status: 400 })
    expect(await send(sheetForm(), randomUUID())).toMatchObject({ status: 404 })
  })
})
