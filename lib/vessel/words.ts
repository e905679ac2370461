/** Values as they stand in a sentence: units that people in the trade read, few digits. */
const short = (value: number, digits = 4) => String(Number(value.toPrecision(digits)))

export const bar = (p_Pa: number) => `${short(p_Pa / 1e5)} bar`
export const celsius = (T_K: number) => `${short(T_K - 273.15)} °C`
export const kilograms = (m_kg: number) => `${short(m_kg)} kg`
export const kilogramsPerSecond = (flow: number) => `${short(flow)} kg/s`

export function duration(t_s: number): string {
  if (t_s < 120) return `${short(t_s, 3)} s`
  if (t_s < 7200) return `${short(t_s / 60, 3)} min`
  if (t_s < 172_800) return `${short(t_s / 3600, 3)} h`
  return `${short(t_s / 86_400, 3)} days`
}
