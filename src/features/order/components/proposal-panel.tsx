import { ArrowRight } from 'lucide-react'
import { useMemo } from 'react'
import { Link } from 'react-router-dom'
import { clockLabel } from '#shared/domain/order/clock.ts'
import { type OrderComparison, type OrderFigures, compareOrders } from '#shared/domain/order/compare.ts'
import type { OrderProblem } from '#shared/domain/order/problem.ts'
import { type Proposal, isBetter } from '#shared/domain/order/propose.ts'
import { type RuleKey, ruleWords } from '#shared/domain/order/rules.ts'
import { schedule } from '#shared/domain/order/schedule.ts'
import type { DaySchedule } from '#shared/domain/order/schedule-types.ts'
import { cn } from '#src/lib/cn.ts'
import { useShoot } from '#src/realtime/shoot-realtime.tsx'
import { Button } from '#src/ui/button.tsx'
import { Caution } from '#src/ui/caution.tsx'
import { Waiting } from '#src/ui/waiting.tsx'
import type { AskedProposal } from '../use-proposal.ts'
import { keptWords, proposalTitle, provenWords } from '../words.ts'
import { Panel } from '#src/ui/panel.tsx'
import { ProposalStrip } from './proposal-strip.tsx'

export type ProposalPanelProps = {
  asked: AskedProposal
  /** The day as it stands now; the plan may have changed since it was asked for. */
  problem: OrderProblem
  onUse: (proposal: Proposal, comparison: OrderComparison) => void
  onOpenShot: (shotId: string) => void
  onOpenDay: () => void
}

/** What a better order would save, beside the order as it stands. */
export function ProposalPanel({ asked, problem, onUse, onOpenShot, onOpenDay }: ProposalPanelProps) {
  const { state } = asked
  const isStale = useMemo(
    () => state !== null && state.problem !== problem && JSON.stringify(state.problem) !== JSON.stringify(problem),
    [state, problem],
  )
  if (!state) return null
  if (state.kind === 'failed') {
    return (
      <Panel className="w-[26.25rem] max-lg:w-[21rem]" title="No order was found" onClose={asked.close}>
        <p>The search stopped before it could answer. Your order stands as it was.</p>
        <Button onClick={() => asked.ask(problem)}>Propose again</Button>
      </Panel>
    )
  }
  if (state.kind === 'asking') {
    return (
      <Panel className="w-[26.25rem] max-lg:w-[21rem]" title="Looking for a shorter day" onClose={asked.close}>
        <Waiting label="Trying orders" className="!py-8" />
        <Button onClick={asked.stop}>Cancel</Button>
      </Panel>
    )
  }
  const proposal = state.kind === 'found' ? state.proposal : state.soFar
  return (
    <Found
      asked={asked}
      problem={state.problem}
      present={problem}
      proposal={proposal}
      thinking={state.kind === 'thinking' ? state.share : null}
      isStale={isStale}
      onUse={onUse}
      onOpenShot={onOpenShot}
      onOpenDay={onOpenDay}
    />
  )
}

type FoundProps = Omit<ProposalPanelProps, 'asked'> & {
  asked: AskedProposal
  present: OrderProblem
  proposal: Proposal
  /** How much of the search is done; null once it is over. */
  thinking: number | null
  isStale: boolean
}

/** High enough for twenty minutes to carry their words on a long day. */
const STRIP_PX = 400

