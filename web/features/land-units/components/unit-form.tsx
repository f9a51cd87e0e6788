import { zodResolver } from '@hookform/resolvers/zod'
import { type Resolver, useForm } from 'react-hook-form'
import { type LandUnitRow, type SaveLandUnit, saveLandUnitSchema } from '../../../../shared/schemas/land-unit.ts'
import { plainIssue } from '../../../lib/plain-issue.ts'
import { Field } from '../../../ui/field.tsx'
import { FormFoot } from '../../../ui/form-foot.tsx'
import { useConfirmLandUnit } from '../land-units.queries.ts'

/** What the form begins with: a suggestion, or nothing. */
export type UnitStart = Partial<SaveLandUnit>

interface UnitFormProps {
  start: UnitStart
  onSaved: (unit: LandUnitRow) => void
  onLeave: () => void
}

/** A person who knows the district says what its unit holds. */
export function UnitForm({ start, onSaved, onLeave }: UnitFormProps) {
  const resolver = zodResolver(saveLandUnitSchema as never, { error: plainIssue } as never) as unknown as Resolver<SaveLandUnit>
  const form = useForm<SaveLandUnit>({ resolver, defaultValues: { name: '', district: '', source: '', ...start } })
  const confirm = useConfirmLandUnit()
  const errorOf = (key: keyof SaveLandUnit) => form.formState.errors[key]?.message
  return (
    <form
      noValidate
      onSubmit={form.handleSubmit((unit) => confirm.mutate(unit, { onSuccess: onSaved }))}
      className="border-b-[3px] border-double border-ink px-margin py-3"
    >
      <h2 className="pb-1 text-3">Confirm a unit of land</h2>
      <div className="grid grid-cols-2 items-start gap-x-6 border-t-2 border-ink max-lg:grid-cols-1">
        <Field label="Unit" error={errorOf('name')} {...form.register('name')} />
        <Field
          label="District"
          hint="As the register of places writes it."
          error={errorOf('district')}
          {...form.register('district')}
        />
        <Field label="Holds" unit="m²" inputMode="decimal" error={errorOf('size_m2')} {...form.register('size_m2')} />
        <Field
          label="Said by"
          hint="An office, a record, a person of the district."
          error={errorOf('source')}
          {...form.register('source')}
        />
      </div>
      <FormFoot act={confirm} does="Confirm" onLeave={onLeave} />
    </form>
  )
}
