import { ChevronLeft, List } from 'lucide-react'
import { useState } from 'react'
import { Link } from 'react-router-dom'
import type { ShotState } from '#shared/domain/day/schema.ts'
import { clockLabel } from '#shared/domain/order/clock.ts'
import type { ShotId } from '#shared/ids.ts'
import { useMayWrite, useShoot } from '#src/realtime/shoot-realtime.tsx'
import { SAVE_SIGNS } from '#src/realtime/save-state.ts'
import { useSaveState } from '#src/realtime/use-save-state.ts'
import { cn } from '#src/lib/cn.ts'
import { Button } from '#src/ui/button.tsx'
import { Lamp } from '#src/ui/lamp.tsx'
import { Sheet } from '#src/ui/sheet.tsx'
import { toast } from '#src/ui/toast.ts'
import { useIsPhone } from '#src/ui/use-media.ts'
import { type ShownDay, useDay } from '../use-day.ts'
import { adviceWords, saveWords } from '../words.ts'
import { tickId, useDayWriter } from '../write-day.ts'
import { ChangeList } from './change-list.tsx'
import { CurrentShot } from './current-shot.tsx'
import { NoteSheet, SkipSheet } from './day-sheets.tsx'
import { LongDayCaution } from './long-day-caution.tsx'
import { NextShot } from './next-shot.tsx'
import { NothingToFollow, Wrapped } from './not-shooting.tsx'
import { ShotList } from './shot-list.tsx'

export type DayScreenProps = {
  /** How what this person does is signed. */
  userName: string
}

/** The list that everyone follows: what is made now, what changes for it, what is next. A phone's screen first. */
export function DayScreen({ userName }: DayScreenProps) {
  const { day, days, choose } = useDay()
  return (
    <div className="on-night flex min-h-full flex-col bg-night text-bone">
      {day ? <TheDay day={day} userName={userName} /> : <NothingToFollow />}
      {days.length > 1 && (
        <nav aria-label="Days" className="mx-auto flex w-full max-w-2xl flex-wrap gap-2 px-[18px] pb-4">
          {days.map((one, index) => (
            <Button
              key={one.day.id}
              variant="night"
              aria-pressed={one.day.id === day?.planned.day.id}
              onClick={() => choose(one.day.id)}
            >
              Day {index + 1}
            </Button>
          ))}
        </nav>
      )}
    </div>
  )
}

type Asked = { kind: 'skip' | 'note'; shotId: ShotId } | { kind: 'list' } | null

function TheDay({ day, userName }: { day: ShownDay; userName: string }) {
  const isPhone = useIsPhone()
  const mayWrite = useMayWrite('day')
  const write = useDayWriter(userName)
  const [asked, setAsked] = useState<Asked>(null)
  const { progress, rows, dayShots, shotOf } = day
  const { current, next } = progress
  const shot = current ? shotOf(current.shotId) : undefined
  const nextShot = next ? shotOf(next.shotId) : undefined
  const titleOf = (id: ShotId) => `shot ${shotOf(id)?.number ?? ''}`
  const setState = (id: ShotId, state: ShotState, why?: string) => {
    const before = dayShots.get(id)?.event?.state ?? 'waiting'
    write.setState(id, state, why)
    const words = { got: 'got', skipped: 'skipped', 'under way': 'begun', waiting: 'back to waiting' }[state]
    toast.say(`Shot ${shotOf(id)?.number ?? ''} ${words}.`, {
      label: 'Undo',
      onPress: () => write.setState(id, before),
    })
  }
  const setFromList = (id: ShotId, state: ShotState) => {
    setState(id, state)
    // Begun from the list: what changes for it is what one wants to see.
    if (state === 'under way') setAsked(null)
  }
  const from = current?.changeover.fromShotId
  const list = (
    <ShotList
      lines={progress.lines}
      currentId={current?.shotId ?? null}
      shotOf={shotOf}
      noteOf={(id) => dayShots.get(id)?.frames ?? ''}
      onState={mayWrite ? setFromList : undefined}
    />
  )
  return (
    <>
      <DayTop day={day} onList={isPhone ? () => setAsked({ kind: 'list' }) : undefined} />
      <div className="mx-auto grid w-full max-w-6xl flex-1 content-start gap-x-10 px-[18px] md:grid-cols-[minmax(0,34rem)_minmax(0,1fr)] md:px-8 md:pt-2">
        <div className="flex flex-col gap-3 pb-5">
          {current && shot ? (
            <>
              <CurrentShot shot={shot} current={current} progress={progress} nowMin={day.nowMin} />
              <ChangeList
                title={from ? `What changes from shot ${shotOf(from)?.number ?? ''}` : 'What to rig'}
                rows={rows}
                isDone={(key) => day.ticks.get(tickId(current.shotId, key))?.done === true}
                onTick={mayWrite ? (key, done) => write.setTick(current.shotId, key, done) : undefined}
              />
              {next && nextShot && (
                <NextShot
                  shot={nextShot}
                  next={next}
                  expectedStartMin={
                    progress.lines.find(({ shotId }) => shotId === next.shotId)?.expectedStartMin ?? null
                  }
                />
              )}
            </>
          ) : (
            <Wrapped progress={progress} />
          )}
          {progress.advice && (
            <p className="border-t border-night-3 pt-3 text-[0.84375rem] text-bone-soft">
              {adviceWords(progress.advice, day.planned.day.hardOutMin, shotOf)}
            </p>
          )}
          <LongDayCaution day={day.planned} />
        </div>
        {!isPhone && (
          <aside aria-label="All shots" className="pb-6">
            <h2 className="mb-1 text-lg text-white">All shots</h2>
            {list}
          </aside>
        )}
      </div>
      {current && mayWrite && (
        <ActionBar
          isUnderWay={progress.isUnderWay}
          onSkip={() => setAsked({ kind: 'skip', shotId: current.shotId })}
          onNote={() => setAsked({ kind: 'note', shotId: current.shotId })}
          onStart={() => setState(current.shotId, 'under way')}
          onGot={() => setState(current.shotId, 'got')}
        />
      )}
      {asked?.kind === 'skip' && (
        <SkipSheet
          title={titleOf(asked.shotId)}
          onClose={() => setAsked(null)}
          onSkip={(why) => {
            setState(asked.shotId, 'skipped', why)
            setAsked(null)
          }}
        />
      )}
      {asked?.kind === 'note' && (
        <NoteSheet
          title={titleOf(asked.shotId)}
          note={dayShots.get(asked.shotId)?.note ?? ''}
          frames={dayShots.get(asked.shotId)?.frames ?? ''}
          onClose={() => setAsked(null)}
          onSave={(note, frames) => {
            write.setNote(asked.shotId, note, frames)
            setAsked(null)
          }}
        />
      )}
      <Sheet
        night
        open={asked?.kind === 'list'}
        onOpenChange={(open) => setAsked(open ? { kind: 'list' } : null)}
        title="All shots"
      >
        {list}
      </Sheet>
    </>
  )
}

