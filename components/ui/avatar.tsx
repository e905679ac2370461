/** Colours that people in a room are told apart by, dark enough for white initials beside them and pale for a fill. */
export const PEOPLE_COLOURS = [
  '#7A4FC2',
  '#0F7B6C',
  '#B3541E',
  '#2563A8',
  '#A8336B',
  '#5E6B00',
  '#7B3F00',
  '#4A5568',
] as const

interface AvatarProps {
  readonly initials: string
  readonly name: string
  readonly colour: number
}

export function Avatar({ initials, name, colour }: AvatarProps) {
  return (
    <span
      title={name}
      role="img"
      aria-label={name}
      className="-ml-1.5 grid size-7 place-items-center rounded-full border-2 border-petrol text-[11px] font-bold text-white first:ml-0"
      style={{ background: PEOPLE_COLOURS[colour % PEOPLE_COLOURS.length] }}
    >
      {initials}
    </span>
  )
}
