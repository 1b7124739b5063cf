import type * as Y from 'yjs'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { LOCAL_ORIGIN, patchItem, putItems, removeItems, upsertItem } from '#shared/realtime/collection.ts'
import { lights, props, setups, sitterPlaces } from '#shared/realtime/documents.ts'

/** Puts a setup with everything in it. */
export function putSetup(doc: Y.Doc, whole: WholeSetup): void {
  putItems(doc, setups, [whole.setup], Math.random)
  if (whole.lights.length > 0) putItems(doc, lights, whole.lights, Math.random)
  if (whole.places.length > 0) putItems(doc, sitterPlaces, whole.places, Math.random)
  if (whole.props.length > 0) putItems(doc, props, whole.props, Math.random)
}

/** Removes a setup with everything in it; shots that used it have none then. */
export function removeSetup(doc: Y.Doc, whole: WholeSetup): void {
  const nowMs = Date.now()
  const ids = (items: readonly { id: string }[]) => items.map((item) => item.id)
  removeItems(doc, lights, ids(whole.lights), nowMs)
  removeItems(doc, sitterPlaces, ids(whole.places), nowMs)
  removeItems(doc, props, ids(whole.props), nowMs)
  removeItems(doc, setups, [whole.setup.id], nowMs)
}

/** Brings back this removed setup, whatever has been done since. */
export function restoreSetup(doc: Y.Doc, whole: WholeSetup): void {
  upsertItem(doc, setups, whole.setup)
  for (const light of whole.lights) upsertItem(doc, lights, light)
  for (const place of whole.places) upsertItem(doc, sitterPlaces, place)
  for (const prop of whole.props) upsertItem(doc, props, prop)
}

/** An item's fields: its id is its place in the document, not one of them. */
function fieldsOf<Item extends { id: unknown }>(item: Item): Omit<Item, 'id'> {
  const { id: _id, ...fields } = item
  return fields
}

/** Writes the fields of this setup that differ from what is written, as one change; what has gone meanwhile stays gone. */
export function rewriteSetup(doc: Y.Doc, whole: WholeSetup): void {
  doc.transact(() => {
    patchItem(doc, setups, whole.setup.id, fieldsOf(whole.setup))
    for (const light of whole.lights) patchItem(doc, lights, light.id, fieldsOf(light))
    for (const place of whole.places) patchItem(doc, sitterPlaces, place.id, fieldsOf(place))
    for (const prop of whole.props) patchItem(doc, props, prop.id, fieldsOf(prop))
  }, LOCAL_ORIGIN)
}
