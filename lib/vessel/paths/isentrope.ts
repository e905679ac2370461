import { Problem } from '@/lib/errors'
import type { Fluid, State } from '@/lib/fluids'
import { fallToZero } from '@/lib/numerics/ode'

const MAX_FAST = 30
/** Near enough to the throat that what is left enters the flux to third order (to second order, off the isentrope). */
const NEAR_SONIC = 2e-4
const NEAR_ISENTROPE = 3e-5
/** So far off the isentrope, temperature is put right before anything is made of the speed. */
const FAR_OFF = 4e-3
/** A throat is never at less than this part of the pressure upstream: for a gas of exponent 1.67 it is 0.49, for denser ones more. */
const LOWEST_RATIO = 0.05
/** Nearer to equal pressures than this, differences of enthalpy lose too many digits. */
const NEARLY_EQUAL = 1e-4
/** No flux: it would be faster than sound at that pressure. */
const FASTER = -1
/** No flux: the fluid's equation does not reach that state. */
const BEYOND = -2

/**
 * Mass flux, kg/(m² s), along the isentrope of a fluid that starts from rest: G = ρ √(2 (h0 - h)), in equilibrium
 * through one and two phases, choked where it is greatest. One instance follows one place: each search starts from the
 * last answer. Where the throat would be colder than the fluid's equation reaches (below the triple point), the
 * expansion is taken as that of a perfect gas with the isentropic exponent upstream: nothing condenses.
 */
export class IsentropicFlux {
  /** Evaluations of the equation of state since it was made. */
  evaluations = 0
  private throat: State | undefined
  private trial: State | undefined
  /** The last choked throat, relative to the state upstream of it. */
  private logRho = NaN
  private logT = NaN
  /** Fundamental derivative of gas dynamics at the last throat: how fast the search closes in. */
  private gamma = 1.2
  private wasChoked = true
  /** The upstream state for which the choked answer below holds. */
  private upP_Pa = NaN
  private upH_J_kg = NaN
  private chokedG = 0
  private chokedP_Pa = 0
  private frozen = false
  /** Speed over the speed of sound where `subsonic` looked last. */
  private lastMach = 0

  constructor(private readonly fluid: Fluid) {}

  flux(up: State, p_down_Pa: number): number {
    const known = up.p_Pa === this.upP_Pa && up.h_J_kg === this.upH_J_kg
    // A flow that was not choked a moment ago is most likely not now, and that is seen at its end state alone.
    if (!known && !this.wasChoked) {
      const G = this.subsonic(up, p_down_Pa)
      if (G >= 0) return G
    }
    if (!known) this.choke(up)
    this.wasChoked = p_down_Pa <= this.chokedP_Pa
    if (this.wasChoked) return this.chokedG
    if (this.frozen) return frozenFlux(up, p_down_Pa)
    const G = this.subsonic(up, p_down_Pa)
    return G >= 0 ? G : this.chokedG
  }

  /** The greatest flux from a state, and the pressure at the throat. */
  choked(up: State): { G_kg_m2s: number; p_Pa: number } {
    this.choke(up)
    return { G_kg_m2s: this.chokedG, p_Pa: this.chokedP_Pa }
  }

  /** Flux to a pressure that is reached in the throat, or why there is none (FASTER, BEYOND). */
  private subsonic(up: State, p_down_Pa: number): number {
    const drop = up.p_Pa - p_down_Pa
    if (drop <= 0) return 0
    if (drop < NEARLY_EQUAL * up.p_Pa) {
      const exponent = isentropicExponent(up)
      const ratio = p_down_Pa / up.p_Pa
      const speedSquared = (2 * up.p_Pa * powerRise(ratio, exponent)) / up.rho_kg_m3
      return up.rho_kg_m3 * ratio ** (1 / exponent) * Math.sqrt(speedSquared)
    }
    let end: State
    try {
      end = this.trial = this.fluid.state('ps', p_down_Pa, up.s_J_kgK, this.trial, this.trial ?? up)
    } catch (error) {
      if (error instanceof Problem) return BEYOND
      throw error
    }
    this.evaluations += end.evaluations
    const speedSquared = 2 * (up.h_J_kg - end.h_J_kg)
    this.lastMach = Math.sqrt(Math.max(0, speedSquared) / soundSpeedSquared(end))
    if (this.lastMach > 1) return FASTER
    return end.rho_kg_m3 * Math.sqrt(Math.max(0, speedSquared))
  }

  private choke(up: State): void {
    this.upP_Pa = up.p_Pa
    this.upH_J_kg = up.h_J_kg
    // Where it was beyond the equation a moment ago the search over pressure finds that out at once.
    this.frozen = !((!this.frozen && this.chokeFast(up)) || this.chokeByPressure(up))
    if (this.frozen) {
      const exponent = isentropicExponent(up)
      this.chokedP_Pa = up.p_Pa * (2 / (exponent + 1)) ** (exponent / (exponent - 1))
      this.chokedG = frozenFlux(up, this.chokedP_Pa)
    }
  }

