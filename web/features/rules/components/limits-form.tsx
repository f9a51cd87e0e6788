import { type FormEvent, useEffect, useRef, useState } from 'react'
import { limitProblems } from '../../../../shared/checks/limit-range.ts'
import { limitWords } from '../../../../shared/checks/limits.ts'
import type { RuleLimit, RulePage, RuleRow } from '../../../../shared/schemas/rules.ts'
import { Field } from '../../../ui/field.tsx'
import { FormFoot } from '../../../ui/form-foot.tsx'
import { useSetLimits } from '../rules.queries.ts'

interface LimitsFormProps {
  page: RulePage
  rule: RuleRow
  /** Told what was saved, in words. */
  onSaved: (says: string) => void
  onLeave: () => void
}

const LEAST_WHY = 3

const shown = (value: number) => String(Number(value.toPrecision(6)))

/** The limits typed otherwise than they stand. Blank, null, puts one back to what the product ships with. */
function changesOf(limits: readonly RuleLimit[], typed: Record<string, string>): Map<string, number | null> {
  const changes = limits.map(({ name, value, usual }) => {
    const text = typed[name]?.trim() ?? ''
    const same = text === '' ? value === usual : Number(text) === Number(shown(value))
    return same ? [] : [[name, text === '' ? null : Number(text)] as const]
  })
  return new Map(changes.flat())
}

/** What was typed, checked: a number each, within its range, and a reason. */
function problemsOf(page: RulePage, changes: ReadonlyMap<string, number | null>, why: string): Record<string, string> {
  const standing = page.limits.map(({ name, value, usual }) => [name, changes.has(name) ? (changes.get(name) ?? usual) : value])
  const wrong = [...changes].filter(([, value]) => Number.isNaN(value))
  return {
    ...limitProblems(Object.fromEntries(standing), [...changes.keys()]),
    ...Object.fromEntries(wrong.map(([name]) => [name, 'A number is needed, such as 12 or 1.5.'])),
    ...(why.trim().length < LEAST_WHY ? { why: 'Say why: the trail and the page of rules show it.' } : {}),
  }
}

/** The limits of one rule, to be set otherwise: saving makes a new version. */
export function LimitsForm({ page, rule, onSaved, onLeave }: LimitsFormProps) {
  const limits = page.limits.filter((limit) => rule.limits.includes(limit.name))
  const [typed, setTyped] = useState(() => Object.fromEntries(limits.map((l) => [l.name, shown(l.value)])))
  const [why, setWhy] = useState('')
  const [problems, setProblems] = useState<Record<string, string>>({})
  const save = useSetLimits()
  const form = useRef<HTMLFormElement>(null)
  useEffect(() => form.current?.querySelector('input')?.focus(), [])
  const submit = (event: FormEvent) => {
    event.preventDefault()
    const changes = changesOf(limits, typed)
    if (changes.size === 0) return onSaved('These limits are in force already. No new version was made.')
    const found = problemsOf(page, changes, why)
    setProblems(found)
    if (Object.keys(found).length > 0) return
    save.mutate(
      { limits: Object.fromEntries(changes), why, version: page.settingsVersion },
      { onSuccess: (saved) => onSaved(`Saved as version ${saved.settingsVersion}. Sheets not entered yet are judged by it.`) },
    )
  }
  return (
    <form
      ref={form}
      noValidate
      onSubmit={submit}
      onKeyDown={(event) => event.key === 'Escape' && onLeave()}
      className="border-b-[3px] border-double border-ink px-margin py-3"
    >
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
            hint={`Shipped as ${shown(limit.usual)}; blank puts it back.`}
            error={problems[limit.name]}
            inputMode="decimal"
            value={typed[limit.name] ?? ''}
            onChange={(event) => setTyped({ ...typed, [limit.name]: event.target.value })}
          />
        ))}
        <Field label="Why" error={problems.why} value={why} onChange={(event) => setWhy(event.target.value)} />
      </div>
      <FormFoot act={save} does="Save" onLeave={onLeave} />
    </form>
  )
}
