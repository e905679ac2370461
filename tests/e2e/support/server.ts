import { spawn } from 'node:child_process'
import type { ChildProcess } from 'node:child_process'
import { once } from 'node:events'
import { mkdtemp, rm } from 'node:fs/promises'
import { createServer } from 'node:net'
import type { AddressInfo } from 'node:net'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { setTimeout as sleep } from 'node:timers/promises'
import { fileURLToPath } from 'node:url'
import { seedElsewhere } from './elsewhere'
import type { Elsewhere } from './elsewhere'

const START = fileURLToPath(new URL('../../../lib/cli/start.mjs', import.meta.url))
const READY_ms = 180_000

async function freePort(): Promise<number> {
  const probe = createServer().listen(0)
  await once(probe, 'listening')
  const { port } = probe.address() as AddressInfo
  probe.close()
  return port
}

/** The product as people run it: npm start's own script, on a free port, with a data folder of its own. */
export class TestServer {
  private child: ChildProcess | undefined
  private said = ''

  private constructor(
    readonly url: string,
    private readonly folder: string,
    /** A workspace that nobody of the demo belongs to. */
    readonly elsewhere: Elsewhere,
  ) {}

  static async create(): Promise<TestServer> {
    const folder = await mkdtemp(path.join(tmpdir(), 'chargehand-'))
    const elsewhere = await seedElsewhere(folder)
    const server = new TestServer(`http://localhost:${await freePort()}`, folder, elsewhere)
    await server.start()
    return server
  }

  async start(): Promise<void> {
    const variables = {
      PORT: new URL(this.url).port,
      CHARGEHAND_DATA: this.folder,
      CHARGEHAND_DEMO: 'on',
      LOG_LEVEL: 'warn',
      NEXTAUTH_URL: '',
    }
    const child = spawn(process.execPath, [START], { env: { ...process.env, ...variables }, stdio: 'pipe' })
    for (const stream of [child.stdout, child.stderr]) stream.on('data', (text: Buffer) => (this.said += text))
    this.child = child
    const end = Date.now() + READY_ms
    while (!(await this.isHealthy())) {
      if (child.exitCode !== null || Date.now() > end) throw new Error(`The server did not start:\n${this.said}`)
      await sleep(200)
    }
  }

  /** SIGTERM goes down in order, SIGKILL is a crash. */
  async stop(signal: 'SIGTERM' | 'SIGKILL' = 'SIGTERM'): Promise<void> {
    const child = this.child
    if (!child || child.exitCode !== null) return
    const exit = once(child, 'exit')
    child.kill(signal)
    await exit
  }

  async remove(): Promise<void> {
    await this.stop()
    await rm(this.folder, { recursive: true })
  }

  private async isHealthy(): Promise<boolean> {
    return fetch(`${this.url}/api/health`).then(
      (response) => response.ok,
      () => false,
    )
  }
}
