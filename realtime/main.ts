import { FolderInUse } from '@/db/lock'
import { log } from '@/lib/log'
import { startServer } from './server'

/** Starts the server of this process, says where it is, and takes it down in order when it is asked to end. */
export async function main(): Promise<void> {
  try {
    const server = await startServer()
    process.stdout.write(`\nChargehand is at http://localhost:${server.port}\n\n`)
    let ending = false
    const end = (signal: string) => {
      if (ending) return
      ending = true
      log().info({ signal }, 'going down')
      server.close().then(
        () => process.exit(0),
        (error: unknown) => {
          log().fatal({ err: error }, 'the server did not go down in order')
          process.exit(1)
        },
      )
    }
    for (const signal of ['SIGINT', 'SIGTERM'] as const) process.on(signal, end)
  } catch (error) {
    process.stderr.write(`${sentenceOf(error)}\n`)
    process.exit(1)
  }
}

function sentenceOf(error: unknown): string {
  if (error instanceof FolderInUse) return error.message
  const { code, message } = error as NodeJS.ErrnoException
  if (code === 'EADDRINUSE') return 'The port is taken by another program. Set PORT to a free one: PORT=3001 npm start'
  return message ?? String(error)
}
