// @ts-check
import { spawn } from 'node:child_process'
import { existsSync, mkdtempSync, readFileSync, readdirSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { ensureBuilt } from '../server/start/build.mjs'
import { ensurePostgres } from '../server/start/cluster.mjs'
import { debianPackages, installDebianPackages } from '../server/start/debian.mjs'
import { checkNode, ensurePackages } from '../server/start/packages.mjs'
import { rootDir } from '../server/start/place.mjs'
import { Plain, pause, say, step, stopWithNpm, tail } from '../server/start/say.mjs'
import { removeLeftovers } from './support/leftovers.mjs'

// Every check and test, from a fresh clone. `--check` leaves out what needs a database or a browser; any other
// words are parts of the paths of the test files to run.

const CHROMIUM = '/usr/bin/chromium'

const args = process.argv.slice(2)
const isCheck = args.includes('--check')
const filters = args.filter((arg) => !arg.startsWith('--'))
const reports = mkdtempSync(join(tmpdir(), 'sconce-report-'))

/** @type {{ passed: number, failed: number }} */
const sum = { passed: 0, failed: 0 }

/** @type {Set<import('node:child_process').ChildProcess>} */
const children = new Set()
let isStopping = false

/**
 * Runs a tool of node_modules in a process group of its own, so that all of it can be stopped.
 *
 * @param {string} tool path below node_modules
 * @param {string[]} toolArgs
 * @param {{ isQuiet?: boolean, env?: Record<string, string> }} [options] quiet keeps the output for the caller
 * @returns {Promise<{ code: number, output: string }>}
 */
function runTool(tool, toolArgs, { isQuiet = false, env = {} } = {}) {
  return new Promise((resolve) => {
    const child = spawn(process.execPath, [join(rootDir, 'node_modules', tool), ...toolArgs], {
      cwd: rootDir,
      detached: true,
      env: { ...process.env, ...env },
      stdio: ['ignore', isQuiet ? 'pipe' : 'inherit', isQuiet ? 'pipe' : 'inherit'],
    })
    children.add(child)
    let output = ''
    child.stdout?.setEncoding('utf8').on('data', (text) => (output += text))
    child.stderr?.setEncoding('utf8').on('data', (text) => (output += text))
    child.on('error', (error) => resolve({ code: 127, output: error.message }))
    child.on('close', (code) => {
      children.delete(child)
      resolve({ code: code ?? 1, output })
    })
  })
}

/**
 * One check that passes or fails as a whole.
 *
 * @param {string} name
 * @param {() => Promise<{ code: number, output: string }>} work
 */
async function check(name, work) {
  if (isStopping) return
  const startedAtMs = performance.now()
  const { code, output } = await work()
  if (isStopping) return
  const tookS = ((performance.now() - startedAtMs) / 1000).toFixed(1)
  if (code === 0) sum.passed += 1
  else sum.failed += 1
  say(`${code === 0 ? 'ok    ' : 'FAILED'} ${name} (${tookS} s)${code === 0 ? '' : `\n${output.trimEnd()}\n`}`)
}

const cache = join(rootDir, 'node_modules/.cache/sconce')

async function types() {
  const results = []
  for (const tree of ['shared', 'server', 'src', 'tests']) {
    const incremental = ['--incremental', '--tsBuildInfoFile', join(cache, `${tree}.tsbuildinfo`)]
    results.push(await runTool('typescript/bin/tsc', ['-p', tree, ...incremental], { isQuiet: true }))
  }
  return { code: Math.max(...results.map(({ code }) => code)), output: results.map(({ output }) => output).join('') }
}

/** Remembered answers are by file, and a rule may look at the types of another: good between two edits, not for a verdict. */
const lintCache = isCheck ? ['--cache', '--cache-strategy', 'content', '--cache-location', join(cache, 'eslint')] : []
const lint = () =>
  runTool('eslint/bin/eslint.js', ['--config', 'tests/lint/eslint.config.js', ...lintCache, '.'], { isQuiet: true })
const format = () =>
  runTool('prettier/bin/prettier.cjs', ['--check', '--cache', '--cache-location', join(cache, 'prettier'), '.'], {
    isQuiet: true,
  })

/** The checks that need no database, in two lanes for two cores. */
async function checks() {
  const secondLane = async () => {
    await check('lint', lint)
    await check('format', format)
  }
  await Promise.all([check('types', types), secondLane()])
}

/** @param {string[]} vitestArgs */
async function vitest(vitestArgs) {
  if (isStopping) return
  const report = join(reports, 'vitest.json')
  const reporters = ['--reporter=default', '--reporter=json', `--outputFile.json=${report}`]
  const { code } = await runTool('vitest/vitest.mjs', ['run', ...reporters, ...vitestArgs])
  if (isStopping) return
  const { passed, failed } = existsSync(report)
    ? countVitest(JSON.parse(readFileSync(report, 'utf8')))
    : { passed: 0, failed: 0 }
  add(passed, failed, code)
}

/**
 * A file that could not even be loaded has no tests of its own to fail, and counts as one.
 *
 * @param {{ numPassedTests: number, numFailedTests: number, testResults: { status: string, assertionResults: { status: string }[] }[] }} report
 */
function countVitest({ numPassedTests, numFailedTests, testResults }) {
  const broken = testResults.filter(
    ({ status, assertionResults }) => status === 'failed' && !assertionResults.some((test) => test.status === 'failed'),
  )
  return { passed: numPassedTests, failed: numFailedTests + broken.length }
}

async function browser() {
  if (isStopping) return
  const report = join(reports, 'playwright.json')
  const config = ['test', '--config', 'tests/e2e/playwright.config.ts', '--reporter=list,json', ...filters]
  const { code } = await runTool('@playwright/test/cli.js', config, { env: { PLAYWRIGHT_JSON_OUTPUT_NAME: report } })
  if (isStopping) return
  const {
    expected = 0,
    unexpected = 0,
    flaky = 0,
  } = existsSync(report) ? JSON.parse(readFileSync(report, 'utf8')).stats : {}
  add(expected, unexpected + flaky, code)
}

/**
 * A runner that fails with no test to show for it (an unhandled error, a broken setup) is one failure.
 *
 * @param {number} passed
 * @param {number} failed
 * @param {number} exitCode
 */
function add(passed, failed, exitCode) {
  sum.passed += passed
  sum.failed += exitCode !== 0 && failed === 0 ? 1 : failed
}

/** @param {RegExp} pattern */
function testFiles(pattern) {
  const paths = readdirSync(join(rootDir, 'tests'), { recursive: true }).map((name) => `tests/${String(name)}`)
  return paths.filter(
    (path) => pattern.test(path) && (filters.length === 0 || filters.some((part) => path.includes(part))),
  )
}

async function everything() {
  const hasUnit = testFiles(/\.test\.tsx?$/).length > 0
  const hasBrowser = testFiles(/^tests\/e2e\/.*\.spec\.ts$/).length > 0
  if (!hasUnit && !hasBrowser)
    throw new Plain(`No test file has ${filters.map((part) => `"${part}"`).join(' or ')} in its path.`)
  await ensurePostgres()
  if (hasBrowser && !existsSync(CHROMIUM)) {
    await step("Installing Chromium from Debian's packages", () => installDebianPackages(debianPackages.chromium))
  }
  if (filters.length === 0) await checks()
  if (hasUnit) await vitest(filters)
  if (filters.length === 0 || hasBrowser) {
    await check('build', () =>
      ensureBuilt().then(
        () => ({ code: 0, output: '' }),
        (error) => ({ code: 1, output: error instanceof Error ? error.message : String(error) }),
      ),
    )
  }
  if (hasBrowser) await browser()
}

/** Leaves nothing running, whatever way the run ends. */
async function cleanUp() {
  const groups = [...children].flatMap(({ pid }) => pid ?? [])
  for (const child of children) child.kill('SIGINT')
  for (let tries = 0; tries < 50 && children.size > 0; tries += 1) await pause(200)
  for (const group of groups) {
    try {
      process.kill(-group, 'SIGKILL')
    } catch {
      // All of it has ended by itself.
    }
  }
  await removeLeftovers()
  rmSync(reports, { recursive: true, force: true })
}

function stopRun() {
  if (isStopping) return
  isStopping = true
  say('Stopping the tests and what they started …')
  void cleanUp().then(() => process.exit(1))
}

process.on('SIGINT', stopRun).on('SIGTERM', stopRun).on('SIGHUP', stopRun)
stopWithNpm(stopRun)

try {
  checkNode()
  await ensurePackages()
  if (isCheck) {
    await checks()
    await vitest(['--project', 'architecture'])
  } else {
    await everything()
  }
} catch (error) {
  sum.failed += 1
  if (!isStopping)
    say(error instanceof Plain ? error.message : tail(String(error instanceof Error ? error.stack : error)))
}
if (!isStopping) {
  await cleanUp()
  say(`\n${sum.passed} passed, ${sum.failed} failed`)
  process.exit(sum.failed === 0 && sum.passed > 0 ? 0 : 1)
}
