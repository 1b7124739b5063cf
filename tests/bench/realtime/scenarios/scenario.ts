import type { BenchDatabase } from '../database.ts'
import type { Target } from '../targets/target.ts'

export type Cell = string | number | null

/** What a scenario found out about one target. */
export type Finding = {
  /** Goes out as one line of JSON. */
  line: object
  /** Goes into the table, after the target's name. */
  rows: readonly (readonly Cell[])[]
  /** Whether it kept what Sconce promises; for others only of interest. */
  isGood: boolean
}

export type Bench = { database: BenchDatabase; say: (line: string) => void }

export type Scenario = {
  name: string
  /** Of the table that it shares with scenarios of the same title. */
  title: string
  head: readonly string[]
  /** Null where it makes no sense for this target. */
  run(target: Target, bench: Bench): Promise<Finding | null>
}
