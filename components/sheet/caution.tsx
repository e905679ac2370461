/** Where a result could be acted on, what it is and what it is not. */
export function Caution() {
  return (
    <p className="border-l-4 border-mark bg-white px-3 py-1.5 text-[12px] leading-snug text-dim">
      A calculation aid. Relief, materials, oxygen cleanliness, asphyxiation and low-temperature embrittlement are for
      the applicable code and a licensed person to judge.
    </p>
  )
}
