import type { Quantiles } from '#server/realtime/recent.ts'
import type { RealtimeStats } from '#server/realtime/server.ts'

/** What the database says; undefined while it does not answer. */
export type DatabaseFigures = { quarantined: number; frozen: number }

export type ProcessFigures = {
  version: string
  uptimeMs: number
  residentBytes: number
  heapBytes: number
  loopDelayMs: Quantiles
}

export type Snapshot = { realtime: RealtimeStats; database: DatabaseFigures | undefined; process: ProcessFigures }

/** Values are in `unit`, time in seconds; null: not known now. `needsLook`: an operator should look into it. */
export type Figure = {
  name: string
  label: string
  unit: 'number' | 'seconds' | 'bytes'
  needsLook?: boolean
} & ({ kind: 'gauge' | 'counter'; value: number | null } | { kind: 'summary'; value: Quantiles })

export type FigureGroup = { title: string; figures: Figure[] }

/** Longer than the database ever takes while all is well. */
const LONG_WAIT_MS = 4_000

/** Every figure of the page and of the exposition, in the order they are shown. */
export function figuresOf({ realtime, database, process }: Snapshot): FigureGroup[] {
  return [
    {
      title: 'Documents',
      figures: [
        gauge('rooms', 'Documents in memory', realtime.rooms),
        gauge('connections', 'Open connections', realtime.connections),
        gauge('lagging_readers', 'Readers that lag behind', realtime.lagging),
        gauge('frozen_documents', 'Documents frozen by an operator', database?.frozen ?? null),
        gauge('other_instances', 'Other instances known', realtime.instances),
      ],
    },
    {
      title: 'Log',
      figures: [
        gauge('queued_entries', 'Changes waiting to be stored', realtime.queuedEntries),
        { ...gauge('queued', 'Size of the changes waiting', realtime.queuedBytes), unit: 'bytes' },
        {
          ...gauge('oldest_wait', 'Longest wait to be stored', realtime.oldestMs / 1000),
          unit: 'seconds',
          needsLook: realtime.oldestMs >= LONG_WAIT_MS,
        },
        counter('commits', 'Commits', realtime.commits),
        counter('rows', 'Rows written', realtime.rows),
        counter('failed_commits', 'Commits that failed and were tried again', realtime.failures),
        summary('commit', 'Time a commit takes', realtime.commitMs),
      ],
    },
    {
      title: 'Checks',
      figures: [
        { ...gauge('database_up', 'Database answers', database ? 1 : 0), needsLook: !database },
        lookWhenAny(gauge('quarantined_updates', 'Updates in quarantine', database?.quarantined ?? null)),
        lookWhenAny(gauge('flagged_documents', 'Documents with an unreadable piece', realtime.flagged)),
        counter('compactions', 'Compactions', realtime.compactions),
        lookWhenAny(counter('failed_compaction_checks', 'Compactions given up by their check', realtime.failedChecks)),
      ],
    },
    {
      title: 'Process',
      figures: [
        { ...gauge('uptime', 'Time since the start', process.uptimeMs / 1000), unit: 'seconds' },
        { ...gauge('resident_memory', 'Memory', process.residentBytes), unit: 'bytes' },
        { ...gauge('heap', 'Heap in use', process.heapBytes), unit: 'bytes' },
        summary('event_loop_delay', 'Delay of the event loop', process.loopDelayMs),
      ],
    },
  ]
}

type Scalar = Extract<Figure, { kind: 'gauge' | 'counter' }>

function gauge(name: string, label: string, value: number | null): Scalar {
  return { name, label, unit: 'number', kind: 'gauge', value }
}

function counter(name: string, label: string, value: number): Scalar {
  return { name, label, unit: 'number', kind: 'counter', value }
}

function summary(name: string, label: string, value: Quantiles): Figure {
  return { name, label, unit: 'seconds', kind: 'summary', value }
}

function lookWhenAny(figure: Scalar): Figure {
  return { ...figure, needsLook: (figure.value ?? 0) > 0 }
}
