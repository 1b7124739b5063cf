// @vitest-environment jsdom
import { describe, expect, it } from 'vitest'
import { areaIdSchema } from '#shared/ids.ts'
import { putItems } from '#shared/realtime/collection.ts'
import { areas } from '#shared/realtime/documents.ts'
import { startDrag, withContents } from '#src/features/board/gestures/drag-items.ts'
import { FRAME, NOTE, OTHER, testWall } from '#tests/src/features/board/support/wall.ts'

const AREA = areaIdSchema.parse('00000000-0000-4000-8000-00000000000a')

describe('startDrag', () => {
  it('writes nothing until the drop, then everything in one transaction and one undo step', () => {
    const wall = testWall()
    const before = wall.writes()
    const drag = startDrag(wall, [FRAME, NOTE])
    for (let step = 1; step <= 50; step++) drag.move(step, 2 * step, true)
    expect(wall.writes()).toBe(before)
    expect(wall.state.own.get(NOTE)).toEqual([50, 500, 200, 52])
    drag.drop()
    expect(wall.boxOf(FRAME)).toEqual([50, 100, 212, 286])
    expect(wall.writes()).toBe(before + 1)
    expect(wall.state.own.all().size).toBe(0)
    wall.undo()
    expect(wall.boxOf(FRAME)).toEqual([0, 0, 212, 286])
    expect(wall.boxOf(NOTE)).toEqual([0, 400, 200, 52])
  })

  it('snaps to a neighbour within six pixels and not when free', () => {
    const wall = testWall()
    const drag = startDrag(wall, [NOTE])
    drag.move(302, -380, false)
    expect(wall.state.own.get(NOTE)?.[0]).toBe(300)
    expect(wall.state.guides.get().length).toBeGreaterThan(0)
    drag.move(302, -380, true)
    expect(wall.state.own.get(NOTE)?.[0]).toBe(302)
  })

  it('brings to the front what is dropped over something', () => {
    const wall = testWall()
    const drag = startDrag(wall, [FRAME])
    drag.move(280, 10, true)
    drag.drop()
    expect(wall.items().get(FRAME)?.z).toBeGreaterThan(wall.items().get(NOTE)?.z ?? 0)
  })

  it('puts back what is cancelled', () => {
    const wall = testWall()
    const before = wall.writes()
    const drag = startDrag(wall, [FRAME])
    drag.move(40, 40, true)
    drag.cancel()
    expect(wall.writes()).toBe(before)
    expect(wall.state.own.all().size).toBe(0)
  })
})

describe('withContents', () => {
  it('takes along what hangs in an area', () => {
    const wall = testWall()
    putItems(wall.doc, areas, [{ id: AREA, box: [0, -40, 240, 24], title: 'What they wear' }], Math.random)
    expect(withContents(wall.items(), [AREA]).sort()).toEqual([AREA, FRAME, NOTE].sort())
    expect(withContents(wall.items(), [OTHER])).toEqual([OTHER])
  })
})
