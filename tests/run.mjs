import { spawn, spawnSync } from 'node:child_process'
import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import process from 'node:process'
import { ensureBuilt } from '../lib/cli/build.mjs'
import { ensureInstalled, needNode } from '../lib/cli/install.mjs'
import { ROOT } from '../lib/cli/root.mjs'

/*
 * npm test: installs what is missing and runs every check. The last line is `N passed, N failed`: tests are counted
 * one by one, every other check as one. Plain JavaScript, since it runs before any package is there.
 */
needNode()
ensureInstalled()
process.chdir(ROOT)

const scratch = mkdtempSync(path.join(tmpdir(), 'checks-'))
const bin = (name) => path.join(ROOT, 'node_modules/.bin', name)
const results = []

/** Runs a command and gives its exit code; shows what it says at once, or only if it fails. */
function run(command, args, { quiet = false, env = {} } = {}) {
  return new Promise((resolve) => {
    const child = spawn(command, args, {
      stdio: quiet ? ['ignore', 'pipe', 'pipe'] : ['ignore', 'inherit', 'inherit'],
      env: { ...process.env, NEXT_TELEMETRY_DISABLED: '1', ...env },
    })
    let said = ''
    child.stdout?.on('data', (text) => (said += text))
    child.stderr?.on('data', (text) => (said += text))
    child.on('error', (error) => resolve({ code: 1, said: error.message }))
    child.on('close', (code) => resolve({ code: code ?? 1, said }))
  })
}

function record(name, passed, failed, started) {
  results.push({ name, passed, failed, seconds: (Date.now() - started) / 1000 })
}

/** A check that passes or fails as a whole. */
async function check(name, command, args) {
  const started = Date.now()
  const { code, said } = await run(command, args, { quiet: true })
  console.log(`${code === 0 ? 'passed' : 'FAILED'}  ${name}`)
  if (code !== 0) console.log(said)
  record(name, code === 0 ? 1 : 0, code === 0 ? 0 : 1, started)
}

/** A test run that leaves a report in JSON. Without a report, or with a failure outside any test, it failed. */
async function tests(name, command, args, report, env, countOf) {
  console.log(`\n${name}`)
  const started = Date.now()
  const { code } = await run(command, args, { env })
  const { passed, failed } = existsSync(report)
    ? countOf(JSON.parse(readFileSync(report, 'utf8')))
    : { passed: 0, failed: 0 }
  record(name, passed, code !== 0 && failed === 0 ? 1 : failed, started)
}

/** Finds Chromium, or gets Debian's where this is allowed; gives a sentence where there is none. */
function findChromium() {
  const asked = process.env.CHROMIUM ?? '/usr/bin/chromium'
  if (existsSync(asked)) return { chromium: asked }
  if (process.getuid?.() === 0 && spawnSync('apt-get', ['--version']).status === 0) {
    console.log('\nInstalling Chromium (apt-get install chromium) …')
    spawnSync('apt-get', ['update'], { stdio: 'inherit' })
    const options = { stdio: 'inherit', env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' } }
    spawnSync('apt-get', ['install', '--yes', '--no-install-recommends', 'chromium'], options)
    if (existsSync(asked)) return { chromium: asked }
  }
  const missing =
    `The browser tests need Chromium, which is not at ${asked} and could not be installed from here. ` +
    'On Debian: sudo apt-get install chromium. Elsewhere set CHROMIUM to where it is.'
  return { missing }
}

// What a fresh machine does first: it fails where package.json and package-lock.json do not belong together.
await check('lock file', 'npm', ['ci', '--dry-run', '--no-audit', '--no-fund'])
// next typegen writes the types of routes, which the compiler needs; the rest is cheap enough to follow.
await check('types of routes', bin('next'), ['typegen'])
await Promise.all([
  check('types', bin('tsc'), ['--noEmit']),
  check('lint', bin('eslint'), ['.', '--max-warnings', '0']),
])
await check('format', bin('prettier'), ['--check', '.'])

const unitReport = path.join(scratch, 'unit.json')
await tests(
  'unit and reference tests',
  bin('vitest'),
  ['run', '--reporter=dot', '--reporter=json', `--outputFile.json=${unitReport}`],
  unitReport,
  {},
  (report) => ({ passed: report.numPassedTests, failed: report.numTotalTests - report.numPassedTests }),
)

console.log()
const buildStarted = Date.now()
const built = ensureBuilt()
record('build', built ? 1 : 0, built ? 0 : 1, buildStarted)

const { chromium, missing } = findChromium()
if (!built || missing) {
  console.log(`\nbrowser tests: not run. ${missing ?? 'There is no build to run them against.'}`)
  record('browser tests', 0, 1, Date.now())
} else {
  const browserReport = path.join(scratch, 'browser.json')
  await tests(
    'browser tests',
    bin('playwright'),
    ['test', '--config', 'tests/e2e/playwright.config.ts', '--reporter=list,json'],
    browserReport,
    { PLAYWRIGHT_JSON_OUTPUT_NAME: browserReport, CHROMIUM: chromium },
    ({ stats, errors }) => ({
      passed: stats.expected,
      failed: stats.unexpected + stats.flaky + stats.skipped + (stats.unexpected === 0 ? errors.length : 0),
    }),
  )
}

rmSync(scratch, { recursive: true })
const total = (key) => results.reduce((sum, result) => sum + result[key], 0)
console.log()
for (const { name, passed, failed, seconds } of results) {
  console.log(`${name}: ${passed} passed, ${failed} failed, ${seconds.toFixed(0)} s`)
}
console.log(`${total('passed')} passed, ${total('failed')} failed`)
process.exitCode = total('failed') === 0 ? 0 : 1
