import type { Role } from '#shared/access/roles.ts'

export type DemoPerson = { name: string; email: string; password: string; role: Role }

/** Signs in anywhere the demo is; printed at start, good for nothing else. */
const PASSWORD = 'hilltop-lantern'

export const DEMO_PEOPLE: readonly DemoPerson[] = [
  { name: 'Ines Marlow', email: 'ines@example.com', password: PASSWORD, role: 'photographer' },
  { name: 'Soren Okafor', email: 'soren@example.com', password: PASSWORD, role: 'stylist' },
  { name: 'Clara Whitlock', email: 'clara@example.com', password: PASSWORD, role: 'client' },
  { name: 'Tomas Reyne', email: 'tomas@example.com', password: PASSWORD, role: 'crew' },
]