function Found({ asked, problem, present, proposal, thinking, isStale, onUse, onOpenShot, onOpenDay }: FoundProps) {
  const { before, after, comparison, better } = useMemo(() => {
    const first = schedule(
      problem,
      problem.shots.map(({ id }) => id),
    )
    const second = schedule(problem, proposal.sequence)
    return {
      before: first,
      after: second,
      comparison: compareOrders(problem, first, second),
      better: isBetter(problem, proposal),
    }
  }, [problem, proposal])
  const title =
    thinking === null
      ? proposalTitle(comparison, better, proposal.proven)
      : better
        ? 'A shorter day, so far'
        : 'Looking for a shorter day'
  const footer = (
    <>
      <Button variant={better ? 'quiet' : 'plain'} onClick={asked.close}>
        Leave it
      </Button>
      {better && (
        <Button variant="primary" disabled={isStale} className="flex-1" onClick={() => onUse(proposal, comparison)}>
          Use this order
        </Button>
      )}
    </>
  )
  return (
    <Panel
      className="w-[26.25rem] max-lg:w-[21rem]"
      title={title}
      onClose={asked.close}
      footer={
        thinking === null ? (
          footer
        ) : (
          <Thinking share={thinking} onCancel={asked.close} onStop={better ? asked.stop : null} />
        )
      }
    >
      <p className=" text-xs text-ink-soft">{keptWords(problem, comparison)}</p>
      {isStale && (
        <Caution title="The plan has changed since this was worked out">
          <Button size="small" className="mt-1.5" onClick={() => asked.ask(present)}>
            Propose again
          </Button>
        </Caution>
      )}
      {thinking === null && !better ? (
        <p>
          The day as it stands spends {whole(comparison.present.changingMin)} minutes changing over and wraps at{' '}
          {clockLabel(comparison.present.wrapMin)}. Leave it as it is.
        </p>
      ) : (
        <SideBySide problem={problem} before={before} after={after} comparison={comparison} />
      )}
      {thinking === null && (
        <>
          <Broken
            proposal={proposal}
            problem={problem}
            comparison={comparison}
            onOpenShot={onOpenShot}
            onOpenDay={onOpenDay}
          />
          <p className="text-xs text-ink-soft">{provenWords(proposal)}</p>
        </>
      )}
    </Panel>
  )
}

type SideBySideProps = { problem: OrderProblem; before: DaySchedule; after: DaySchedule; comparison: OrderComparison }

/** The figures and the strips of both orders. */
function SideBySide({ problem, before, after, comparison }: SideBySideProps) {
  const span = Math.max(before.wrapMin, after.wrapMin) - problem.lightsOnMin
  const pxPerMin = Math.min(0.98, STRIP_PX / Math.max(1, span))
  return (
    <>
      <div className="grid grid-cols-[1fr_auto_1fr] items-baseline gap-x-3">
        <span className="label-small">As it stands</span>
        <ArrowRight size={14} aria-hidden className="self-center text-ink-faint" />
        <span className="label-small">Proposed</span>
        <span className="font-display text-3xl font-semibold">{whole(comparison.present.changingMin)}</span>
        <span />
        <span
          className={cn(
            'font-display text-3xl font-semibold',
            comparison.proposed.changingMin < comparison.present.changingMin && 'text-bottle',
          )}
        >
          {whole(comparison.proposed.changingMin)}
        </span>
        <span className="col-span-3 pt-1 text-xs text-ink-soft">
          minutes spent changing over, the first rigging included
        </span>
      </div>
      <div className="grid grid-cols-[1fr_1fr] gap-x-8">
        <ProposalStrip label="The day as it stands" problem={problem} day={before} pxPerMin={pxPerMin} />
        <ProposalStrip label="The day as proposed" problem={problem} day={after} pxPerMin={pxPerMin} />
      </div>
      <Table comparison={comparison} />
    </>
  )
}

function Thinking({ share, onCancel, onStop }: { share: number; onCancel: () => void; onStop: (() => void) | null }) {
  return (
    <div role="status" className="flex flex-1 flex-col gap-2">
      <p className="text-sm">Still looking for a better one…</p>
      <progress aria-label="Search" max={1} value={share} className="h-1.5 w-full accent-glow" />
      <div className="flex gap-2">
        <Button onClick={onCancel}>Cancel</Button>
        {onStop && (
          <Button variant="quiet" onClick={onStop}>
            Stop here and keep this one
          </Button>
        )}
      </div>
    </div>
  )
}

function whole(minutes: number): number {
  return Math.ceil(minutes - 1e-9)
}

type Row = { label: string; of: (figures: OrderFigures) => number; shown?: (value: number) => string; always?: boolean }

