/** Ids by name: the same name gives the same id within one demo shoot, so that content reads like a story. */
export type NamedIds = (name: string) => string

export function namedIds(randomId: () => string): NamedIds {
  const ids = new Map<string, string>()
  return (name) => {
    const id = ids.get(name) ?? randomId()
    ids.set(name, id)
    return id
  }
}
