import { useQuery } from '@tanstack/react-query'
import { Suspense } from 'react'
import { Outlet, useLocation, useParams } from 'react-router-dom'
import { useTakeBackNotices } from '#src/features/board/versions/use-take-back-notices.ts'
import { shootQueries } from '#src/features/shoots/queries.ts'
import { ApiError } from '#src/lib/api.ts'
import { shortDate } from '#src/lib/format.ts'
import { useSettlePictures } from '#src/realtime/outbox/use-outbox.ts'
import { ShootRealtime, useClosed, useShoot } from '#src/realtime/shoot-realtime.tsx'
import { ScreenBarAside } from '#src/ui/screen-bar.tsx'
import { Waiting } from '#src/ui/waiting.tsx'
import { ErrorView, Trouble } from '../error-view.tsx'
import { sectionLabel, sectionsFor } from '../sections.ts'
import { useSession } from '../session.ts'
import { useReadiness } from '../use-readiness.ts'
import { Frame, Spine, SpineLink } from './frame.tsx'
import { HereNow } from './here-now.tsx'
import { LeftBehindCard, LeftBehindNotice } from './left-behind.tsx'
import { NotShown } from './not-shown.tsx'
import { OpeningShoot } from './opening-shoot.tsx'
import { SaveSign } from './save-sign.tsx'
import { ShootBottomBar } from './shoot-bottom-bar.tsx'
import { useSayWhere } from './use-say-where.ts'
import { closedWords, isShut } from './closed-words.ts'

/** Opens a shoot: its documents, its left column, who is here, what is saved. */
export function ShootLayout() {
  const { shootId = '' } = useParams()
  const { user } = useSession()
  const { data: shoot, error } = useQuery({
    ...shootQueries.detail(shootId),
    throwOnError: (failure, query) => query.state.data === undefined && !isGone(failure),
  })
  if (!shoot) {
    if (error === null) return <Waiting className="min-h-dvh" />
    return (
      <ErrorView error={error}>
        <LeftBehindCard shoot={{ id: shootId, title: 'Shoot' }} />
      </ErrorView>
    )
  }
  return (
    <ShootRealtime key={shoot.id} shoot={shoot} userId={user.id} waiting={<OpeningShoot title={shoot.brief.title} />}>
      <OpenShoot />
    </ShootRealtime>
  )
}

/** Not there, or not there for this person any more. */
function isGone(error: unknown): boolean {
  return error instanceof ApiError && error.code === 'NOT_FOUND'
}

function OpenShoot() {
  const shoot = useShoot()
  const closed = useClosed()
  const readiness = useReadiness()
  const { pathname } = useLocation()
  const sections = sectionsFor(shoot.role)
  const root = `/shoots/${shoot.id}`
  const here = pathname.slice(root.length + 1).split('/')[0] ?? ''
  useSayWhere(here)
  useSettlePictures()
  useTakeBackNotices()
  const lamps = new Map(readiness.map((section) => [section.section, section]))
  const label = sectionLabel(here)
  const trouble = closed === null ? null : closedWords(closed)
  if (trouble) {
    return (
      <Trouble {...trouble}>
        {isShut(closed) && <LeftBehindCard shoot={{ id: shoot.id, title: shoot.brief.title }} />}
      </Trouble>
    )
  }
  const where = [shoot.brief.date === null ? 'No date yet' : shortDate(shoot.brief.date), shoot.brief.location.name]
    .filter((part) => part.trim() !== '')
    .join(' · ')
  return (
    <Frame
      spine={
        <Spine
          label="Shoot"
          head={
            <>
              <b className="block font-display text-[1rem] leading-tight font-semibold text-balance">
                {shoot.brief.title}
              </b>
              <span className="text-xs text-bone-soft">{where}</span>
            </>
          }
          foot={
            <div className="flex flex-col gap-3">
              <NotShown className="text-xs leading-tight" />
              <SaveSign tone="night" />
              <HereNow />
            </div>
          }
        >
          {sections.working.map((link) => {
            const lamp = link.lamp === null ? undefined : lamps.get(link.lamp)
            return (
              <SpineLink
                key={link.path}
                to={`${root}/${link.path}`}
                {...(lamp ? { lamp: lamp.lamp, lampWhy: lamp.why } : {})}
              >
                {link.label}
              </SpineLink>
            )
          })}
          <div className="mt-3">
            {sections.beside.map((link) => (
              <SpineLink key={link.path} to={`${root}/${link.path}`}>
                {link.label}
              </SpineLink>
            ))}
          </div>
        </Spine>
      }
      // On the day a phone's foot is the bar with Got it.
      bottom={
        here === 'day' ? null : (
          <ShootBottomBar root={root} sections={sections} lamps={lamps} title={shoot.brief.title} where={where} />
        )
      }
    >
      <LeftBehindNotice />
      <title>{`${label === undefined ? '' : `${label} · `}${shoot.brief.title} · Sconce`}</title>
      <ScreenBarAside value={<SaveSign tone="paper" />}>
        <Suspense fallback={<Waiting />}>
          <Outlet />
        </Suspense>
      </ScreenBarAside>
    </Frame>
  )
}
