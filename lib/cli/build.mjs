import { spawnSync } from 'node:child_process'
import { createHash } from 'node:crypto'
import { existsSync, readdirSync, readFileSync, statSync, writeFileSync } from 'node:fs'
import path from 'node:path'
import process from 'node:process'
import { ROOT } from './root.mjs'

/** What the build is made from. */
const SOURCES = [
  'app',
  'components',
  'db',
  'lib',
  'public',
  'realtime',
  'instrumentation.ts',
  'next.config.ts',
  'package-lock.json',
  'postcss.config.mjs',
  'proxy.ts',
  'tailwind.config.ts',
  'tsconfig.json',
]
const STAMP = path.join(ROOT, '.next/sources.sha256')

function* filesIn(place) {
  const whole = path.join(ROOT, place)
  if (!existsSync(whole)) return
  if (statSync(whole).isFile()) yield place
  else for (const name of readdirSync(whole).sort()) yield* filesIn(path.join(place, name))
}

function hashOfSources() {
  const hash = createHash('sha256')
  for (const source of SOURCES) {
    for (const file of filesIn(source))
      hash
        .update(`${file}\0`)
        .update(readFileSync(path.join(ROOT, file)))
        .update('\0')
  }
  return hash.digest('hex')
}

/** Builds for production unless the build that is there was made from the same sources. Returns whether one is there. */
export function ensureBuilt() {
  const hash = hashOfSources()
  if (existsSync(path.join(ROOT, '.next/BUILD_ID')) && existsSync(STAMP) && readFileSync(STAMP, 'utf8') === hash)
    return true
  console.log('Building …')
  const { status } = spawnSync(process.execPath, [path.join(ROOT, 'node_modules/next/dist/bin/next'), 'build'], {
    cwd: ROOT,
    stdio: 'inherit',
    env: { ...process.env, NODE_ENV: 'production', NEXT_TELEMETRY_DISABLED: '1' },
  })
  if (status !== 0) return false
  writeFileSync(STAMP, hash)
  return true
}
