import type { z } from 'zod'
import { database } from '@/db/client'
import type { Database } from '@/db/database'
import { decide } from '../policies'
import type { Action, Actor, Target } from '../policies'
import { Refusal } from './refusal'

interface OperationParts<Input, Found extends Target, Output> {
  /** The right that it takes. */
  readonly action: Action
  readonly input: z.ZodType<Input>
  /** Finds what the input names; what it does not find is as good as a stranger's. */
  readonly target: (db: Database, input: Input) => Promise<Found | null | undefined>
  readonly run: (given: {
    readonly db: Database
    readonly actor: Actor
    readonly input: Input
    readonly target: Found
  }) => Promise<Output>
}

/**
 * The one shape of everything people ask of the server: parse, load, authorise, act, in one transaction. Throws a
 * Refusal where the asker did something wrong.
 */
export function operation<Input, Found extends Target, Output>(parts: OperationParts<Input, Found, Output>) {
  return async (actor: Actor | null, raw: unknown): Promise<Output> => {
    if (!actor) throw new Refusal('signed_out')
    const input = parts.input.safeParse(raw)
    if (!input.success) throw new Refusal('invalid', input.error.issues[0]?.message)
    return database().transaction(async (db) => {
      const target = await parts.target(db, input.data)
      const decision = decide(actor, parts.action, target ?? null)
      if (decision !== 'allowed' || !target) throw new Refusal(decision === 'allowed' ? 'not_found' : decision)
      return parts.run({ db, actor, input: input.data, target })
    })
  }
}
