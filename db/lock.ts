import { randomUUID } from 'node:crypto'
import { readFileSync } from 'node:fs'
import { link, readFile, rename, rm, stat, utimes, writeFile } from 'node:fs/promises'
import { hostname } from 'node:os'
import path from 'node:path'
import { setTimeout as sleep } from 'node:timers/promises'
import { z } from 'zod'

/** How often the holder touches its lock, and after how long an untouched lock of another host counts as left behind. */
const TOUCH_ms = 5_000
const ABANDONED_ms = 30_000
/** Long enough for a rival that saw the same stale lock to have finished its own attempt. */
const SETTLE_ms = 60

const holderSchema = z.object({
  token: z.string(),
  pid: z.number().int().positive(),
  /** What tells this process from a later one with the same pid; empty where the system does not say. */
  started: z.string(),
  host: z.string(),
})
type Holder = z.infer<typeof holderSchema>

export class FolderInUse extends Error {
  override readonly name = 'FolderInUse'
  constructor(folder: string, holder: Holder) {
    super(
      `The data folder ${folder} is in use by another Chargehand (process ${holder.pid} on ${holder.host}). ` +
        'Only one process may open it: stop that one first, or set CHARGEHAND_DATA to another folder.',
    )
  }
}

export interface FolderLock {
  release(): Promise<void>
}

/** Boot and start time of a process, from /proc: two processes never share them. Empty where there is no /proc. */
function startOf(pid: number): string {
  try {
    const boot = readFileSync('/proc/sys/kernel/random/boot_id', 'utf8').trim()
    const line = readFileSync(`/proc/${pid}/stat`, 'utf8')
    // The name in parentheses may hold spaces; the fields after it start with the third, and the start time is the 22nd.
    const ticks = line.slice(line.lastIndexOf(')') + 2).split(' ')[19]
    return `${boot}/${ticks}`
  } catch {
    return ''
  }
}

function isRunning(pid: number): boolean {
  try {
    process.kill(pid, 0)
    return true
  } catch (error) {
    // EPERM: it is there and belongs to someone else.
    return (error as NodeJS.ErrnoException).code === 'EPERM'
  }
}

/** Whether the holder is alive. A process on another host cannot be looked at: there the touched file has to tell. */
async function isHeld(file: string, holder: Holder): Promise<boolean> {
  if (holder.host === hostname()) {
    return isRunning(holder.pid) && (holder.started === '' || startOf(holder.pid) === holder.started)
  }
  const age_ms = Date.now() - (await stat(file)).mtimeMs
  return age_ms < ABANDONED_ms
}

async function readHolder(file: string): Promise<Holder | null> {
  try {
    return holderSchema.parse(JSON.parse(await readFile(file, 'utf8')))
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return null
    // Locks are linked into place whole, so a broken one is no lock of ours that lives.
    return { token: '', pid: 1, started: 'unreadable', host: hostname() }
  }
}

/** Puts our lock in place if none is there. A link appears at once with its content, so nobody reads half of it. */
async function place(file: string, holder: Holder): Promise<boolean> {
  const draft = `${file}.${holder.token}`
  await writeFile(draft, JSON.stringify(holder), { mode: 0o600 })
  try {
    await link(draft, file)
    return true
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'EEXIST') return false
    throw error
  } finally {
    await rm(draft, { force: true })
  }
}

/** Takes a dead holder's lock away, unless a rival has replaced it meanwhile: then that one is put back. */
async function clear(file: string, dead: Holder): Promise<void> {
  const aside = `${file}.${randomUUID()}`
  try {
    await rename(file, aside)
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return
    throw error
  }
  const taken = await readHolder(aside)
  if (taken && taken.token !== dead.token) await link(aside, file).catch(() => undefined)
  await rm(aside, { force: true })
}

/**
 * Locks a data folder for this process, until it is released or the process ends, in whatever way. Throws FolderInUse
 * where a live process holds it; a lock left behind by a crash, a power cut or a pid that is used again is taken over.
 */
export async function lockFolder(folder: string): Promise<FolderLock> {
  const file = path.join(folder, 'server.lock')
  const mine: Holder = { token: randomUUID(), pid: process.pid, started: startOf(process.pid), host: hostname() }
  for (;;) {
    if (await place(file, mine)) {
      await sleep(SETTLE_ms)
      const holder = await readHolder(file)
      if (holder?.token === mine.token) break
      if (holder) throw new FolderInUse(folder, holder)
      continue
    }
    const holder = await readHolder(file)
    if (!holder) continue
    if (await isHeld(file, holder)) throw new FolderInUse(folder, holder)
    await clear(file, holder)
  }
  const touch = setInterval(() => {
    const now = new Date()
    utimes(file, now, now).catch(() => undefined)
  }, TOUCH_ms)
  touch.unref()
  return {
    release: async () => {
      clearInterval(touch)
      if ((await readHolder(file))?.token === mine.token) await rm(file, { force: true })
    },
  }
}
