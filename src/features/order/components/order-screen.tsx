import { DndContext } from '@dnd-kit/core'
import { SortableContext } from '@dnd-kit/sortable'
import { Redo2, Undo2 } from 'lucide-react'
import { type ReactNode, useState } from 'react'
import { LOOSE } from '#shared/domain/board/schema.ts'
import { clockLabel } from '#shared/domain/order/clock.ts'
import type { OrderComparison } from '#shared/domain/order/compare.ts'
import type { Proposal } from '#shared/domain/order/propose.ts'
import type { Plan } from '#shared/domain/plan/read-plan.ts'
import { Button, IconButton } from '#src/ui/button.tsx'
import { Empty } from '#src/ui/empty.tsx'
import { type ScreenAction, ScreenBar } from '#src/ui/screen-bar.tsx'
import { toast } from '#src/ui/toast.ts'
import { useIsPhone } from '#src/ui/use-media.ts'
import { type OrderDay, useOrderDay } from '../use-order-day.ts'
import { type List, type OrderWriter, useOrderWriter } from '../use-order-writer.ts'
import { useProposal } from '../use-proposal.ts'
import { useSorting } from '../use-sorting.ts'
import { useUndoKeys } from '#src/realtime/use-undo-keys.ts'
import { dayName, usedWords } from '../words.ts'
import { AddShotDialog } from './add-shot-dialog.tsx'
import { BrokenRules } from './broken-rules.tsx'
import { DayRail } from './day-rail.tsx'
import { DaySettings } from './day-settings.tsx'
import { LooseShots } from './loose-shots.tsx'
import { PhoneList } from './phone-list.tsx'
import { ProposalPanel } from './proposal-panel.tsx'
import { SetsSheet } from './sets-sheet.tsx'
import { ShotPanel } from './shot-panel.tsx'

type Opened = 'day' | 'sets' | 'add' | null

/** The day to scale, its order, and a better one on request. */
export function OrderScreen() {
  const { plan, shown, choose } = useOrderDay()
  const writer = useOrderWriter()
  const asked = useProposal()
  const isPhone = useIsPhone()
  const [openShotId, setOpenShotId] = useState<string | null>(null)
  const [opened, setOpened] = useState<Opened>(null)
  useUndoKeys(writer.undo)
  const lists = listsOf(plan)
  const list = lists.find(({ id }) => id === shown?.planned.day.id)
  const openShot = openShotId === null ? undefined : plan.shots.get(openShotId)
  const open = (shotId: string) => {
    asked.close()
    setOpenShotId(shotId)
  }
  const close = () => setOpened(null)

  const actions: ScreenAction[] = [
    ...(writer.mayBoard && list
      ? [{ label: 'Add a shot', variant: 'quiet' as const, onPress: () => setOpened('add') }]
      : []),
    { label: 'Sets and rooms', variant: 'quiet', onPress: () => setOpened('sets') },
    ...(shown ? [{ label: 'Day', onPress: () => setOpened('day') }] : []),
    ...(isPhone && writer.mayBoard
      ? [
          { label: 'Undo', disabled: !writer.undo.canUndo, onPress: writer.undo.undo },
          { label: 'Redo', disabled: !writer.undo.canRedo, onPress: writer.undo.redo },
        ]
      : []),
    ...(writer.mayBoard && shown && shown.planned.shots.length > 1
      ? [
          {
            label: 'Propose an order',
            variant: 'primary' as const,
            onPress: () => {
              setOpenShotId(null)
              asked.ask(shown.problem)
            },
          },
        ]
      : []),
  ]

  const use = (proposal: Proposal, comparison: OrderComparison) => {
    if (!list) return
    const before = list.shots.map(({ shot }) => shot.id)
    writer.use(list.id, proposal.sequence)
    asked.close()
    toast.say(usedWords(comparison), { label: 'Undo', onPress: () => writer.use(list.id, before) })
  }

  return (
    <div className="flex min-h-full flex-col md:h-full">
      <ScreenBar
        title="Running order"
        sub={shown && <Sub shown={shown} />}
        actions={actions}
        {...(writer.mayBoard && !isPhone ? { children: <UndoButtons writer={writer} /> } : {})}
      />
      <div className="flex min-h-0 flex-1">
        <div className="min-w-0 flex-1 overflow-x-hidden md:overflow-y-auto">
          <div className="flex flex-col gap-4 px-3 pt-3 pb-8 md:px-6 md:pt-0">
            {plan.days.length > 1 && (
              <nav aria-label="Days" className="flex flex-wrap gap-2">
                {plan.days.map((planned, index) => (
                  <Button
                    key={planned.day.id}
                    size="small"
                    variant={index === shown?.index ? 'plain' : 'quiet'}
                    aria-pressed={index === shown?.index}
                    onClick={() => choose(planned.day.id)}
                  >
                    {dayName(planned, index)}
                  </Button>
                ))}
              </nav>
            )}
            {shown && list ? (
              <Shown
                plan={plan}
                shown={shown}
                list={list}
                writer={writer}
                chosenId={openShotId}
                onOpen={open}
                onAdd={() => setOpened('add')}
              />
            ) : (
              <Empty
                title="There is no day yet"
                action={writer.mayPlan && <Button onClick={() => choose(writer.addDay(undefined))}>Add a day</Button>}
              >
                A day has its hours, a meal and people who can move lights. Its shots stand here in the order in which
                they are made.
              </Empty>
            )}
            <LooseShots
              shots={plan.loose}
              mayPlace={writer.mayBoard && list !== undefined}
              onOpen={open}
              onPlace={({ shot }) => {
                if (list) writer.placeAtEnd(list, shot.id)
              }}
            />
          </div>
        </div>
        {shown && asked.state && (
          <ProposalPanel
            asked={asked}
            problem={shown.problem}
            onUse={use}
            onOpenShot={open}
            onOpenDay={() => setOpened('day')}
          />
        )}
        {shown && openShot && !asked.state && (
          <ShotPanel
            key={openShot.shot.id}
            planned={openShot}
            plan={plan}
            shown={shown}
            lists={lists}
            writer={writer}
            onClose={() => setOpenShotId(null)}
            onOpen={open}
            onSets={() => setOpened('sets')}
          />
        )}
      </div>
      {opened === 'add' && list && (
        <AddShotDialog
          onClose={close}
          onAdd={(title) => {
            close()
            open(writer.addShot(list, title))
          }}
        />
      )}
      {opened === 'day' && shown && (
        <DaySettings
          key={shown.planned.day.id}
          planned={shown.planned}
          index={shown.index}
          days={plan.days.length}
          writer={writer}
          onClose={close}
          onAdded={choose}
        />
      )}
      {opened === 'sets' && <SetsSheet plan={plan} writer={writer} onClose={close} />}
    </div>
  )
}