function DayTop({ day, onList }: { day: ShownDay; onList?: (() => void) | undefined }) {
  const { id, brief } = useShoot()
  const save = useSaveState()
  const place = brief.location.name === '' ? brief.title : brief.location.name
  const { progress } = day
  return (
    <header className="mx-auto flex w-full max-w-6xl items-center gap-2 px-[18px] pt-2 text-[0.8125rem] text-bone-soft md:px-8 md:pt-5">
      <Link
        to={`/shoots/${id}/order`}
        className="-ml-2 flex min-h-11 items-center gap-1 rounded-r pr-2 text-bone-soft hover:text-bone md:hidden"
      >
        <ChevronLeft size={18} aria-hidden />
        <span className="sr-only">Back to the shoot: </span>
        {place}
      </Link>
      <span className="max-md:hidden">{place}</span>
      {day.nowMin !== null && <span aria-label="Now">· {clockLabel(day.nowMin)}</span>}
      {progress.wrapMin !== null && progress.current && (
        <span className="max-md:hidden">· wrap about {clockLabel(progress.wrapMin)}</span>
      )}
      <span className="flex-1" />
      <span role="status" className="flex items-center gap-1.5 text-right">
        <Lamp state={SAVE_SIGNS[save.kind].lamp} />
        {saveWords(save)}
      </span>
      {onList && (
        <button
          type="button"
          aria-label="All shots"
          onClick={onList}
          className="-mr-2 grid size-11 place-items-center rounded-r text-bone hover:bg-night-3"
        >
          <List size={20} aria-hidden />
        </button>
      )}
    </header>
  )
}

type ActionBarProps = {
  isUnderWay: boolean
  onSkip: () => void
  onNote: () => void
  onStart: () => void
  onGot: () => void
}

function ActionBar({ isUnderWay, onSkip, onNote, onStart, onGot }: ActionBarProps) {
  const side = 'flex-1 !min-h-[54px] !text-[1rem] !font-bold'
  return (
    <div className="sticky bottom-0 z-20 border-t border-night-3 bg-night-2 px-[18px] pt-3 pb-[max(1.25rem,env(safe-area-inset-bottom))]">
      <div className="mx-auto flex max-w-xl gap-2.5">
        <Button variant="night" className={side} onClick={onSkip}>
          Skip
        </Button>
        <Button variant="night" className={side} onClick={onNote}>
          Note
        </Button>
        <Button variant="glow" className={cn(side, 'flex-2')} onClick={isUnderWay ? onGot : onStart}>
          {isUnderWay ? 'Got it' : 'Start'}
        </Button>
      </div>
    </div>
  )
}
