import type { AwarenessEntry } from './frames'
import { PRESENCE_COLOURS, presenceSchema } from './protocol'
import type { PresentState, PresentUser } from './protocol'

/**
 * Who is in a room and where. Every connection speaks for one client number of its own and for nobody else; who it is
 * comes from the session, whatever it says.
 */
export class PresenceList<Member> {
  private readonly users = new Map<Member, PresentUser>()
  private readonly clients = new Map<number, { readonly member: Member; readonly entry: AwarenessEntry }>()
  private clock = 0

  /** Lets a member in; people keep one colour however many windows they have. */
  enter(member: Member, user: Omit<PresentUser, 'colour'>): void {
    const others = [...this.users.values()]
    const own = others.find((other) => other.id === user.id)
    const taken = new Set(others.map((other) => other.colour))
    const free = Array.from({ length: PRESENCE_COLOURS }, (_, colour) => colour).find((colour) => !taken.has(colour))
    this.users.set(member, { ...user, colour: own?.colour ?? free ?? others.length % PRESENCE_COLOURS })
  }

  /** Takes what a member says; gives what the others are to hear. What it says of someone else's client is not heard. */
  hear(member: Member, entries: readonly AwarenessEntry[]): readonly AwarenessEntry[] {
    const user = this.users.get(member)
    if (!user) return []
    const heard: AwarenessEntry[] = []
    for (const given of entries) {
      if (!this.mayClaim(member, user, given)) continue
      const { clientId, state } = given
      const presence = state === null ? null : presenceSchema.safeParse(state).data
      if (presence === undefined) continue
      const present: PresentState | null = presence && { ...presence, user }
      const entry = { clientId, clock: this.tick(), state: present }
      this.clients.set(clientId, { member, entry })
      heard.push(entry)
    }
    return heard
  }

  /** Takes a member out; gives what the others are to hear. */
  leave(member: Member): readonly AwarenessEntry[] {
    this.users.delete(member)
    const clientId = this.clientOf(member)
    if (clientId === undefined) return []
    this.clients.delete(clientId)
    return [{ clientId, clock: this.tick(), state: null }]
  }

  /** Everyone who is here, but for the one who asks. */
  everyoneBut(asking: Member): readonly AwarenessEntry[] {
    return [...this.clients.values()].flatMap(({ member, entry }) =>
      member !== asking && entry.state !== null ? [entry] : [],
    )
  }

  private mayClaim(member: Member, user: PresentUser, { clientId, state }: AwarenessEntry): boolean {
    const holder = this.clients.get(clientId)?.member
    if (holder === member) return true
    if (this.clientOf(member) !== undefined) return false
    if (holder === undefined) return true
    // A browser that comes back after a lost line may find its old connection still here, under the same person. But
    // browsers also send back what they heard of others; such an echo has the user in it, which only we write.
    return this.users.get(holder)?.id === user.id && typeof state === 'object' && state !== null && !('user' in state)
  }

  private clientOf(member: Member): number | undefined {
    for (const [clientId, client] of this.clients) if (client.member === member) return clientId
    return undefined
  }

  /**
   * Browsers believe an entry only if its clock is beyond the last they saw. The clock is ours, in milliseconds of wall
   * time, so that it goes on rising over reconnections and restarts.
   */
  private tick(): number {
    this.clock = Math.max(this.clock + 1, Date.now())
    return this.clock
  }
}
