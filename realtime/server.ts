import { createServer } from 'node:http'
import type { AddressInfo } from 'node:net'
import next from 'next'
import { setDatabase } from '@/db/client'
import { openFolder } from '@/db/pglite'
import { keptSecret } from '@/lib/auth/server/secret'
import { environment, readEnvironment } from '@/lib/env'
import { log } from '@/lib/log'
import { seedDemo } from '@/lib/workspace/server/seed-demo'
import { openLive } from './live'
import { ready } from './requests'

/** How long requests that are under way may take to finish when the server goes down. */
const GRACE_ms = 10_000

export interface RunningServer {
  readonly port: number
  /** Stops taking requests, stores what came in, closes the database and gives the data folder free. */
  close(): Promise<void>
}

/** Settles the variables that next-auth reads from the process itself. */
async function settleVariables(): Promise<void> {
  const { dataFolder, authSecret, publicUrl } = readEnvironment(process.env)
  process.env.NEXTAUTH_SECRET = authSecret ?? (await keptSecret(dataFolder))
  if (publicUrl) return
  // With no address given, the one that the request was sent to is taken, as a person on this machine expects. An empty
  // one would be taken for an address.
  delete process.env.NEXTAUTH_URL
  process.env.AUTH_TRUST_HOST = '1'
}

/**
 * Serves pages and live sheets on one port, from the one process that has the database open. Throws an Error with a
 * sentence for a person where the environment is wrong, the data folder is in use or the port is taken.
 */
export async function startServer(): Promise<RunningServer> {
  await settleVariables()
  const settings = environment()
  const logger = log()
  const database = await openFolder(settings.dataFolder)
  try {
    if (settings.demo) await seedDemo(database.db)
    setDatabase(database)
    const live = await openLive(database, settings, logger)

    // Next listens here for the upgrades of hot reload; on the real server it would answer those of live sheets too.
    const hotReload = createServer()
    const app = next({ dev: !settings.production, httpServer: hotReload, port: settings.port, hostname: settings.host })
    await app.prepare()
    const handle = app.getRequestHandler()

    const server = createServer((request, response) => {
      ready(request, response, logger, settings.behindProxy)
      handle(request, response).catch((error: unknown) => {
        logger.error({ err: error }, 'a request failed')
        response.destroy()
      })
    })
    server.on('upgrade', (request, socket, head) => {
      if (!live.upgrade(request, socket, head) && !hotReload.emit('upgrade', request, socket, head)) socket.destroy()
    })
    await new Promise<void>((resolve, reject) => {
      server.once('error', reject)
      server.listen(settings.port, settings.host, resolve)
    })

    return {
      port: (server.address() as AddressInfo).port,
      close: async () => {
        const served = new Promise<void>((resolve) => server.close(() => resolve()))
        server.closeIdleConnections()
        await live.close()
        const grace = setTimeout(() => server.closeAllConnections(), GRACE_ms)
        await served
        clearTimeout(grace)
        await app.close()
        setDatabase(undefined)
        await database.close()
      },
    }
  } catch (error) {
    await database.close()
    throw error
  }
}
