import { Link } from 'react-router-dom'
import type { ShootCard as Card } from '#shared/api/shoots.ts'
import { nextStep } from '#shared/domain/shoots/readiness.ts'
import { dateParts } from '#src/lib/format.ts'
import { pictureUrl } from '#src/lib/picture-url.ts'
import { roleName } from '#src/lib/role-words.ts'
import { cn } from '#src/lib/cn.ts'
import type { UnsentOfShoot } from '#src/realtime/use-unsent-by-shoot.ts'
import { Lamp, LampRow } from '#src/ui/lamp.tsx'
import { UnsentLine } from './unsent-line.tsx'

export type ShootCardProps = {
  shoot: Card
  /** Wider, with a larger first picture. */ lead: boolean
  todayYear: string
  unsent: UnsentOfShoot | undefined
}

/** A shoot on the studio's wall: three pictures, the date, how ready it is, and what comes next. */
export function ShootCard({ shoot, lead, todayYear, unsent }: ShootCardProps) {
  const next = nextStep(shoot.readiness)
  const date = shoot.date === null ? null : dateParts(shoot.date)
  const facts = [
    shoot.place || 'No place yet',
    shoot.shots === 0 ? 'no shots yet' : `${shoot.shots} ${shoot.shots === 1 ? 'shot' : 'shots'}`,
    roleName(shoot.role).toLowerCase(),
  ]
  return (
    <article className="group relative flex flex-col overflow-hidden rounded-r border border-hair bg-paper hover:border-edge">
      <CardPictures pictures={shoot.pictures} lead={lead} />
      <div className="flex gap-4 px-4 py-3.5">
        <div className="w-[58px] flex-none text-center">
          {date ? (
            <>
              <b className="block font-display text-[2.5rem] leading-none font-semibold">{date.day}</b>
              <span className="text-[0.78125rem] text-ink-soft">{date.rest}</span>
              {date.year !== todayYear && <span className="block text-xs text-ink-soft">{date.year}</span>}
            </>
          ) : (
            <>
              <b aria-hidden className="block font-display text-[2.5rem] leading-none font-semibold text-edge">
                –
              </b>
              <span className="text-[0.78125rem] text-ink-soft">no date</span>
            </>
          )}
        </div>
        <div className="min-w-0 flex-1">
          <h2 className="text-xl text-balance">
            <Link to={`/shoots/${shoot.id}`} className="after:absolute after:inset-0">
              {shoot.title}
            </Link>
          </h2>
          <p className="mt-0.5 text-xs text-ink-soft">{facts.join(' · ')}</p>
          <LampRow states={shoot.readiness.map(({ lamp }) => lamp)} className="mt-2.5 flex-wrap" />
          {unsent && <UnsentLine unsent={unsent} />}
        </div>
      </div>
      <p className="mt-auto flex items-center gap-2.5 border-t border-hair-soft px-4 py-2.5 text-sm">
        <Lamp state={next?.lamp ?? 'lit'} />
        {next?.why ?? 'Everything is ready'}
      </p>
    </article>
  )
}

function CardPictures({ pictures, lead }: { pictures: Card['pictures']; lead: boolean }) {
  const [first, second, third] = pictures
  if (first === undefined) {
    return (
      <div className="grid h-40 place-items-center bg-surround text-center text-sm text-ink-soft md:h-63">
        <span className="max-w-48">The wall is still bare: hang the first pictures on the board.</span>
      </div>
    )
  }
  const columns =
    third !== undefined ? 'grid-cols-[2fr_1fr_1fr]' : second !== undefined ? 'grid-cols-[2fr_1fr]' : 'grid-cols-1'
  return (
    <div className={cn('grid h-44 gap-[3px] bg-surround p-[3px] md:h-63', columns)}>
      {[first, second, third].map((id, index) =>
        id === undefined ? null : (
          <img
            key={id}
            src={pictureUrl(id, lead && index === 0 ? 960 : 320)}
            alt=""
            loading="lazy"
            decoding="async"
            className="size-full min-h-0 object-cover object-[50%_22%]"
          />
        ),
      )}
    </div>
  )
}
