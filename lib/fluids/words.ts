/** Values as they stand in a sentence: units that people in the trade read, few digits. */
const short = (value: number) => String(Number(value.toPrecision(5))).replace('-', '−')

export const kelvin = (T_K: number) => `${short(T_K)} K (${short(T_K - 273.15)} °C)`
export const bar = (p_Pa: number) => (Math.abs(p_Pa) < 100 ? `${short(p_Pa)} Pa` : `${short(p_Pa / 1e5)} bar`)
export const perCubicMetre = (rho: number) => `${short(rho)} kg/m³`
export const kilojoules = (e_J_kg: number) => `${short(e_J_kg / 1000)} kJ/kg`
