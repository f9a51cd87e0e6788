import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import type { RulePage, RuleRow } from '../../../shared/schemas/rules.ts'
import type { Role } from '../../../shared/schemas/user.ts'
import { LimitsForm } from '../../features/rules/components/limits-form.tsx'
import { RulesTable, setLimitsId } from '../../features/rules/components/rules-table.tsx'
import { Versions } from '../../features/rules/components/versions.tsx'
import { ruleQueries } from '../../features/rules/rules.queries.ts'
import { useMe } from '../../lib/me.ts'
import { Page } from '../../ui/page.tsx'
import { ErrorState, Loading, Saved } from '../../ui/says.tsx'
import { OnlyFor } from './only-for.tsx'

const READERS: readonly Role[] = ['clerk', 'analyst', 'admin']

export const Component = () => (
  <OnlyFor roles={READERS} title="Rules" says="The rules are read by clerks, analysts and the admin.">
    <RulesPage />
  </OnlyFor>
)

function RulesPage() {
  const me = useMe()
  const page = useQuery(ruleQueries.page())
  const [open, setOpen] = useState<string | null>(null)
  const [saved, setSaved] = useState<{ rule: string; says: string } | null>(null)
  const edit = (id: string) => {
    setSaved(null)
    setOpen(id)
  }
  const close = (id: string) => {
    setOpen(null)
    document.getElementById(setLimitsId(id))?.focus()
  }
  const under = ({ id }: RuleRow) => saved?.rule === id && <Saved says={saved.says} />
  const form = (data: RulePage, rule: RuleRow) => (
    <LimitsForm
      page={data}
      rule={rule}
      onSaved={(says) => {
        setSaved({ rule: rule.id, says })
        close(rule.id)
      }}
      onLeave={() => close(rule.id)}
    />
  )
  return (
    <Page
      title="Rules"
      over={
        page.data &&
        `rules ${page.data.rulesVersion} · limits ${page.data.settingsVersion === 0 ? 'as shipped' : `version ${page.data.settingsVersion}`}`
      }
      sentence={page.data ? `${page.data.rules.length} rules look at every sheet.` : 'The rules that look at every sheet.'}
    >
      {page.error && <ErrorState error={page.error} again={() => page.refetch()} />}
      {page.isPending && <Loading what="Opening the rules" />}
      {page.data && (
        <>
          <p className="px-margin py-1 text-graphite">
            A stop takes its figures back until a person answers it; a doubt goes to the desk; a note is only shown. Right: a cell
            it named was corrected, or the sheet sent back.
          </p>
          <RulesTable
            page={page.data}
            under={(row) => (row.id === open ? form(page.data, row) : under(row))}
            {...(me.role === 'admin' ? { onChange: (row) => edit(row.id) } : {})}
          />
          <Versions page={page.data} />
        </>
      )}
    </Page>
  )
}
