import { minutesLabel } from '#shared/domain/order/clock.ts'
import type { Changeover } from '#shared/domain/order/schedule-types.ts'
import type { PlannedShot } from '#shared/domain/plan/read-plan.ts'

/** The sign before a row: a light's letter, or W for wardrobe, S for a set, nothing for what has no letter. */
export type CardSign = { kind: 'group'; letter: string } | { kind: 'wardrobe' } | { kind: 'set' } | { kind: 'plain' }

/** One thing to do before the shot; `key` is the tick's, stable while the thing is the same. */
export type CardRow = { key: string; sign: CardSign; what: string; detail: string }

/** The crew's card: everything between the last shot and this one, in the order in which hands take it. */
export function cardRows(changeover: Changeover, shot: PlannedShot | undefined): CardRow[] {
  const { setMove, lighting, wardrobe } = changeover
  const rows: CardRow[] = []
  if (setMove) {
    const to = setMove.otherRoom && setMove.toRoomName !== '' ? setMove.toRoomName : setMove.toSetName
    const dress = setMove.dressMin > 0 ? minutesLabel(setMove.dressMin) : ''
    const isFirst = setMove.fromSetId === null
    const what = isFirst ? `Dress ${setMove.toSetName}` : `Move to ${to}`
    const parts = isFirst
      ? [dress]
      : [
          setMove.strikeMin > 0 ? `strike ${setMove.fromSetName}, ${minutesLabel(setMove.strikeMin)}` : '',
          dress === '' ? '' : `dress ${setMove.toSetName}, ${dress}`,
        ]
    const detail = parts.filter((part) => part !== '').join(' · ')
    rows.push({ key: `set:${setMove.toSetId ?? ''}`, sign: { kind: 'set' }, what, detail })
  }
  for (const action of lighting) {
    const sign: CardSign = action.group === null ? { kind: 'plain' } : { kind: 'group', letter: action.group }
    rows.push({ key: action.key, sign, what: action.what, detail: action.detail })
  }
  for (const change of wardrobe) {
    const planned = shot?.looks.find(({ look }) => look.id === change.lookId)
    const hair = planned?.look.hair ?? ''
    const detail = [
      change.sitterName,
      ...(change.chairMin > 0 ? [`${minutesLabel(change.chairMin)} in the chair`] : []),
      ...(hair === '' ? [] : [hair]),
    ]
    rows.push({
      key: `look:${change.lookId}`,
      sign: { kind: 'wardrobe' },
      what: change.lookName,
      detail: detail.join(' · '),
    })
  }
  return rows
}

/** What to know of the next shot now: whether lights stay, where it is, and who should be getting ready. */
export function nextWords(changeover: Changeover): string {
  const parts: string[] = []
  if (changeover.setMove?.otherRoom) parts.push(`Move to ${changeover.setMove.toRoomName}`)
  else if (changeover.setMove) parts.push(`On to ${changeover.setMove.toSetName}`)
  if (changeover.lighting.length === 0) parts.push('Lights stay')
  else if (changeover.lightingMin > 0) parts.push(`${minutesLabel(changeover.lightingMin)} of light`)
  for (const change of changeover.wardrobe) {
    parts.push(
      change.chairMin > 0 ? `${change.sitterName} in the chair now` : `${change.sitterName} into ${change.lookName}`,
    )
  }
  return parts.join(' · ')
}
