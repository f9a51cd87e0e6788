import { type FormEvent, useState } from 'react'
import { limitWords } from '../../../../shared/checks/limits.ts'
import type { RulePage, RuleRow } from '../../../../shared/schemas/rules.ts'
import { Button } from '../../../ui/button.tsx'
import { Field } from '../../../ui/field.tsx'
import { ErrorNote } from '../../../ui/says.tsx'
import { useSetLimits } from '../rules.queries.ts'

interface LimitsFormProps {
  page: RulePage
  rule: RuleRow
  /** Told what was saved, in words. */
  onSaved: (says: string) => void
  onLeave: () => void
}

const LEAST_WHY = 3

/** What was typed, checked: a number each, and a reason. Blank puts a limit back to what the product ships with. */
function problemsOf(typed: Record<string, string>, why: string): Record<string, string> {
  const wrong = Object.entries(typed).filter(([, text]) => text.trim() !== '' && !Number.isFinite(Number(text)))
  return {
    ...Object.fromEntries(wrong.map(([name]) => [name, 'A number is needed, such as 12 or 1.5.'])),
    ...(why.trim().length < LEAST_WHY ? { why: 'Say why: the trail and the page of rules show it.' } : {}),
  }
}

/** The limits of one rule, to be set otherwise: saving makes a new version. */
export function LimitsForm({ page, rule, onSaved, onLeave }: LimitsFormProps) {
  const limits = page.limits.filter((limit) => rule.limits.includes(limit.name))
  const [typed, setTyped] = useState(() =>
    Object.fromEntries(limits.map((l) => [l.name, String(Number(l.value.toPrecision(6)))])),
  )
  const [why, setWhy] = useState('')
  const [problems, setProblems] = useState<Record<string, string>>({})
  const save = useSetLimits()
  const submit = (event: FormEvent) => {
    event.preventDefault()
    const found = problemsOf(typed, why)
    setProblems(found)
    if (Object.keys(found).length > 0) return
    const changed = limits.filter((l) => typed[l.name] !== String(Number(l.value.toPrecision(6))))
    const values = changed.map(({ name }) => [name, typed[name]?.trim() === '' ? null : Number(typed[name])] as const)
    save.mutate(
      { limits: Object.fromEntries(values), why, version: page.settingsVersion },
      { onSuccess: (saved) => onSaved(`Saved as version ${saved.settingsVersion}. Sheets not entered yet are judged by it.`) },
    )
  }
  return (
    <form noValidate onSubmit={submit} className="border-b-[3px] border-double border-ink px-margin py-3">
      <h2 className="pb-1 text-3">
        Limits of {rule.id}, {rule.name}
      </h2>
      <p className="label pb-1">Saving makes a new version. Records keep the version that judged them.</p>
      <div className="grid grid-cols-2 items-start gap-x-6 border-t-2 border-ink max-lg:grid-cols-1">
        {limits.map((limit) => (
          <Field
            key={limit.name}
            label={limitWords(limit.name)}
            {...(limit.unit ? { unit: limit.unit } : {})}
            hint={`Shipped as ${Number(limit.usual.toPrecision(6))}; blank puts it back.`}
            error={problems[limit.name]}
            inputMode="decimal"
            value={typed[limit.name] ?? ''}
            onChange={(event) => setTyped({ ...typed, [limit.name]: event.target.value })}
          />
        ))}
        <Field label="Why" error={problems.why} value={why} onChange={(event) => setWhy(event.target.value)} />
      </div>
      {save.error && <ErrorNote error={save.error} kept="What you typed is kept here." />}
      <div className="mt-2 flex gap-3">
        <Button look="ink" type="submit" disabled={save.isPending}>
          Save
        </Button>
        <Button look="word" onClick={onLeave}>
          Leave it
        </Button>
      </div>
    </form>
  )
}
