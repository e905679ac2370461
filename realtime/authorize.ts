import type { IncomingMessage } from 'node:http'
import { parseCookie } from 'cookie'
import type { Database } from '@/db/database'
import { findSheet } from '@/db/queries/sheets'
import { can, decide } from '@/lib/auth/policies'
import { loadActor, loadActors } from '@/lib/auth/server/actor'
import { readSession } from '@/lib/auth/server/session'
import type { Environment } from '@/lib/env'
import type { Person } from './connection'
import { CLOSE } from './protocol'
import type { Close } from './protocol'

/** A page of another site cannot open a socket with our cookie: the browser says where the page came from. */
export function isOwnOrigin(
  request: IncomingMessage,
  environment: Pick<Environment, 'publicUrl' | 'behindProxy'>,
): boolean {
  const { origin, host } = request.headers
  if (!origin || !URL.canParse(origin)) return false
  if (environment.publicUrl) return origin === new URL(environment.publicUrl).origin
  const forwarded = environment.behindProxy ? request.headers['x-forwarded-host'] : undefined
  return new URL(origin).host === (forwarded ?? host)
}

export type Admission =
  { readonly person: Person; readonly workspaceId: string; readonly expiresAt: Date } | { readonly refused: Close }

/** Who asks to open a sheet, by the session in the request's cookies, and whether they may. */
export async function admit(db: Database, request: IncomingMessage, sheetId: string): Promise<Admission> {
  const session = await readSession(parseCookie(request.headers.cookie ?? ''))
  const actor = session && (await loadActor(db, session.userId))
  if (!actor) return { refused: CLOSE.signedOut }
  const sheet = await findSheet(db, sheetId)
  const role = sheet && actor.roles.get(sheet.workspaceId)
  if (!role || !can(actor, 'sheet.read', sheet)) return { refused: CLOSE.notFound }
  const { workspaceId } = sheet
  return { person: { userId: actor.id, name: actor.name, role }, workspaceId, expiresAt: session.expiresAt }
}

/** Those of some people who may change the sheets of a workspace, as the database has it now. */
export async function editorsAmong(
  db: Database,
  workspaceId: string,
  userIds: readonly string[],
): Promise<ReadonlySet<string>> {
  const actors = await loadActors(db, userIds)
  return new Set(userIds.filter((id) => can(actors.get(id) ?? null, 'sheet.edit', { workspaceId })))
}

/** Why a person may not go on reading a sheet; null if they may. */
export async function mayStay(db: Database, sheetId: string, userId: string): Promise<Close | null> {
  const decision = decide(await loadActor(db, userId), 'sheet.read', (await findSheet(db, sheetId)) ?? null)
  if (decision === 'allowed') return null
  return decision === 'signed_out' ? CLOSE.signedOut : CLOSE.notFound
}