const ROWS: readonly Row[] = [
  { label: 'Lighting changes', of: (figures) => figures.lightingChanges, always: true },
  { label: 'Room moves', of: (figures) => figures.roomMoves, always: true },
  { label: 'Wardrobe changes on the clock', of: (figures) => figures.wardrobeOnClock, always: true },
  { label: 'Waiting for a fixed time, min', of: (figures) => whole(figures.heldMin) },
  { label: 'Shots after the hard out', of: (figures) => figures.notMade },
  { label: 'Rules broken', of: (figures) => figures.broken.length },
  { label: 'Wrap', of: (figures) => figures.wrapMin, shown: clockLabel, always: true },
]

function Table({ comparison: { present, proposed, moved } }: { comparison: OrderComparison }) {
  return (
    <table className="w-full text-sm">
      <thead className="sr-only">
        <tr>
          <th>Figure</th>
          <th>As it stands</th>
          <th>Proposed</th>
        </tr>
      </thead>
      <tbody>
        {ROWS.filter(({ of, always }) => always || of(present) > 0 || of(proposed) > 0).map(
          ({ label, of, shown = String }) => (
            <tr key={label} className="border-t border-hair-soft">
              <th scope="row" className="py-1.5 text-left font-normal">
                {label}
              </th>
              <td className="w-14 text-right">{shown(of(present))}</td>
              <td
                className={cn(
                  'w-14 text-right',
                  of(proposed) < of(present)
                    ? 'font-semibold text-bottle'
                    : of(proposed) > of(present) && 'font-semibold text-glow-ink',
                )}
              >
                {shown(of(proposed))}
              </td>
            </tr>
          ),
        )}
        <tr className="border-t border-hair-soft">
          <th scope="row" className="py-1.5 text-left font-normal">
            Shots moved
          </th>
          <td />
          <td className="w-14 text-right">{moved}</td>
        </tr>
      </tbody>
    </table>
  )
}

type BrokenProps = Pick<FoundProps, 'proposal' | 'problem' | 'onOpenShot' | 'onOpenDay'> & {
  comparison: OrderComparison
}

/** Rules that no order can keep together, each with a way to what it is about. */
function Broken({ proposal, problem, comparison, onOpenShot, onOpenDay }: BrokenProps) {
  const { conflict } = proposal
  const keys = conflict?.keys ?? comparison.proposed.broken
  if (keys.length === 0) return null
  const title = conflict
    ? conflict.minimal
      ? 'These rules contradict one another: without any one of them the others can be kept'
      : 'Among these rules some contradict one another'
    : 'This order still breaks'
  return (
    <Caution title={title}>
      <ul className="mt-1">
        {keys.map((key) => (
          <li key={key} className="flex items-center gap-2 py-0.5">
            <span className="min-w-0 flex-1">{ruleWords(problem, key)}</span>
            <OpenRule ruleKey={key} problem={problem} onOpenShot={onOpenShot} onOpenDay={onOpenDay} />
          </li>
        ))}
      </ul>
    </Caution>
  )
}

type OpenRuleProps = {
  ruleKey: RuleKey
  problem: OrderProblem
  onOpenShot: (shotId: string) => void
  onOpenDay: () => void
}

function OpenRule({ ruleKey, problem, onOpenShot, onOpenDay }: OpenRuleProps) {
  const shoot = useShoot()
  const name = `Open: ${ruleWords(problem, ruleKey)}`
  if (ruleKey === 'meal') {
    return (
      <Button size="small" aria-label={name} onClick={onOpenDay}>
        Open
      </Button>
    )
  }
  const rule = problem.rules.find((one) => ruleKey === `rule:${one.ruleId}`)
  const shot = rule && problem.shots[rule.kind === 'together' ? (rule.shots[0] ?? 0) : rule.shot]
  if (shot) {
    return (
      <Button size="small" aria-label={name} onClick={() => onOpenShot(shot.id)}>
        Open
      </Button>
    )
  }
  return (
    <Link to={`/shoots/${shoot.id}/looks`} aria-label={name} className="underline underline-offset-2">
      Open
    </Link>
  )
}
