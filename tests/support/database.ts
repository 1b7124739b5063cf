import { inject } from 'vitest'
import { cloneTemplate, type TestDatabase } from '#tests/support/template.ts'

/** A migrated, empty database of its own for one test file: make it in beforeAll, drop it in afterAll. */
export function createTestDatabase(): Promise<TestDatabase> {
  return cloneTemplate(inject('pgUrl'))
}
