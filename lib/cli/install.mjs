import { spawnSync } from 'node:child_process'
import { existsSync, readFileSync } from 'node:fs'
import path from 'node:path'
import process from 'node:process'
import { ROOT } from './root.mjs'

/** Ends with a sentence where Node.js is too old for what is installed here. */
export function needNode() {
  const [major, minor] = process.versions.node.split('.').map(Number)
  if (major > 20 || (major === 20 && minor >= 9)) return
  console.error(`Chargehand needs Node.js 20.9 or newer; this is ${process.versions.node}.`)
  process.exit(1)
}

const packagesOf = (file) => JSON.parse(readFileSync(path.join(ROOT, file), 'utf8')).packages

/** Whether node_modules holds what package-lock.json asks for: npm keeps a list of what it installed. */
function isInstalled() {
  if (!existsSync(path.join(ROOT, 'node_modules/.package-lock.json'))) return false
  const wanted = packagesOf('package-lock.json')
  const there = packagesOf('node_modules/.package-lock.json')
  return Object.entries(wanted).every(
    // Optional ones are there for some systems and not for others.
    ([place, { version, optional }]) =>
      place === '' || (optional && !there[place]) || there[place]?.version === version,
  )
}

/** Installs the packages of package-lock.json unless they are there. */
export function ensureInstalled() {
  if (isInstalled()) return
  console.log('Installing packages (npm ci) …')
  const { status } = spawnSync('npm', ['ci', '--include=dev', '--no-audit', '--no-fund'], {
    cwd: ROOT,
    stdio: 'inherit',
    shell: process.platform === 'win32',
  })
  if (status !== 0) {
    console.error('The packages could not be installed: see what npm says above. Is a package registry within reach?')
    process.exit(1)
  }
}
