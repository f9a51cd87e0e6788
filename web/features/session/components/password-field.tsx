import { type InputHTMLAttributes, useState } from 'react'
import { FieldRow } from '../../../ui/field.tsx'

interface PasswordFieldProps extends InputHTMLAttributes<HTMLInputElement> {
  label: string
  hint?: string
  error?: string | undefined
}

/** A password in its ruled cell, with the word that shows it: long sentences are easier to type when seen. */
export function PasswordField({ label, hint, error, ...input }: PasswordFieldProps) {
  const [shown, setShown] = useState(false)
  return (
    <FieldRow label={label} {...(hint ? { hint } : {})} error={error}>
      {(tied) => (
        <>
          <input
            {...tied}
            {...input}
            type={shown ? 'text' : 'password'}
            autoCapitalize="none"
            spellCheck={false}
            className="figures min-h-[54px] w-full min-w-0 grow bg-transparent px-2 text-2 text-pen"
          />
          <button type="button" className="word shrink-0 px-2 text-[14px]" aria-pressed={shown} onClick={() => setShown(!shown)}>
            {shown ? 'hide' : 'show'}
            <span className="away"> the password</span>
          </button>
        </>
      )}
    </FieldRow>
  )
}
