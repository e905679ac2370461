import './environment'
import { afterAll, beforeAll } from 'vitest'
import { setDatabase } from '@/db/client'
import type { Database, OpenDatabase } from '@/db/database'
import { openInMemory } from '@/db/pglite'

/** A database of this test file alone, in memory and with the newest schema; also the one that use-cases reach. */
export function testDatabase(): { readonly db: Database; readonly open: OpenDatabase } {
  let open: OpenDatabase
  beforeAll(async () => {
    open = await openInMemory()
    setDatabase(open)
  })
  afterAll(async () => {
    setDatabase(undefined)
    await open.close()
  })
  return {
    get db() {
      return open.db
    },
    get open() {
      return open
    },
  }
}
