import { uuidv4 } from 'lib0/random'

/** A random id; unlike `crypto.randomUUID` it also works on a page that came over plain http. */
export function newId(): string {
  return uuidv4()
}
