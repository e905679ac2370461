import type { IncomingMessage } from 'node:http'
import type { Duplex } from 'node:stream'
import type { Logger } from 'pino'
import { WebSocketServer } from 'ws'
import type { WebSocket } from 'ws'
import { z } from 'zod'
import type { OpenDatabase } from '@/db/database'
import { listen } from '@/db/queries/notices'
import type { Environment } from '@/lib/env'
import { admit, editorsAmong, isOwnOrigin, mayStay } from './authorize'
import type { Person } from './connection'
import { Connection } from './connection'
import { sheetStore } from './persistence'
import { CLOSE, LIMITS, LIVE_PATH } from './protocol'
import { Room } from './room'
import { Rooms } from './rooms'

const HEARTBEAT_ms = 30_000
/** The longest that a timer can wait; beyond it, it would go off at once. */
const LONGEST_TIMER_ms = 2 ** 31 - 1

/** The live side of the server: takes upgrades under /live, and puts people into rooms. */
export interface Live {
  /** Takes an upgrade if it is ours; false leaves it to others. */
  upgrade(request: IncomingMessage, socket: Duplex, head: Buffer): boolean
  /** Closes every socket, and settles when all is stored. */
  close(): Promise<void>
}

/** The sheet that a request asks for: its id, null where there is none, undefined if it is not for us. */
function sheetAsked(request: IncomingMessage): string | null | undefined {
  const { pathname } = new URL(request.url ?? '/', 'http://localhost')
  if (pathname !== LIVE_PATH && !pathname.startsWith(`${LIVE_PATH}/`)) return undefined
  return z.uuid().safeParse(pathname.slice(LIVE_PATH.length + 1)).data ?? null
}

/** Refuses before there is a websocket: what a browser would show in its console, and nothing more. */
function refuse(socket: Duplex, status: string): void {
  socket.end(`HTTP/1.1 ${status}\r\nConnection: close\r\nContent-Length: 0\r\n\r\n`)
}

export async function openLive(open: OpenDatabase, environment: Environment, log: Logger): Promise<Live> {
  const { db } = open
  // A message beyond our own limit is closed with a reason that browsers understand; only far beyond it ws steps in.
  const sockets = new WebSocketServer({ noServer: true, maxPayload: 2 * LIMITS.messageBytes, clientTracking: false })
  const rooms = new Rooms(
    ({ id, workspaceId }) =>
      Room.open({
        store: sheetStore(db, id),
        editorsAmong: (userIds) => editorsAmong(db, workspaceId, userIds),
        log: log.child({ sheet: id }),
      }),
    log,
  )
  const heartbeat = setInterval(() => void rooms.checkAlive(), HEARTBEAT_ms)
  heartbeat.unref()
  let closing = false

  await listen(open, (notice) => {
    rooms
      .find(notice.sheetId)
      .then((room) => room?.recheck((userId) => mayStay(db, notice.sheetId, userId)))
      .catch((error: unknown) => log.error({ err: error }, 'rights could not be checked anew'))
  })

  function welcome(socket: WebSocket, room: Room, sheetId: string, person: Person, expiresAt: Date): void {
    const left_ms = Math.min(+expiresAt - Date.now(), LONGEST_TIMER_ms)
    const expiry = setTimeout(() => socket.close(CLOSE.signedOut.code, CLOSE.signedOut.reason), left_ms)
    expiry.unref()
    const connection = new Connection(
      socket,
      person,
      (bytes) => room.receive(connection, bytes),
      () => {
        clearTimeout(expiry)
        room.leave(connection)
        rooms.left(sheetId)
      },
    )
    room.enter(connection)
  }

  async function take(request: IncomingMessage, socket: Duplex, head: Buffer, sheetId: string): Promise<void> {
    const admission = await admit(db, request, sheetId)
    if ('refused' in admission) {
      // The handshake is completed to say why: a browser tells its page nothing of a refused one, and would try for ever.
      const { code, reason } = admission.refused
      return sockets.handleUpgrade(request, socket, head, (websocket) => {
        websocket.on('error', () => undefined)
        websocket.close(code, reason)
      })
    }
    const { person, workspaceId, expiresAt } = admission
    await rooms.enter({ id: sheetId, workspaceId }, (room) => {
      if (closing) return refuse(socket, '503 Service Unavailable')
      sockets.handleUpgrade(request, socket, head, (websocket) => welcome(websocket, room, sheetId, person, expiresAt))
    })
  }

  return {
    upgrade: (request, socket, head) => {
      const sheetId = sheetAsked(request)
      if (sheetId === undefined) return false
      socket.on('error', () => socket.destroy())
      if (sheetId === null) refuse(socket, '404 Not Found')
      else if (!isOwnOrigin(request, environment)) refuse(socket, '403 Forbidden')
      else {
        take(request, socket, head, sheetId).catch((error: unknown) => {
          log.error({ err: error, sheet: sheetId }, 'a sheet could not be opened')
          refuse(socket, '500 Internal Server Error')
        })
      }
      return true
    },
    close: async () => {
      closing = true
      clearInterval(heartbeat)
      await rooms.close(CLOSE.shutdown)
      sockets.close()
    },
  }
}
