/*
 * Who may do what. The only place where rights are decided: pages, actions, routes and the websocket all ask here, and
 * the screen is told the answers.
 */

export const ROLES = ['lead', 'engineer', 'viewer'] as const
export type Role = (typeof ROLES)[number]

const everyone: readonly Role[] = ROLES
const editors: readonly Role[] = ['lead', 'engineer']
const leads: readonly Role[] = ['lead']

/** Every action there is, and the roles that may do it in their own workspace. */
export const ACTIONS = {
  'workspace.read': everyone,
  'workspace.members': leads,
  'sheet.create': editors,
  'sheet.read': everyone,
  'sheet.edit': editors,
  'sheet.delete': leads,
  'snapshot.freeze': leads,
  'comment.write': everyone,
} as const satisfies Record<string, readonly Role[]>

export type Action = keyof typeof ACTIONS

/** A signed-in person and the workspaces they belong to, as the database has them now. */
export interface Actor {
  readonly id: string
  readonly name: string
  readonly email: string
  readonly roles: ReadonlyMap<string, Role>
}

/** What an action is done to: everything belongs to one workspace. */
export interface Target {
  readonly workspaceId: string
}

export type Decision = 'allowed' | 'signed_out' | 'not_found' | 'forbidden'

/**
 * A stranger is told `not_found`, as for a thing that does not exist: nobody learns from an answer what other
 * workspaces hold. `forbidden` is said only to members, who see the thing anyway.
 */
export function decide(actor: Actor | null, action: Action, target: Target | null): Decision {
  if (!actor) return 'signed_out'
  const role = target && actor.roles.get(target.workspaceId)
  if (!role) return 'not_found'
  const allowed: readonly Role[] = ACTIONS[action]
  return allowed.includes(role) ? 'allowed' : 'forbidden'
}

export const can = (actor: Actor | null, action: Action, target: Target | null): boolean =>
  decide(actor, action, target) === 'allowed'
