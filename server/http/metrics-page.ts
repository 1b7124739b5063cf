import type { Figure, FigureGroup } from './figures.ts'

/** Tokens of src/styles/app.css. The page stands by itself: it has to open when nothing else of the client does. */
const STYLE = `
:root{--ground:#edece9;--paper:#fbfaf8;--ink:#1f1c1a;--soft:#5f5a54;--hair:#cdc9c2;--hair-soft:#e6e3dd;--night:#151312;
--bone:#f3eee6;--glow:#c9711f;--glow-ink:#8f4a0c;--glow-lit:#f2a54a;--display:'Playfair Display',Georgia,serif}
body{margin:0;background:var(--ground);color:var(--ink);font:.875rem/1.45 'Instrument Sans',system-ui,sans-serif;
font-variant-numeric:lining-nums tabular-nums}
header{background:var(--night);color:var(--bone);padding:14px 24px;font:600 1.25rem/1.2 var(--display);display:flex;gap:12px;align-items:center}
header img{width:26px;height:26px}
main{max-width:1040px;margin:0 auto;padding:24px 24px 40px}
h1{font:600 1.6875rem/1.15 var(--display);margin:0 0 8px}
h2{font:600 1.0625rem/1.3 var(--display);margin:0;padding:12px 16px;border-bottom:1px solid var(--hair)}
p{margin:0 0 20px;color:var(--soft)}
.sum{color:var(--ink);margin-bottom:4px}
.groups{columns:2;column-gap:16px}
section{break-inside:avoid;margin-bottom:16px;background:var(--paper);border:1px solid var(--hair);border-radius:3px}
dl{margin:0}
dl div{display:flex;justify-content:space-between;gap:16px;padding:8px 16px}
dl div+div{border-top:1px solid var(--hair-soft)}
dt{flex:1 0 45%}
dd{margin:0;text-align:right;font-weight:600}
dd small{font-size:.84375rem;font-weight:400;color:var(--soft);display:block}
span{white-space:nowrap}
.look dt,.look dd{color:var(--glow-ink);font-weight:600}
.lamp{display:inline-block;width:18px;height:10px;margin-right:8px;border:1.5px solid var(--glow);border-radius:10px 10px 0 0;
background:linear-gradient(90deg,var(--glow-lit) 50%,transparent 50%)}
.lamp.lit{background:var(--glow-lit);box-shadow:0 -3px 7px 1px rgb(242 165 74/.75)}
@media(max-width:767.98px){body{font-size:.9375rem}header{padding:12px 16px}main{padding:20px 16px 32px}.groups{columns:1}}
`

export type PageOptions = { version: string; at: Date }

/** The operator's page: plain HTML, no script. */
export function metricsPage(groups: readonly FigureGroup[], { version, at }: PageOptions): string {
  const looks = groups.flatMap(({ figures }) => figures).filter((figure) => figure.needsLook).length
  const sum =
    looks === 0
      ? '<span class="lamp lit"></span>Nothing to look into.'
      : `<span class="lamp"></span>${looks} ${looks === 1 ? 'thing' : 'things'} to look into, marked by the same lamp below.`
  const time = at.toISOString()
  return `<!doctype html>
<html lang="en-GB">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>How Sconce is doing</title>
<link rel="icon" href="/mark.svg" type="image/svg+xml">
<style>${STYLE}</style>
</head>
<body>
<header><img src="/mark.svg" alt="">Sconce</header>
<main>
<h1>How Sconce is doing</h1>
<p class="sum">${sum}</p>
<p>Version ${escaped(version)}, at <time datetime="${time}">${time.slice(11, 19)} UTC</time>. Counts are since the start of this process.</p>
<div class="groups">
${groups.map(section).join('\n')}
</div>
</main>
</body>
</html>
`
}

function section({ title, figures }: FigureGroup): string {
  return `<section>\n<h2>${escaped(title)}</h2>\n<dl>\n${figures.map(row).join('\n')}\n</dl>\n</section>`
}

function row(figure: Figure): string {
  const [open, lamp] = figure.needsLook
    ? ['<div class="look">', '<span class="lamp" role="img" aria-label="To look into"></span>']
    : ['<div>', '']
  return `${open}<dt>${lamp}${escaped(figure.label)}</dt><dd>${shown(figure)}</dd></div>`
}

function shown(figure: Figure): string {
  if (figure.kind === 'summary') {
    const { p50, p95, p99, max } = figure.value
    if (max === 0) return 'nothing measured yet'
    const [half, most, nearlyAll, longest] = [p50, p95, p99, max].map((ms) => duration(ms / 1000))
    return `half within ${half}<small><span>95% within ${most},</span> <span>99% within ${nearlyAll},</span> <span>longest ${longest}</span></small>`
  }
  if (figure.value === null) return 'not known'
  if (figure.name === 'database_up') return figure.value === 1 ? 'yes' : 'no'
  if (figure.unit === 'bytes') return bytes(figure.value)
  return figure.unit === 'seconds' ? duration(figure.value) : figure.value.toLocaleString('en-GB')
}

function duration(seconds: number): string {
  if (seconds < 1) return `${(seconds * 1000).toLocaleString('en-GB', { maximumFractionDigits: 1 })} ms`
  if (seconds < 60) return `${seconds.toLocaleString('en-GB', { maximumFractionDigits: 1 })} s`
  const minutes = Math.floor(seconds / 60)
  if (minutes < 60) return `${minutes} min ${Math.floor(seconds % 60)} s`
  const hours = Math.floor(minutes / 60)
  return hours < 24 ? `${hours} h ${minutes % 60} min` : `${Math.floor(hours / 24)} d ${hours % 24} h`
}

function bytes(count: number): string {
  if (count < 1024) return `${count} B`
  const [size, unit] = count < 1024 * 1024 ? [count / 1024, 'KiB'] : [count / 1024 / 1024, 'MiB']
  return `${size.toLocaleString('en-GB', { maximumFractionDigits: 1 })} ${unit}`
}

function escaped(text: string): string {
  return text.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;').replaceAll('"', '&quot;')
}
