import { useId } from 'react'
import type { InputHTMLAttributes, ReactNode, SelectHTMLAttributes } from 'react'

interface FieldProps {
  readonly label: string
  readonly hint?: ReactNode
  readonly error?: string | null
  readonly children: (ids: { readonly id: string; readonly describedBy: string | undefined }) => ReactNode
}

/** A label, a control, and below it what is wrong with it or else a hint. */
export function Field({ label, hint, error, children }: FieldProps) {
  const id = useId()
  const below = error || hint
  return (
    <div className="flex flex-col gap-1">
      <label htmlFor={id} className="text-[13px] font-semibold">
        {label}
      </label>
      {children({ id, describedBy: below ? `${id}-below` : undefined })}
      {below && (
        <p
          id={`${id}-below`}
          className={`text-[12.5px] ${error ? 'font-semibold text-hot' : 'text-dim'}`}
          role={error ? 'alert' : undefined}
        >
          {below}
        </p>
      )}
    </div>
  )
}

const CONTROL =
  'w-full rounded-md border border-line bg-white px-2.5 py-1.5 text-ink placeholder:text-dim/70 aria-[invalid=true]:border-hot'

type TextFieldProps = Omit<FieldProps, 'children'> & InputHTMLAttributes<HTMLInputElement> & { readonly mono?: boolean }

export function TextField({ label, hint, error, mono = false, ...input }: TextFieldProps) {
  return (
    <Field label={label} hint={hint} error={error}>
      {({ id, describedBy }) => (
        <input
          id={id}
          aria-describedby={describedBy}
          aria-invalid={error ? true : undefined}
          className={`${CONTROL} ${mono ? 'font-mono' : ''}`}
          {...input}
        />
      )}
    </Field>
  )
}

type SelectFieldProps = Omit<FieldProps, 'children'> &
  SelectHTMLAttributes<HTMLSelectElement> & {
    readonly options: readonly { readonly value: string; readonly label: string }[]
  }

export function SelectField({ label, hint, error, options, ...select }: SelectFieldProps) {
  return (
    <Field label={label} hint={hint} error={error}>
      {({ id, describedBy }) => (
        <select id={id} aria-describedby={describedBy} className={CONTROL} {...select}>
          {options.map((option) => (
            <option key={option.value} value={option.value}>
              {option.label}
            </option>
          ))}
        </select>
      )}
    </Field>
  )
}
