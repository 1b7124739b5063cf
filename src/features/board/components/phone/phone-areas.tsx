import { useEffect, useRef } from 'react'
import { byArea } from '#shared/domain/board/reading-order.ts'
import { SwingTag } from '#src/ui/swing-tag.tsx'
import { useBoardPlan } from '../../board-plan.ts'
import { useStore } from '../../use-wall-state.ts'
import { useWall } from '../../wall-control.ts'
import type { WallItem, WallItems } from '../../wall-item.ts'
import { select } from '../../wall-state.ts'
import { nameOf } from '../../words.ts'
import { FramePicture } from '../frame-picture.tsx'
import { TagContent } from '../items/tag-card.tsx'

/** Half a phone's width, CSS pixels. */
const COLUMN_PX = 176

function Body({ entry }: { entry: WallItem }) {
  switch (entry.kind) {
    case 'frame': {
      const { picture, caption } = entry.item
      return (
        <div className="rounded-sm bg-print px-[5px] pt-[5px] shadow-print">
          <div style={{ aspectRatio: `${picture.widthPx} / ${Math.min(picture.heightPx, picture.widthPx * 1.5)}` }}>
            <FramePicture frame={entry.item} widthPx={COLUMN_PX} />
          </div>
          <p className="min-h-3 px-0.5 pt-[5px] pb-[7px] text-left text-[0.8125rem] leading-tight break-words">
            {caption}
          </p>
        </div>
      )
    }
    case 'note':
      return (
        <p className="px-1 py-1 text-left font-display text-[1.0625rem] leading-snug break-words whitespace-pre-wrap text-[#35302b] italic">
          {entry.item.text || 'A note without words'}
        </p>
      )
    case 'tag':
      return (
        <SwingTag className="text-left">
          <TagContent tag={entry.item} />
        </SwingTag>
      )
    case 'palette':
      return (
        <div className="text-left">
          <div className="flex h-12">
            {entry.item.colours.map((colour, index) => (
              <i key={index} className="flex-1" style={{ background: colour }} />
            ))}
          </div>
          <span className="text-[0.8125rem] text-ink-soft">{entry.item.title}</span>
        </div>
      )
    case 'area':
      return null
  }
}

/** Everything on the wall in two columns, area after area. A press opens it. */
export function PhoneAreas({ items, onOpen }: { items: WallItems; onOpen: () => void }) {
  const control = useWall()
  const plan = useBoardPlan()
  const list = useRef<HTMLDivElement>(null)
  const focused = useStore(control.state.focused)
  const shown = useRef(focused)
  // What has just been pinned hangs below everything else: it is brought into sight.
  useEffect(() => {
    if (focused === shown.current) return
    shown.current = focused
    if (focused !== null) list.current?.querySelector(`[data-hung="${focused}"]`)?.scrollIntoView({ block: 'center' })
  }, [focused])
  const all = [...items.values()]
  const groups = byArea(
    all.flatMap((entry) => (entry.kind === 'area' ? [entry] : [])),
    all.filter((entry) => entry.kind !== 'area'),
  )
  const open = (id: string) => {
    select(control.state, [id])
    onOpen()
  }
  return (
    <div ref={list} className="pb-24">
      {groups.map(({ area, items: hung }) => (
        <section
          key={area?.id ?? 'rest'}
          aria-label={area ? area.item.title || 'An area without title' : 'Outside of areas'}
        >
          {(area || groups.length > 1) && (
            <h2 className="flex items-center gap-2 px-3.5 pt-3 pb-1 font-sans text-sm font-semibold text-[#57524c] after:flex-1 after:border-t after:border-[#b5b1a9]">
              {area ? (
                <button type="button" className="min-h-8 rounded-r" onClick={() => open(area.id)}>
                  {area.item.title || 'An area without title'}
                </button>
              ) : (
                'Outside of areas'
              )}
            </h2>
          )}
          <div className="columns-2 gap-2.5 px-3.5 pt-1">
            {hung.map((entry) => (
              <button
                key={entry.id}
                type="button"
                data-hung={entry.id}
                aria-label={nameOf(entry, plan.looks)}
                className="mb-2.5 block w-full break-inside-avoid"
                onClick={() => open(entry.id)}
              >
                <Body entry={entry} />
              </button>
            ))}
          </div>
        </section>
      ))}
    </div>
  )
}
