import { describe, expect, it } from 'vitest'
import { ACTIONS, can, decide, ROLES } from '@/lib/auth/policies'
import type { Action, Actor, Decision, Role } from '@/lib/auth/policies'

const HERE = 'workspace here'
const target = { workspaceId: HERE }

function actor(role: Role, workspaceId = HERE): Actor {
  return { id: 'someone', name: 'Someone', email: 'someone@test.example', roles: new Map([[workspaceId, role]]) }
}

/** What each role is told, written out. */
const EXPECTED: Record<Action, Record<Role, Decision>> = {
  'workspace.read': { lead: 'allowed', engineer: 'allowed', viewer: 'allowed' },
  'workspace.members': { lead: 'allowed', engineer: 'forbidden', viewer: 'forbidden' },
  'sheet.create': { lead: 'allowed', engineer: 'allowed', viewer: 'forbidden' },
  'sheet.read': { lead: 'allowed', engineer: 'allowed', viewer: 'allowed' },
  'sheet.edit': { lead: 'allowed', engineer: 'allowed', viewer: 'forbidden' },
  'sheet.delete': { lead: 'allowed', engineer: 'forbidden', viewer: 'forbidden' },
  'snapshot.freeze': { lead: 'allowed', engineer: 'forbidden', viewer: 'forbidden' },
  'comment.write': { lead: 'allowed', engineer: 'allowed', viewer: 'allowed' },
}
const actions = Object.keys(ACTIONS) as Action[]
const cases = actions.flatMap((action) => ROLES.map((role) => ({ action, role, expected: EXPECTED[action][role] })))

describe('who may do what', () => {
  it('has an answer for every action and role', () => {
    expect(Object.keys(EXPECTED).sort()).toEqual([...actions].sort())
    expect(cases).toHaveLength(actions.length * ROLES.length)
  })

  it.each(cases)('$action by a $role: $expected', ({ action, role, expected }) => {
    expect(decide(actor(role), action, target)).toBe(expected)
    expect(can(actor(role), action, target)).toBe(expected === 'allowed')
  })

  it.each(actions)('%s: the signed out are told so, strangers are told there is nothing', (action) => {
    expect(decide(null, action, target)).toBe('signed_out')
    expect(decide(null, action, null)).toBe('signed_out')
    expect(decide(actor('lead', 'workspace elsewhere'), action, target)).toBe('not_found')
    expect(decide(actor('lead'), action, null)).toBe('not_found')
    expect(can(actor('lead', 'workspace elsewhere'), action, target)).toBe(false)
  })
})
