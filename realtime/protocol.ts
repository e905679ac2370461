import { z } from 'zod'

/*
 * What server and browser say to one another over /live/<sheetId>. The first four message types are those of the
 * y-websocket client; every frame starts with its type as a variable-length unsigned integer.
 */
export const LIVE_PATH = '/live'

export const MESSAGE = {
  /** y-protocols/sync: step 1, step 2, update. */
  sync: 0,
  /** y-protocols/awareness: who is here and at which cell. */
  awareness: 1,
  /** y-protocols/auth: the server refuses a change, with a sentence. The sender's document is then ahead of the sheet. */
  refused: 2,
  queryAwareness: 3,
  /**
   * The server has dealt with this many `update` messages of this connection (varUint): what they hold is in the
   * database. Zero after a step 2, which offers what was changed while away.
   */
  saved: 4,
} as const

/**
 * Why the server closes. The y-websocket client stops for good on 4400 to 4499, and comes back after a while on the
 * others.
 */
export const CLOSE = {
  malformed: { code: 4400, reason: 'A message could not be read.' },
  signedOut: { code: 4401, reason: 'You are signed out.' },
  notFound: { code: 4404, reason: 'There is no such sheet here.' },
  tooLarge: { code: 4413, reason: 'A change was too large to send in one piece.' },
  storage: { code: 4500, reason: 'The change could not be stored. Trying again.' },
  roomFull: { code: 4503, reason: 'Too many people have this sheet open.' },
  tooSlow: { code: 4508, reason: 'The connection could not keep up.' },
  tooMany: { code: 4529, reason: 'Too many messages at once.' },
  shutdown: { code: 1001, reason: 'The server is going down.' },
} as const

export type Close = (typeof CLOSE)[keyof typeof CLOSE]

export const LIMITS = {
  /** Bytes of one message. A sheet with ten thousand formulas is about one megabyte. */
  messageBytes: 4 * 1024 * 1024,
  /** Bytes of a sheet's document, as stored. */
  sheetBytes: 32 * 1024 * 1024,
  /** Bytes waiting to be sent to one connection. */
  backlogBytes: 16 * 1024 * 1024,
  roomMembers: 100,
  /** Messages of one connection, presence aside: so many at once, and so many a second for ever. */
  burst: 600,
  perSecond: 100,
} as const

/** What a person's browser says about itself. Anything else that it sends is dropped. */
export const presenceSchema = z.object({
  /** The selected cell; null where none is. */
  cell: z
    .object({ row: z.string().max(64), column: z.string().max(64) })
    .nullable()
    .default(null),
  editing: z.boolean().default(false),
})
export type Presence = z.infer<typeof presenceSchema>

/** Who it is: written by the server, whatever the browser sends. */
export interface PresentUser {
  readonly id: string
  readonly name: string
  readonly initials: string
  readonly role: 'lead' | 'engineer' | 'viewer'
  /** 0 to PRESENCE_COLOURS - 1; people in one room differ as far as there are colours. */
  readonly colour: number
}

export const PRESENCE_COLOURS = 8

/** The awareness state of a person as the others receive it. */
export interface PresentState extends Presence {
  readonly user: PresentUser
}
