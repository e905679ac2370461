/** Every way in which a request is refused, the status that says so over HTTP, and the sentence people read. */
export const REFUSALS = {
  signed_out: { status: 401, sentence: 'You are signed out. Sign in and try again.' },
  forbidden: { status: 403, sentence: 'Your role in this workspace does not allow that.' },
  not_found: { status: 404, sentence: 'There is nothing here, or it is not yours to see.' },
  invalid: { status: 422, sentence: 'What was entered cannot be used.' },
} as const

export type RefusalCode = keyof typeof REFUSALS

/** A request that is refused for a reason its sender may know. Anything else that is thrown is our mistake. */
export class Refusal extends Error {
  override readonly name = 'Refusal'
  constructor(
    readonly code: RefusalCode,
    sentence: string = REFUSALS[code].sentence,
  ) {
    super(sentence)
  }
}
