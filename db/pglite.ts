import { mkdir } from 'node:fs/promises'
import { fileURLToPath } from 'node:url'
import path from 'node:path'
import { PGlite } from '@electric-sql/pglite'
import { drizzle } from 'drizzle-orm/pglite'
import { migrate } from 'drizzle-orm/pglite/migrator'
import type { OpenDatabase } from './database'
import { lockFolder } from './lock'

const MIGRATIONS = fileURLToPath(new URL('./migrations', import.meta.url))

/** Opens the embedded database in a folder of its own there and brings it to the newest schema; null keeps it in memory. */
async function openAt(folder: string | null): Promise<OpenDatabase> {
  const client = await PGlite.create(folder ? { dataDir: folder } : {})
  const db = drizzle({ client })
  await migrate(db, { migrationsFolder: MIGRATIONS })
  return {
    db,
    listen: async (channel, hear) => void (await client.listen(channel, hear)),
    close: () => client.close(),
  }
}

/** A database that is gone when it is closed. */
export const openInMemory = (): Promise<OpenDatabase> => openAt(null)

/**
 * Opens the database kept in a data folder. Throws FolderInUse where another process has it open: the embedded
 * database would let both write, and be ruined.
 */
export async function openFolder(dataFolder: string): Promise<OpenDatabase> {
  await mkdir(dataFolder, { recursive: true, mode: 0o700 })
  const lock = await lockFolder(dataFolder)
  try {
    const open = await openAt(path.join(dataFolder, 'database'))
    return { ...open, close: () => open.close().finally(() => lock.release()) }
  } catch (error) {
    await lock.release()
    throw error
  }
}
