import type { Logger } from 'pino'
import type { Close } from './protocol'
import type { Room } from './room'

/** How long an empty room stays, for people who reload the page. */
const LINGER_ms = 5_000

/** What a room is of: a sheet never moves to another workspace. */
export interface RoomSheet {
  readonly id: string
  readonly workspaceId: string
}

interface Entry {
  readonly room: Promise<Room>
  leaving: ReturnType<typeof setTimeout> | undefined
}

/** The rooms of this process, one a sheet; a room goes only when nobody is in it and everything in it is stored. */
export class Rooms {
  private readonly entries = new Map<string, Entry>()

  constructor(
    private readonly openRoom: (sheet: RoomSheet) => Promise<Room>,
    private readonly log: Logger,
  ) {}

  /** Opens a sheet's room if need be, and calls `enter` while it is sure to stay. */
  async enter(sheet: RoomSheet, enter: (room: Room) => void): Promise<void> {
    const sheetId = sheet.id
    for (;;) {
      const entry = this.entryOf(sheet)
      const room = await entry.room
      if (room.isOver) this.drop(sheetId, entry)
      // Dropped while it was waited for: another may be there already, and two rooms of one sheet must never be.
      if (this.entries.get(sheetId) !== entry) continue
      clearTimeout(entry.leaving)
      return enter(room)
    }
  }

  /** To be told when somebody has left a sheet's room. */
  left(sheetId: string): void {
    const entry = this.entries.get(sheetId)
    if (!entry) return
    clearTimeout(entry.leaving)
    entry.leaving = setTimeout(() => void this.dropIfEmpty(sheetId, entry), LINGER_ms)
    entry.leaving.unref()
  }

  /** The room of a sheet that somebody has open. */
  async find(sheetId: string): Promise<Room | undefined> {
    return this.entries.get(sheetId)?.room
  }

  async checkAlive(): Promise<void> {
    for (const { room } of this.entries.values()) (await room).checkAlive()
  }

  /** Closes every room, and settles when all is stored. */
  async close(reason: Close): Promise<void> {
    const entries = [...this.entries.values()]
    this.entries.clear()
    await Promise.all(
      entries.map(async (entry) => {
        clearTimeout(entry.leaving)
        await (await entry.room).close(reason)
      }),
    )
  }

  private entryOf(sheet: RoomSheet): Entry {
    const there = this.entries.get(sheet.id)
    if (there) return there
    const entry: Entry = { room: this.openRoom(sheet), leaving: undefined }
    this.entries.set(sheet.id, entry)
    entry.room.catch(() => this.drop(sheet.id, entry))
    return entry
  }

  private drop(sheetId: string, entry: Entry): void {
    if (this.entries.get(sheetId) === entry) this.entries.delete(sheetId)
  }

  private async dropIfEmpty(sheetId: string, entry: Entry): Promise<void> {
    const room = await entry.room
    if (room.size > 0) return
    try {
      await room.settle()
    } catch (error) {
      this.log.error({ err: error, sheet: sheetId }, 'a sheet could not be folded into one state')
    }
    if (room.size === 0) this.drop(sheetId, entry)
  }
}
