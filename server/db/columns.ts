import { customType, timestamp } from 'drizzle-orm/pg-core'

/** PostgreSQL `bytea`. A row with one is never selected whole in a list: name the columns. */
export const bytea = customType<{ data: Uint8Array; driverData: Uint8Array }>({ dataType: () => 'bytea' })

/** An instant, always with its zone. */
export const instant = (name: string) => timestamp(name, { withTimezone: true, mode: 'date' })
