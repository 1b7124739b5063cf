import { useSuspenseQuery } from '@tanstack/react-query'
import { type ReactNode, useState } from 'react'
import { useNavigate } from 'react-router-dom'
import type { ShootCard as Card } from '#shared/api/shoots.ts'
import { useUnsentByShoot } from '#src/realtime/use-unsent-by-shoot.ts'
import { Button } from '#src/ui/button.tsx'
import { Empty } from '#src/ui/empty.tsx'
import { Input } from '#src/ui/input.tsx'
import { ScreenBar } from '#src/ui/screen-bar.tsx'
import { shootQueries } from '../queries.ts'
import { PastShoots } from './past-shoots.tsx'
import { ShootCard } from './shoot-card.tsx'
import { StartShootDialog } from './start-shoot-dialog.tsx'

export type ShootsScreenProps = {
  userId: string
  /** Studios in which this person may start a shoot. */
  studios: readonly { id: string; name: string }[]
  /** Civil date of today, `YYYY-MM-DD`. */
  today: string
  /** What begins a studio, for people who have neither a studio nor a shoot. */
  nameStudio: ReactNode
}

const SEARCH_FROM = 6

export function ShootsScreen({ userId, studios, today, nameStudio }: ShootsScreenProps) {
  const { data } = useSuspenseQuery(shootQueries.list())
  const unsent = useUnsentByShoot(userId)
  const [isStarting, setIsStarting] = useState(false)
  const [sought, setSought] = useState('')
  const navigate = useNavigate()
  const mayStart = studios.length > 0
  const found = data.shoots.filter((shoot) => matches(shoot, sought))
  const coming = found.filter((shoot) => shoot.date === null || shoot.date >= today)
  const past = found.filter((shoot) => shoot.date !== null && shoot.date < today).reverse()
  return (
    <>
      <title>Shoots · Sconce</title>
      <ScreenBar
        title="Shoots"
        actions={mayStart ? [{ label: 'Start a shoot', variant: 'primary', onPress: () => setIsStarting(true) }] : []}
      >
        {data.shoots.length >= SEARCH_FROM && (
          <Input
            type="search"
            aria-label="Search the shoots"
            placeholder="Search"
            value={sought}
            onChange={(event) => setSought(event.target.value)}
            className="!w-52 max-md:!w-full"
          />
        )}
      </ScreenBar>
      <div className="px-4 pt-4 pb-10 md:px-6 md:pt-1.5">
        {data.shoots.length === 0 &&
          (mayStart ? (
            <Empty
              title="No shoot yet"
              action={
                <Button variant="primary" size="large" onClick={() => setIsStarting(true)}>
                  Start a shoot
                </Button>
              }
            >
              A shoot holds its brief, its board, the looks, the light and the day’s running order.
            </Empty>
          ) : (
            <>
              {nameStudio}
              <p className="mx-auto mt-4 max-w-xl text-sm text-ink-soft">
                Were you invited to a shoot? Then you need no studio: open the link in your letter, or ask the
                photographer to send it again.
              </p>
            </>
          ))}
        {data.shoots.length > 0 && found.length === 0 && (
          <Empty title="No shoot fits">Nothing has “{sought}” in its title or place.</Empty>
        )}
        {coming.length > 0 && (
          <div className="grid gap-4.5 md:grid-cols-2 xl:grid-cols-[1.35fr_1fr_1fr]">
            {coming.map((shoot, index) => (
              <ShootCard
                key={shoot.id}
                shoot={shoot}
                lead={index === 0}
                todayYear={today.slice(0, 4)}
                unsent={unsent[shoot.id]}
              />
            ))}
          </div>
        )}
        {past.length > 0 && <PastShoots shoots={past} unsent={unsent} />}
      </div>
      <StartShootDialog
        open={isStarting}
        onOpenChange={setIsStarting}
        studios={studios}
        onStarted={(id) => void navigate(`/shoots/${id}/brief`)}
      />
    </>
  )
}

function matches(shoot: Card, sought: string): boolean {
  const words = sought.trim().toLocaleLowerCase()
  return words === '' || `${shoot.title} ${shoot.place}`.toLocaleLowerCase().includes(words)
}
