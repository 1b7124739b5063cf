import { useState } from 'react'
import { useLocation } from 'react-router-dom'
import type { Readiness, Section } from '#shared/domain/shoots/readiness.ts'
import { cn } from '#src/lib/cn.ts'
import { Sheet } from '#src/ui/sheet.tsx'
import type { SectionLink, Sections } from '../sections.ts'
import { BottomBar, BottomLink, SpineLink } from './frame.tsx'
import { HereNow } from './here-now.tsx'
import { NotShown } from './not-shown.tsx'
import { SaveStrip } from './save-sign.tsx'

export type ShootBottomBarProps = {
  root: string
  sections: Sections
  lamps: ReadonlyMap<Section, Readiness>
  title: string
  where: string
}

/** Four sections and the rest behind "More". */
export function ShootBottomBar({ root, sections, lamps, title, where }: ShootBottomBarProps) {
  const { pathname } = useLocation()
  const [openAt, setOpenAt] = useState<string | null>(null)
  // The sheet belongs to the screen it was opened on: following a link in it closes it.
  const isOpen = openAt === pathname
  const lampOf = (link: SectionLink) => (link.lamp === null ? undefined : lamps.get(link.lamp))
  const inMore = ![...sections.onPhone].some((link) => pathname.startsWith(`${root}/${link.path}`))
  return (
    <div>
      <NotShown className="bg-night-2 px-[18px] py-2 text-[0.8125rem] leading-tight" />
      <SaveStrip />
      <BottomBar label="Shoot">
        {sections.onPhone.map((link) => {
          const lamp = lampOf(link)
          return (
            <BottomLink key={link.path} to={`${root}/${link.path}`} {...(lamp ? { lamp: lamp.lamp } : {})}>
              {link.short}
            </BottomLink>
          )
        })}
        <button
          type="button"
          aria-expanded={isOpen}
          onClick={() => setOpenAt(pathname)}
          className={cn(inMore && 'text-white shadow-[inset_0_2px_0_var(--color-glow-lit)]')}
        >
          More
        </button>
      </BottomBar>
      <Sheet night title={title} open={isOpen} onOpenChange={(open) => setOpenAt(open ? pathname : null)}>
        <p className="-mt-1 text-sm text-bone-soft">{where}</p>
        <nav aria-label="All sections" className="-mx-5 mt-3 border-y border-night-3 py-1">
          {[...sections.working, ...sections.beside].map((link) => {
            const lamp = lampOf(link)
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
          <SpineLink to="/" end>
            All shoots
          </SpineLink>
          <SpineLink to="/me">You</SpineLink>
        </nav>
        <div className="pt-4">
          <HereNow />
        </div>
      </Sheet>
    </div>
  )
}
