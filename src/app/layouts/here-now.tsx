import { Link } from 'react-router-dom'
import { usePeers } from '#src/realtime/use-presence.ts'
import { Face } from '#src/ui/face.tsx'
import { useSession } from '../session.ts'

const SHOWN = 4

/** The faces of everybody who has the shoot open, one for each person, one's own first. */
export function HereNow() {
  const { user } = useSession()
  const peers = usePeers()
  const others = new Map(peers.map(({ presence }) => [presence.user.id, presence.user]))
  others.delete(user.id)
  const people = [
    { id: user.id, name: `${user.name} (you)`, initials: user.initials, colour: user.colour },
    ...others.values(),
  ]
  return (
    <div className="flex items-center gap-1.5">
      <Link to="/me" className="flex items-center rounded-full max-md:min-h-11" aria-label="You and this device">
        <Faces people={people.slice(0, SHOWN)} />
      </Link>
      <span className="ml-1 text-xs text-bone-soft">
        {people.length > SHOWN
          ? `+${people.length - SHOWN} · ${people.length} here`
          : people.length === 1
            ? 'Only you here'
            : `${people.length} here now`}
      </span>
    </div>
  )
}

function Faces({ people }: { people: readonly { id: string; name: string; initials: string; colour: string }[] }) {
  return people.map((person, index) => (
    <Face
      key={person.id}
      initials={person.initials}
      name={person.name}
      colour={person.colour}
      ring="night"
      className={index > 0 ? '-ml-2' : ''}
    />
  ))
}
