import { customType } from 'drizzle-orm/pg-core'

/** Bytes as they are: PGlite hands out a Uint8Array, the pg driver a Buffer, which is one. */
export const bytea = customType<{ data: Uint8Array }>({ dataType: () => 'bytea' })
