import { zodResolver } from '@hookform/resolvers/zod'
import { useEffect } from 'react'
import { type Resolver, useForm } from 'react-hook-form'
import { REGISTERS, type RegisterName } from '../../../../shared/schemas/register.ts'
import { plainIssue } from '../../../lib/plain-issue.ts'
import { Field, FieldChoice } from '../../../ui/field.tsx'
import { FormFoot } from '../../../ui/form-foot.tsx'
import { newRow, REGISTER_FIELDS, REGISTER_WORDS, type RegisterField } from '../register-fields.ts'
import { useSaveRow } from '../registers.queries.ts'

type Row = Record<string, unknown> & { id: string; version: number }

interface RowFormProps {
  register: RegisterName
  row: Row | null
  /** Told what was saved, in words. */
  onSaved: (says: string) => void
  onLeave: () => void
}

/** Adds a row of a register, or changes one. What was typed stays when it is refused. */
export function RowForm({ register: name, row, onSaved, onLeave }: RowFormProps) {
  const resolver = zodResolver(REGISTERS[name].save as never, { error: plainIssue } as never) as unknown as Resolver<
    Record<string, unknown>
  >
  const form = useForm<Record<string, unknown>>({ resolver, defaultValues: row ?? newRow(name) })
  const save = useSaveRow(name)
  const submit = form.handleSubmit((values) =>
    save.mutate(
      { id: row?.id ?? null, values: { ...values, ...(row ? { version: row.version } : {}) } },
      {
        onSuccess: () =>
          onSaved(`${row ? 'Saved' : 'Added'}: ${REGISTER_WORDS[name].one} ${String(values.number)}, ${String(values.name)}.`),
      },
    ),
  )
  // The form opens above a long table: the cursor goes where the next key belongs.
  const { setFocus } = form
  useEffect(() => setFocus('number'), [setFocus])
  const errorOf = (key: string) => form.formState.errors[key]?.message?.toString()
  const fieldOf = (f: RegisterField) => {
    const frame = {
      label: f.label,
      ...(f.unit ? { unit: f.unit } : {}),
      ...(f.hint ? { hint: f.hint } : {}),
      error: errorOf(f.key),
    }
    if (f.kind === 'choice') return <FieldChoice key={f.key} {...frame} options={f.options ?? []} {...form.register(f.key)} />
    return (
      <Field
        key={f.key}
        {...frame}
        type={f.kind === 'date' ? 'date' : 'text'}
        inputMode={f.kind === 'number' ? 'decimal' : 'text'}
        {...form.register(f.key)}
      />
    )
  }
  return (
    <form noValidate onSubmit={submit} className="border-b-[3px] border-double border-ink px-margin py-3">
      <h2 className="pb-1 text-3">
        {row ? `Change ${REGISTER_WORDS[name].one} ${String(row.number)}` : `A new ${REGISTER_WORDS[name].one}`}
      </h2>
      <div className="grid grid-cols-2 items-start gap-x-6 border-t-2 border-ink max-lg:grid-cols-1">
        {REGISTER_FIELDS[name].map(fieldOf)}
      </div>
      <label className="mt-2 flex min-h-[44px] items-center gap-1">
        <input type="checkbox" className="size-[20px]" {...form.register('active')} />
        in use: offered when a demonstration is planned
      </label>
      <FormFoot act={save} does="Save" onLeave={onLeave} />
    </form>
  )
}
