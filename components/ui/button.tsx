import type { ButtonHTMLAttributes } from 'react'

const LOOKS = {
  primary: 'bg-mark text-ink hover:brightness-95',
  quiet: 'border border-line bg-white text-ink hover:bg-steel',
  dark: 'bg-white/10 text-white hover:bg-white/20',
  text: 'text-petrol-light underline-offset-2 hover:underline px-1',
  danger: 'bg-hot text-white hover:brightness-95',
} as const

export interface ButtonProps extends ButtonHTMLAttributes<HTMLButtonElement> {
  readonly look?: keyof typeof LOOKS
  readonly small?: boolean
}

export function Button({ look = 'quiet', small = false, className = '', type = 'button', ...rest }: ButtonProps) {
  const size = small ? 'px-2 py-1 text-[13px]' : 'px-3 py-1.5'
  return (
    <button
      type={type}
      className={`inline-flex items-center justify-center gap-1.5 rounded-md font-semibold disabled:opacity-50 ${size} ${LOOKS[look]} ${className}`}
      {...rest}
    />
  )
}
