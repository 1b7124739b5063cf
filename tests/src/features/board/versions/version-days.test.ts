import { describe, expect, it } from 'vitest'
import { type Version, versionSchema } from '#shared/api/versions.ts'
import { proposedName, versionDays } from '#src/features/board/versions/version-days.ts'

function version(n: number, atMs: number, name = `Version ${n}`): Version {
  const id = `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`
  return versionSchema.parse({ id, name, userId: 'u1', by: 'Ines Marlow', atMs, takingBack: null })
}

describe('versionDays', () => {
  it('leaves a short list whole, and has no group for an empty one', () => {
    const kept = [version(1, 5), version(2, 4)]
    expect(versionDays(kept, 'Europe/London')).toEqual([{ date: '', title: null, versions: kept }])
    expect(versionDays([], 'Europe/London')).toEqual([])
  })

  it("parts a long list at midnight of the shoot's zone", () => {
    // 23:30 and 00:30 in Oslo, which is two hours ahead of UTC in summer.
    const beforeMs = Date.UTC(2027, 6, 14, 21, 30)
    const afterMs = Date.UTC(2027, 6, 14, 22, 30)
    const kept = [...Array.from({ length: 8 }, (_, n) => version(n, afterMs)), version(9, beforeMs)]
    const sizes = (zone: string) => versionDays(kept, zone).map(({ title, versions }) => [title, versions.length])
    expect(sizes('Europe/Oslo')).toEqual([
      ['Thu 15 Jul', 8],
      ['Wed 14 Jul', 1],
    ])
    expect(sizes('UTC')).toEqual([['Wed 14 Jul', 9]])
  })
})

describe('proposedName', () => {
  it('is of the day, and counts on where it is taken', () => {
    const named = (...names: string[]) => names.map((name, n) => version(n, 0, name))
    expect(proposedName([], '2027-10-14')).toBe('Board of Thu 14 Oct')
    expect(proposedName(named('Board of Thu 14 Oct'), '2027-10-14')).toBe('Board of Thu 14 Oct, 2')
    expect(proposedName(named('Board of Thu 14 Oct, 2', 'Board of Thu 14 Oct'), '2027-10-14')).toBe(
      'Board of Thu 14 Oct, 3',
    )
  })
})
