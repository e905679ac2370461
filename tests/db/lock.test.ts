import { spawn } from 'node:child_process'
import type { ChildProcess } from 'node:child_process'
import { once } from 'node:events'
import { existsSync } from 'node:fs'
import { mkdtemp, readFile, rm, utimes, writeFile } from 'node:fs/promises'
import { hostname, tmpdir } from 'node:os'
import path from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { FolderInUse, lockFolder } from '@/db/lock'

const LOCK = new URL('../../db/lock.ts', import.meta.url).href

let folder: string
let children: ChildProcess[]
const file = () => path.join(folder, 'server.lock')

beforeEach(async () => {
  folder = await mkdtemp(path.join(tmpdir(), 'lock-'))
  children = []
})
afterEach(async () => {
  for (const child of children) child.kill('SIGKILL')
  await rm(folder, { recursive: true })
})

/** Another process that locks the folder and lives on until it is killed. */
async function otherProcess(): Promise<ChildProcess> {
  const script = `import { lockFolder } from ${JSON.stringify(LOCK)}
    await lockFolder(${JSON.stringify(folder)})
    console.log('locked')
    setInterval(() => {}, 1000)`
  const child = spawn(process.execPath, ['--import', 'tsx', '--input-type=module', '-e', script], {
    stdio: ['ignore', 'pipe', 'inherit'],
  })
  children.push(child)
  const [said] = (await once(child.stdout!, 'data')) as [Buffer]
  expect(said.toString()).toContain('locked')
  return child
}

const writeLock = (holder: object) => writeFile(file(), JSON.stringify({ token: 't', started: '', ...holder }))

describe('the lock of a data folder', () => {
  it('refuses a second process with a sentence that names the first', async () => {
    const child = await otherProcess()
    const refused = await lockFolder(folder).catch((error: unknown) => error)
    expect(refused).toBeInstanceOf(FolderInUse)
    expect((refused as Error).message).toContain(`process ${child.pid} on ${hostname()}`)
    expect((refused as Error).message).toContain('CHARGEHAND_DATA')
    expect(JSON.parse(await readFile(file(), 'utf8'))).toMatchObject({ pid: child.pid })
  })

  it('is taken over from a process that was killed', async () => {
    const child = await otherProcess()
    child.kill('SIGKILL')
    await once(child, 'exit')
    expect(existsSync(file())).toBe(true)
    await lockFolder(folder)
    expect(JSON.parse(await readFile(file(), 'utf8'))).toMatchObject({ pid: process.pid })
  })

  it('refuses the same process a second time, until it is released', async () => {
    const lock = await lockFolder(folder)
    await expect(lockFolder(folder)).rejects.toBeInstanceOf(FolderInUse)
    await lock.release()
    expect(existsSync(file())).toBe(false)
    await (await lockFolder(folder)).release()
  })

  it('is taken over when its pid now belongs to another process', async () => {
    await writeLock({ pid: process.pid, host: hostname(), started: 'another boot/1' })
    await expect(lockFolder(folder)).resolves.toBeDefined()
  })

  it('respects another host that touches its lock, and takes over from one that stopped', async () => {
    await writeLock({ pid: 1, host: 'elsewhere' })
    await expect(lockFolder(folder)).rejects.toThrow('process 1 on elsewhere')
    const longAgo = new Date(Date.now() - 60_000)
    await utimes(file(), longAgo, longAgo)
    await expect(lockFolder(folder)).resolves.toBeDefined()
  })

  it('is taken over when it cannot be read', async () => {
    await writeFile(file(), '{"pid":')
    await expect(lockFolder(folder)).resolves.toBeDefined()
  })

  it('goes to one of many that find it left behind', async () => {
    await writeLock({ pid: 2 ** 22 + 1, host: hostname() })
    const results = await Promise.allSettled(Array.from({ length: 8 }, () => lockFolder(folder)))
    expect(results.filter((result) => result.status === 'fulfilled')).toHaveLength(1)
  })

  it('does not take away a lock that is no longer its own', async () => {
    const lock = await lockFolder(folder)
    await writeLock({ pid: 1, host: 'elsewhere', token: 'another' })
    await lock.release()
    expect(existsSync(file())).toBe(true)
  })
})