  /**
   * Newton's method in density and temperature on s = s0 and w² = 2 (h0 - h), one evaluation a round. Since the flux is at
   * its greatest there, it is exact to second order in what the density is off. False where it does not settle at once.
   */
  private chokeFast(up: State): boolean {
    if (Number.isNaN(this.logRho)) {
      const exponent = Math.min(3, Math.max(1.05, isentropicExponent(up)))
      this.logRho = Math.log(2 / (exponent + 1)) / (exponent - 1)
      this.logT = (exponent - 1) * this.logRho
    }
    let rho = up.rho_kg_m3 * Math.exp(this.logRho)
    let T = up.T_K * Math.exp(this.logT)
    let lastStep = 0
    let lastF = 0
    for (let count = 0; count < MAX_FAST; count++) {
      const t = this.stateAt(rho, T)
      if (!t) break
      const ds = up.s_J_kgK - t.s_J_kgK
      const dT = (t.T_K * ds) / t.cv_J_kgK
      if (Math.abs(dT) > FAR_OFF * T) {
        T += Math.max(-0.1 * T, Math.min(0.1 * T, dT))
        lastStep = 0
        continue
      }
      const h = t.h_J_kg + (t.cv_J_kgK + t.dpdT_rho_Pa_K / rho) * dT
      const speedSquared = 2 * (up.h_J_kg - h)
      // On the isentrope, dT away; as for a perfect gas the square of the speed of sound goes with temperature.
      const sound2 = soundSpeedSquared(t) * (1 + dT / T)
      const F = sound2 - speedSquared
      if (lastStep !== 0) {
        const slope = (F - lastF) / (2 * sound2 * lastStep)
        if (slope > 0.05 && slope < 6) this.gamma = slope
      }
      if (Math.abs(F) < NEAR_SONIC * sound2 && Math.abs(dT) < NEAR_ISENTROPE * T) {
        this.logRho = Math.log(rho / up.rho_kg_m3)
        this.logT = Math.log((T + dT) / up.T_K)
        // The flux at its top, seen from a density that is off by `off`: d ln G / d ln ρ = 2 Γ off.
        const off = F / (2 * this.gamma * sound2)
        this.chokedG = rho * Math.sqrt(speedSquared) * (1 + this.gamma * off * off)
        this.chokedP_Pa = t.p_Pa + t.dpdT_rho_Pa_K * dT
        return true
      }
      const step = Math.max(-0.5, Math.min(0.5, -F / (2 * this.gamma * sound2)))
      lastStep = Math.abs(step) > 1e-7 ? step : 0
      lastF = F
      T = (T + dT) * Math.exp((t.dpdT_rho_Pa_K / (rho * t.cv_J_kgK)) * step)
      rho *= Math.exp(step)
      if (rho > up.rho_kg_m3) rho = up.rho_kg_m3
    }
    this.logRho = NaN
    return false
  }

  private stateAt(rho_kg_m3: number, T_K: number): State | null {
    try {
      this.throat = this.fluid.state('rhoT', rho_kg_m3, T_K, this.throat, this.throat)
    } catch (error) {
      if (error instanceof Problem) return null
      throw error
    }
    this.evaluations += this.throat.evaluations
    return this.throat
  }

  /**
   * Search over pressure for where the flow reaches the speed of sound, held by brackets. That speed jumps where the
   * isentrope crosses the saturation line: the throat may then lie on the line itself. False where it lies beyond the
   * fluid's equation.
   */
  private chokeByPressure(up: State): boolean {
    // From two phases it stays in two phases, so that it ends at the triple point.
    const triple = up.x >= 0 ? (this.fluid.info.triple?.p_Pa ?? 0) : 0
    const lowest = Math.max(LOWEST_RATIO, triple / up.p_Pa)
    if (!(lowest < 1)) return false
    let nearestBeyond = Infinity
    let nearestFaster = Infinity
    const spare = (drop: number) => {
      const flux = this.subsonic(up, up.p_Pa * (1 - drop))
      if (flux === FASTER) nearestFaster = Math.min(nearestFaster, drop)
      if (flux !== BEYOND) return 1 - this.lastMach * this.lastMach
      nearestBeyond = Math.min(nearestBeyond, drop)
      return -1
    }
    const most = (1 - lowest) * (1 - 1e-9)
    const atMost = spare(most)
    if (atMost > 0) return false
    const drop = fallToZero(spare, NEARLY_EQUAL, 1, most, atMost, NEAR_SONIC)
    if (nearestBeyond < nearestFaster) return false
    this.chokedP_Pa = up.p_Pa * (1 - drop)
    this.chokedG = this.subsonic(up, this.chokedP_Pa)
    return true
  }
}

/** Of a mixture of two phases too, in equilibrium. */
const soundSpeedSquared = (s: State) => s.w_m_s * s.w_m_s

/** -(∂ ln p/∂ ln v) at constant entropy. */
const isentropicExponent = (s: State) => (s.rho_kg_m3 * soundSpeedSquared(s)) / s.p_Pa

/** (h0 - h) ρ0/p0 of a perfect gas of this exponent, for a pressure ratio. */
const powerRise = (ratio: number, exponent: number) => {
  const power = (exponent - 1) / exponent
  return power === 0 ? -Math.log(ratio) : -Math.expm1(power * Math.log(ratio)) / power
}

function frozenFlux(up: State, p_down_Pa: number): number {
  const exponent = isentropicExponent(up)
  const ratio = p_down_Pa / up.p_Pa
  return ratio ** (1 / exponent) * Math.sqrt(2 * up.rho_kg_m3 * up.p_Pa * powerRise(ratio, exponent))
}
