import { ChevronLeft, ChevronRight } from 'lucide-react'
import { useRef, useState } from 'react'
import { useSearchParams } from 'react-router-dom'
import { canInShoot } from '#shared/access/roles.ts'
import { shotsOfLook } from '#shared/domain/looks/shots-of-look.ts'
import type { Plan } from '#shared/domain/plan/read-plan.ts'
import { count, shortInstant } from '#src/lib/format.ts'
import { useRole, useShootContext } from '#src/realtime/shoot-realtime.tsx'
import { usePlan } from '#src/realtime/use-plan.ts'
import { Button, IconButton } from '#src/ui/button.tsx'
import { Empty } from '#src/ui/empty.tsx'
import { ScreenBar } from '#src/ui/screen-bar.tsx'
import { Sheet } from '#src/ui/sheet.tsx'
import { toast } from '#src/ui/toast.ts'
import { useIsPhone } from '#src/ui/use-media.ts'
import { Waiting } from '#src/ui/waiting.tsx'
import { type LookStanding, useLookStandings } from '../use-look-standings.ts'
import { AnswerForm } from './answer-form.tsx'
import { LookList } from './look-list.tsx'
import { LookSheet } from './look-sheet.tsx'

/** One look at a time: the client answers, everybody else sees where it stands. */
export function SignOffScreen() {
  const { shoot, userId } = useShootContext()
  const role = useRole()
  const plan = usePlan()
  const { standings, isKnown, error } = useLookStandings()
  const [search, setSearch] = useSearchParams()
  const [isListing, setIsListing] = useState(false)
  const [begunAt, setBegunAt] = useState<string | null>(null)
  const isPhone = useIsPhone()
  const sheetOfLook = useRef<HTMLElement>(null)
  const looks = inShownOrder(standings, plan)
  const mayAnswer = canInShoot(role, 'sign-off.answer')

  if (!isKnown && error) throw error
  if (!isKnown) return <Waiting label="Fetching what was answered" />
  // Whoever is to answer begins where an answer is missing, and stays there when it is given.
  const asked = search.get('look') ?? begunAt ?? ''
  const chosen = standings.get(asked) ?? looks.find(({ state }) => state.kind !== 'signed off') ?? looks[0]
  if (chosen && begunAt === null) setBegunAt(chosen.planned.look.id)
  if (!chosen) {
    return (
      <>
        <ScreenBar title="Sign-off" />
        <Empty title="No looks to sign off yet">
          {mayAnswer
            ? 'The stylist is still putting them together. You will find each look here, with its pictures and pieces, as soon as it hangs.'
            : 'Hang a look first; it can be signed off here as soon as it is there.'}
        </Empty>
      </>
    )
  }

  const signedOff = looks.filter(({ state }) => state.kind === 'signed off').length
  const due = shoot.brief.signOffByMs === null ? '' : `by ${shortInstant(shoot.brief.signOffByMs, shoot.brief.zone)}`
  const at = looks.indexOf(chosen)
  const choose = (standing: LookStanding | undefined) =>
    standing && setSearch({ look: standing.planned.look.id }, { replace: true })
  const handleAnswered = (words: string) => {
    // The answer is seen on the look itself; the button that gave it is gone, and with it the focus.
    sheetOfLook.current?.focus({ preventScroll: true })
    const open = looks.find((standing) => standing !== chosen && standing.state.kind !== 'signed off')
    toast.say(
      open ? words : `${words} Every other look is signed off already.`,
      open && { label: `Next: ${open.planned.look.name}`, onPress: () => choose(open) },
    )
  }
  const copyLink = () => {
    const address = `${location.origin}/shoots/${shoot.id}/sign-off`
    const copied = navigator.clipboard?.writeText(address) ?? Promise.reject(new Error('no clipboard'))
    copied.then(
      () => toast.say('The link is copied. It opens for people who belong to this shoot.'),
      () => toast.say(`Copy this address: ${address}`),
    )
  }
  const sum = `${signedOff} of ${count(looks.length, 'look')} signed off`
  const list = (
    <LookList
      looks={looks}
      isYours={mayAnswer}
      chosen={chosen.planned.look.id}
      onChoose={(lookId) => {
        choose(standings.get(lookId))
        setIsListing(false)
      }}
    />
  )
  const sheet = (
    <LookSheet key={chosen.planned.look.id} ref={sheetOfLook} standing={chosen} plan={plan} userId={userId}>
      {mayAnswer ? (
        <AnswerForm shootId={shoot.id} userId={userId} standing={chosen} onAnswered={handleAnswered} />
      ) : (
        chosen.state.kind !== 'signed off' && (
          <p className="mt-3 text-sm text-ink-soft max-md:px-[18px] max-md:pb-6">
            The client answers here. Nobody signs off their own work.
          </p>
        )
      )}
    </LookSheet>
  )
  if (!isPhone) {
    return (
      <>
        <ScreenBar
          title="Sign-off"
          sub={`${sum}${due === '' ? '' : ` · ${mayAnswer ? 'for your answer' : 'due'} ${due}`}`}
          actions={
            canInShoot(role, 'sign-off.ask') ? [{ label: 'Copy the link for the client', onPress: copyLink }] : []
          }
        />
        <div className="grid max-w-6xl grid-cols-[13.125rem_minmax(0,1fr)] items-start gap-8 px-6 pt-2 pb-10">
          <nav aria-label="Looks">
            <h2 className="label-small mb-2 font-sans">Looks</h2>
            {list}
          </nav>
          {sheet}
        </div>
      </>
    )
  }
  return (
    <div className="flex min-h-full flex-col bg-paper">
      <header className="flex items-center gap-1 py-1 pr-1.5 pl-[18px]">
        <div className="min-w-0 flex-1 leading-tight">
          <h1 className="truncate text-lg">{shoot.brief.title}</h1>
          <p className="truncate text-[0.8125rem] text-ink-soft">
            {due === '' ? sum : `${signedOff} signed off · ${due}`}
          </p>
        </div>
        <IconButton label="Look before" disabled={at <= 0} onClick={() => choose(looks[at - 1])}>
          <ChevronLeft size={20} aria-hidden />
        </IconButton>
        <Button
          variant="quiet"
          className="!px-1"
          aria-label={`Look ${at + 1} of ${looks.length}: all looks`}
          onClick={() => setIsListing(true)}
        >
          {at + 1} of {looks.length}
        </Button>
        <IconButton label="Next look" disabled={at >= looks.length - 1} onClick={() => choose(looks[at + 1])}>
          <ChevronRight size={20} aria-hidden />
        </IconButton>
      </header>
      {sheet}
      <Sheet open={isListing} onOpenChange={setIsListing} title="Looks">
        <p className="mb-2 text-ink-soft">{sum}</p>
        {list}
      </Sheet>
    </div>
  )
}

/** As they are first photographed; looks in no shot come last. */
function inShownOrder(standings: ReadonlyMap<string, LookStanding>, plan: Plan): LookStanding[] {
  const first = ({ planned }: LookStanding) => shotsOfLook(plan, planned.look.id)[0]?.number ?? Infinity
  return [...standings.values()]
    .map((standing) => ({ standing, at: first(standing) }))
    .sort((a, b) => (a.at === b.at ? 0 : a.at - b.at))
    .map(({ standing }) => standing)
}
