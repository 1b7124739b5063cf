import type { Quantiles } from '#server/realtime/recent.ts'
import type { Figure } from './figures.ts'

const PREFIX = 'sconce_'

export const TEXT_TYPE = 'text/plain; version=0.0.4; charset=utf-8'
export const OPEN_METRICS_TYPE = 'application/openmetrics-text; version=1.0.0; charset=utf-8'

/**
 * Figures in the text exposition format: OpenMetrics 1.0, or the older text format 0.0.4, where a counter's family has
 * the name of its sample. What is not known is left out.
 */
export function expositionOf(figures: readonly Figure[], version: string, format: 'openmetrics' | 'text'): string {
  const isOpenMetrics = format === 'openmetrics'
  const lines = figures.flatMap((figure) => {
    if (figure.value === null) return []
    const name = PREFIX + figure.name + (figure.unit === 'number' ? '' : `_${figure.unit}`)
    const sample = figure.kind === 'counter' ? `${name}_total` : name
    const family = isOpenMetrics ? name : sample
    return [
      `# HELP ${family} ${figure.label}`,
      `# TYPE ${family} ${figure.kind}`,
      ...(figure.kind === 'summary' ? quantileSamples(name, figure.value) : [`${sample} ${figure.value}`]),
    ]
  })
  const build = `${PREFIX}build${isOpenMetrics ? '' : '_info'}`
  lines.push(
    `# HELP ${build} Version running`,
    `# TYPE ${build} ${isOpenMetrics ? 'info' : 'gauge'}`,
    `${PREFIX}build_info{version="${escaped(version)}"} 1`,
  )
  if (isOpenMetrics) lines.push('# EOF')
  return `${lines.join('\n')}\n`
}

function quantileSamples(name: string, { p50, p95, p99, max }: Quantiles): string[] {
  const parts = [
    ['0.5', p50],
    ['0.95', p95],
    ['0.99', p99],
    ['1.0', max],
  ] as const
  return parts.map(([quantile, ms]) => `${name}{quantile="${quantile}"} ${ms / 1000}`)
}

function escaped(label: string): string {
  return label.replaceAll('\\', '\\\\').replaceAll('"', '\\"').replaceAll('\n', '\\n')
}
