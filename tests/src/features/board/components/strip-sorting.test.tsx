// @vitest-environment jsdom
import { DndContext } from '@dnd-kit/core'
import { SortableContext, horizontalListSortingStrategy } from '@dnd-kit/sortable'
import { act, cleanup, fireEvent, render, screen, waitFor } from '@testing-library/react'
import { useMemo, useSyncExternalStore } from 'react'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { DEFAULT_MINUTES } from '#shared/domain/plan/minutes.ts'
import { type Plan, readPlan } from '#shared/domain/plan/read-plan.ts'
import { daySchema } from '#shared/domain/plan/schema.ts'
import { briefSchema } from '#shared/domain/shoots/schema.ts'
import { dayIdSchema, shotIdSchema } from '#shared/ids.ts'
import { putItems } from '#shared/realtime/collection.ts'
import { shots } from '#shared/realtime/documents.ts'
import { BoardPlanProvider, useBoardPlan } from '#src/features/board/board-plan.ts'
import { ShotCard } from '#src/features/board/components/strip/shot-card.tsx'
import { useStripSorting } from '#src/features/board/components/strip/use-strip-sorting.ts'
import { WallControlProvider } from '#src/features/board/wall-control.ts'
import { itemStore } from '#src/realtime/item-store.ts'
import { type TestWall, testWall } from '#tests/src/features/board/support/wall.ts'

const DAY = dayIdSchema.parse('00000000-0000-4000-8000-0000000000d1')
const idOf = (n: number) => shotIdSchema.parse(`00000000-0000-4000-8000-0000000001${String(n).padStart(2, '0')}`)

function planOf(wall: TestWall): Plan {
  const none = new Map<string, never>()
  return readPlan({
    brief: briefSchema.parse({
      title: 'Leaf, Brass & Star',
      zone: 'Europe/London',
      location: {},
      rooms: [],
      deliverables: [],
    }),
    minutes: DEFAULT_MINUTES,
    board: { frames: none, shots: itemStore(wall.doc, shots).get() },
    plan: {
      days: new Map([[String(DAY), daySchema.parse({ id: DAY })]]),
      sets: none,
      moves: none,
      shotPlans: none,
      rules: none,
    },
    looks: { sitters: none, looks: none, pieces: none },
    lighting: { setups: none, lights: none, sitterPlaces: none, props: none },
  })
}

const nameOfList = () => 'Day 1'

function Cards() {
  const { lists, context } = useStripSorting(nameOfList)
  const plan = useBoardPlan()
  const [list] = lists
  return (
    <DndContext {...context}>
      <SortableContext items={(list?.shots ?? []).map((shot) => shot.id)} strategy={horizontalListSortingStrategy}>
        <ol>
          {list?.shots.map((shot) => {
            const planned = plan.shots.get(shot.id)
            return (
              planned && (
                <ShotCard
                  key={shot.id}
                  planned={planned}
                  jointMin={null}
                  mayWrite
                  lists={lists}
                  nameOfList={nameOfList}
                />
              )
            )
          })}
        </ol>
      </SortableContext>
    </DndContext>
  )
}

function Board({ wall }: { wall: TestWall }) {
  const store = itemStore(wall.doc, shots)
  const items = useSyncExternalStore(store.subscribe, store.get)
  // eslint-disable-next-line react-hooks/exhaustive-deps -- the plan is read from the document, which the items stand for
  const plan = useMemo(() => planOf(wall), [wall, items])
  return (
    <WallControlProvider value={wall}>
      <BoardPlanProvider value={plan}>
        <Cards />
      </BoardPlanProvider>
    </WallControlProvider>
  )
}

/** jsdom lays nothing out: every card stands 164 px behind the one before. */
function layOut() {
  vi.spyOn(Element.prototype, 'getBoundingClientRect').mockImplementation(function (this: Element) {
    const card = this.closest('[data-shot-id]')
    const index = card?.parentElement ? [...card.parentElement.children].indexOf(card) : 0
    return new DOMRect(index * 164, 0, 112, 122)
  })
}

describe('useStripSorting', () => {
  let wall: TestWall
  beforeEach(() => {
    layOut()
    wall = testWall()
    putItems(
      wall.doc,
      shots,
      ['The Clockmaker, seated', 'Hands and movement', 'At the eyepiece'].map((title, n) => ({
        id: idOf(n + 1),
        title,
        place: [DAY, `a${n}`] as [string, string],
      })),
      Math.random,
    )
    render(<Board wall={wall} />)
  })
  afterEach(() => {
    cleanup()
    vi.restoreAllMocks()
  })

  const titles = () => [...document.querySelectorAll('[data-shot-id]')].map((card) => card.textContent)
  const key = async (code: string) => {
    fireEvent.keyDown(document.activeElement ?? document.body, { code, key: code })
    // The sensor listens and measures in later turns.
    await act(() => new Promise((resolve) => setTimeout(resolve, 30)))
  }

  it('moves a shot with Space, arrow, Space, says where it is, and writes once', async () => {
    expect(titles()).toEqual(['1The Clockmaker, seated', '2Hands and movement', '3At the eyepiece'])
    screen.getByRole('button', { name: 'Move shot 1 The Clockmaker, seated' }).focus()
    const before = wall.writes()
    await key('Space')
    expect(screen.getByRole('status').textContent).toBe('The Clockmaker, seated is at place 1 of 3.')
    await key('ArrowRight')
    expect(screen.getByRole('status').textContent).toBe('The Clockmaker, seated is at place 2 of 3.')
    expect(wall.writes()).toBe(before)
    await key('Space')
    await waitFor(() =>
      expect(titles()).toEqual(['1Hands and movement', '2The Clockmaker, seated', '3At the eyepiece']),
    )
    expect(wall.writes()).toBe(before + 1)
    expect(screen.getByRole('status').textContent).toBe('The Clockmaker, seated dropped at place 2 of 3.')
  })

  it('puts it back with Escape and writes nothing', async () => {
    screen.getByRole('button', { name: 'Move shot 3 At the eyepiece' }).focus()
    const before = wall.writes()
    await key('Space')
    await key('ArrowLeft')
    await key('Escape')
    expect(titles()).toEqual(['1The Clockmaker, seated', '2Hands and movement', '3At the eyepiece'])
    expect(wall.writes()).toBe(before)
    expect(screen.getByRole('status').textContent).toBe('At the eyepiece is back where it was.')
  })
})