function listsOf(plan: Plan): List[] {
  return [...plan.days.map(({ day, shots }) => ({ id: String(day.id), shots })), { id: LOOSE, shots: plan.loose }]
}

type ShownProps = {
  plan: Plan
  shown: OrderDay
  list: List
  writer: OrderWriter
  chosenId: string | null
  onOpen: (shotId: string) => void
  onAdd: () => void
}

function Shown({ plan, shown, list, writer, chosenId, onOpen, onAdd }: ShownProps): ReactNode {
  const isPhone = useIsPhone()
  const sorting = useSorting(list.shots, (shotId, index) => writer.move(list, shotId, index))
  if (list.shots.length === 0) {
    return (
      <Empty
        title="Nothing is planned for this day yet"
        action={writer.mayBoard && <Button onClick={onAdd}>Add the first shot</Button>}
      >
        A shot is one picture to make: where, in which light, who wears what, and how long it takes. Sconce works out
        the times and what changes in between.
      </Empty>
    )
  }
  const common = { plan, shown, mayMove: writer.mayBoard, dropLine: sorting.dropLine, onOpen }
  return (
    <>
      <BrokenRules shown={shown} onOpen={onOpen} />
      <DndContext {...sorting.context}>
        <SortableContext items={sorting.ids} strategy={stay}>
          {isPhone ? <PhoneList {...common} /> : <DayRail {...common} chosenId={chosenId} />}
        </SortableContext>
      </DndContext>
    </>
  )
}

/** The others stay where they are while one is moved: their times are what one orders by. A line shows where it goes. */
const stay = () => null

function Sub({ shown: { day } }: { shown: OrderDay }) {
  return day.shots.length === 0
    ? `Lights on ${clockLabel(day.lightsOnMin)}, hard out ${clockLabel(day.hardOutMin)}`
    : `Lights on ${clockLabel(day.lightsOnMin)} · wrap ${clockLabel(day.wrapMin)}, hard out ${clockLabel(day.hardOutMin)}`
}

function UndoButtons({ writer: { undo } }: { writer: OrderWriter }) {
  return (
    <span className="flex">
      <IconButton label="Undo" disabled={!undo.canUndo} onClick={undo.undo}>
        <Undo2 size={17} aria-hidden />
      </IconButton>
      <IconButton label="Redo" disabled={!undo.canRedo} onClick={undo.redo}>
        <Redo2 size={17} aria-hidden />
      </IconButton>
    </span>
  )
}
