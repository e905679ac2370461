import { Problem } from '@/lib/errors'
import type { Run } from '../run'
import type { Supply } from '../supply'
import { charge } from './charge'
import type { ChargeRequest } from './requests'

export interface ServeRequest extends Omit<ChargeRequest, 'supply' | 'stops'> {
  readonly bank: Extract<Supply, { kind: 'bank' }>
  readonly until_p_Pa: number
}

export interface Served {
  readonly count: number
  readonly runs: readonly Run[]
  /** The bank after the last of them. */
  readonly bank: Supply
  /** The pressure that the next would be left at, short of what was asked. */
  readonly next_p_Pa: number
}

const MOST = 1000

/** How many vessels, each as `from`, a bank fills to a pressure one after another. */
export function serve({ bank, until_p_Pa, ...request }: ServeRequest): Served {
  const runs: Run[] = []
  let supply: Supply = bank
  while (runs.length < MOST) {
    const attempt = filled({ ...request, supply, stops: { until_p_Pa } })
    if (!attempt) {
      const level = levelled({ ...request, supply, stops: { level: true } })
      return { count: runs.length, runs, bank: supply, next_p_Pa: level }
    }
    runs.push(attempt)
    if (attempt.supply) supply = attempt.supply
  }
  throw new Problem('unreached', `it fills more than ${MOST} vessels`)
}

/** Null where the bank no longer has the pressure. */
function filled(request: ChargeRequest): Run | null {
  try {
    const run = charge({ ...request, stops: { ...request.stops, level: true } })
    return run.stoppedBy === 'until_p' ? run : null
  } catch (error) {
    if (error instanceof Problem && error.code === 'impossible') return null
    throw error
  }
}

const levelled = (request: ChargeRequest): number => {
  try {
    return charge(request).p_Pa
  } catch (error) {
    if (error instanceof Problem && error.code === 'impossible') return request.from.p_Pa
    throw error
  }
}
