import { Clapperboard, Lightbulb, ScrollText, UserRound, UsersRound } from 'lucide-react'
import { Suspense } from 'react'
import { Link, Outlet, useNavigate, useParams } from 'react-router-dom'
import type { Session } from '#shared/api/studios.ts'
import { Face } from '#src/ui/face.tsx'
import { Menu } from '#src/ui/menu.tsx'
import { Waiting } from '#src/ui/waiting.tsx'
import { useSession } from '../session.ts'
import { BottomBar, BottomLink, Frame, Spine, SpineLink } from './frame.tsx'

type Studio = Session['studios'][number]

/** The studio whose rooms are open: the address's, else the first one. */
function useStudio(studios: readonly Studio[]): Studio | undefined {
  const { studioId } = useParams()
  return studios.find((studio) => studio.id === studioId) ?? studios[0]
}

export function StudioLayout() {
  const { user, studios, letters } = useSession()
  const studio = useStudio(studios)
  return (
    <Frame
      spine={
        <Spine
          label="Studio"
          head={<StudioName studio={studio} studios={studios} name={user.name} />}
          foot={
            <Link to="/me" className="flex min-h-8 items-center gap-2.5 text-xs text-bone-soft hover:text-bone">
              <Face initials={user.initials} name={user.name} colour={user.colour} ring="night" />
              <span className="min-w-0 truncate">Signed in</span>
            </Link>
          }
        >
          <SpineLink to="/" end>
            Shoots
          </SpineLink>
          {studio && (
            <>
              <SpineLink to={`/studio/${studio.id}/kit`}>Kit room</SpineLink>
              <SpineLink to={`/studio/${studio.id}/recipes`}>Recipes</SpineLink>
              <SpineLink to={`/studio/${studio.id}/people`}>People</SpineLink>
            </>
          )}
          {letters && (
            <div className="mt-3">
              <SpineLink to="/letters">Letters</SpineLink>
            </div>
          )}
        </Spine>
      }
      bottom={
        <BottomBar label="Studio">
          <BottomLink to="/" end>
            <Clapperboard size={17} aria-hidden className="mx-auto mb-0.5" />
            Shoots
          </BottomLink>
          {studio && (
            <>
              <BottomLink to={`/studio/${studio.id}/kit`}>
                <Lightbulb size={17} aria-hidden className="mx-auto mb-0.5" />
                Kit room
              </BottomLink>
              <BottomLink to={`/studio/${studio.id}/recipes`}>
                <ScrollText size={17} aria-hidden className="mx-auto mb-0.5" />
                Recipes
              </BottomLink>
              <BottomLink to={`/studio/${studio.id}/people`}>
                <UsersRound size={17} aria-hidden className="mx-auto mb-0.5" />
                People
              </BottomLink>
            </>
          )}
          <BottomLink to="/me">
            <UserRound size={17} aria-hidden className="mx-auto mb-0.5" />
            You
          </BottomLink>
        </BottomBar>
      }
    >
      <Suspense fallback={<Waiting />}>
        <Outlet />
      </Suspense>
    </Frame>
  )
}

function StudioName({
  studio,
  studios,
  name,
}: {
  studio: Studio | undefined
  studios: readonly Studio[]
  name: string
}) {
  const navigate = useNavigate()
  if (!studio) return <b className="font-display text-[1rem] leading-tight font-semibold">{name}</b>
  const title = (
    <>
      <b className="block font-display text-[1rem] leading-tight font-semibold">{studio.name}</b>
      <span className="text-xs text-bone-soft">{studio.role === 'owner' ? 'Your studio' : 'You are a member'}</span>
    </>
  )
  if (studios.length < 2) return <div>{title}</div>
  return (
    <Menu
      align="start"
      trigger={
        <button type="button" className="w-full rounded-r text-left">
          {title}
          <span className="text-xs text-glow-lit"> · change</span>
        </button>
      }
      items={studios.map((other) => ({
        label: other.name,
        checked: other.id === studio.id,
        onSelect: () => void navigate(`/studio/${other.id}/kit`),
      }))}
    />
  )
}
