import { readFileSync, readdirSync, writeFileSync } from 'node:fs'
import { availableParallelism } from 'node:os'
import { performance } from 'node:perf_hooks'
import { pause } from '#tests/realtime/support/client.ts'
import { round } from './stats.ts'

/** What processes use, from Linux' /proc. */

/** Of /proc's times; 100 on every Linux this runs on. */
const TICKS_PER_SECOND = 100
const QUIET_PERCENT = 10

/** The fields of /proc/PID/stat from the state on, or undefined when there is no such process. */
function statOf(pid: number): string[] | undefined {
  try {
    const text = readFileSync(`/proc/${pid}/stat`, 'utf8')
    return text.slice(text.lastIndexOf(')') + 2).split(' ')
  } catch {
    return undefined
  }
}

function treeOf(root: number): number[] {
  const children = new Map<number, number[]>()
  for (const name of readdirSync('/proc')) {
    if (!/^\d+$/.test(name)) continue
    const parent = Number(statOf(Number(name))?.[1])
    children.set(parent, [...(children.get(parent) ?? []), Number(name)])
  }
  const all = [root]
  for (const pid of all) all.push(...(children.get(pid) ?? []))
  return all
}

/** CPU seconds, user and system, that a process, its descendants and those of them that have ended have used so far. */
export function cpuSecondsOf(root: number): number {
  let ticks = 0
  for (const pid of treeOf(root)) {
    const stat = statOf(pid)
    if (stat) ticks += Number(stat[11]) + Number(stat[12]) + Number(stat[13]) + Number(stat[14])
  }
  return ticks / TICKS_PER_SECOND
}

/** CPU seconds of this process alone. */
export function ownCpuSeconds(): number {
  const { user, system } = process.cpuUsage()
  return (user + system) / 1e6
}

function busySeconds(): number {
  const [user = 0, nice = 0, system = 0, , , irq = 0, softirq = 0, steal = 0] = (
    readFileSync('/proc/stat', 'utf8').split('\n')[0] ?? ''
  )
    .trim()
    .split(/\s+/)
    .slice(1)
    .map(Number)
  return (user + nice + system + irq + softirq + steal) / TICKS_PER_SECOND
}

/** MiB of resident memory now, or at most since `resetPeak`. */
export function residentMiB(pid: number, which: 'now' | 'peak'): number {
  const field = which === 'now' ? 'VmRSS' : 'VmHWM'
  try {
    const status = readFileSync(`/proc/${pid}/status`, 'utf8')
    return round(Number(new RegExp(`${field}:\\s+(\\d+) kB`).exec(status)?.[1]) / 1024)
  } catch {
    return NaN
  }
}

/** Lets the peak count from now on; needs root, and stays as it is otherwise. */
export function resetPeak(pid: number): void {
  try {
    writeFileSync(`/proc/${pid}/clear_refs`, '5')
  } catch {
    // Not root: the peak since the start is reported.
  }
}

/**
 * Runs something and tells how much of the machine others used meanwhile, in percent of its cores. This process's
 * children, servers and database among them, are its own.
 */
export async function withForeignCpu<T>(run: () => Promise<T>): Promise<{ result: T; foreignCpuPercent: number }> {
  const [busy, own, startedMs] = [busySeconds(), cpuSecondsOf(process.pid), performance.now()]
  const result = await run()
  const foreign = busySeconds() - busy - (cpuSecondsOf(process.pid) - own)
  const available = (availableParallelism() * (performance.now() - startedMs)) / 1000
  return { result, foreignCpuPercent: round((100 * Math.max(0, foreign)) / available) }
}

/** Waits until others use little of the machine, for at most so many seconds. */
export async function untilQuiet(limitS: number): Promise<void> {
  for (let second = 0; second < limitS; second++) {
    const { foreignCpuPercent } = await withForeignCpu(() => pause(1_000))
    if (foreignCpuPercent < QUIET_PERCENT) return
  }
}
