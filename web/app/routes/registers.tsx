import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { Navigate, useParams } from 'react-router-dom'
import { type RegisterName, registerNameSchema } from '../../../shared/schemas/register.ts'
import { type RegisterRow, RegisterTable } from '../../features/registers/components/register-table.tsx'
import { RowForm } from '../../features/registers/components/row-form.tsx'
import { REGISTER_WORDS } from '../../features/registers/register-fields.ts'
import { useMe } from '../../lib/me.ts'
import { paths } from '../../lib/paths.ts'
import { registerQueries } from '../../lib/register-rows.ts'
import { Button } from '../../ui/button.tsx'
import { Page } from '../../ui/page.tsx'
import { EmptyState, ErrorState, Loading, Saved } from '../../ui/says.tsx'
import { RegisterNav } from './register-nav.tsx'

export function Component() {
  const name = registerNameSchema.safeParse(useParams().name)
  if (!name.success) return <Navigate to={paths.register.to('tractors')} replace />
  return <RegisterPage key={name.data} name={name.data} />
}

function RegisterPage({ name }: { name: RegisterName }) {
  const me = useMe()
  const [open, setOpen] = useState<RegisterRow | 'new' | null>(null)
  const [saved, setSaved] = useState<string | null>(null)
  const edit = (row: RegisterRow | 'new') => {
    setSaved(null)
    setOpen(row)
  }
  const rows = useQuery(registerQueries.rows(name))
  const { title, one, says } = REGISTER_WORDS[name]
  const admin = me.role === 'admin'
  return (
    <Page
      title={title}
      over={<RegisterNav />}
      sentence={says}
      aside={admin && <Button onClick={() => edit('new')}>Add a {one}</Button>}
    >
      {open && (
        <RowForm
          key={open === 'new' ? 'new' : open.id}
          register={name}
          row={open === 'new' ? null : open}
          onSaved={(says) => {
            setSaved(says)
            setOpen(null)
          }}
          onLeave={() => setOpen(null)}
        />
      )}
      {saved && <Saved says={saved} />}
      {rows.error && <ErrorState error={rows.error} again={() => rows.refetch()} />}
      {rows.isPending && <Loading what={`Opening the register of ${title.toLowerCase()}`} />}
      {rows.data?.length === 0 && <EmptyState says={`No ${one} is registered yet. Sheets name it by its number.`} />}
      {rows.data && rows.data.length > 0 && (
        <RegisterTable register={name} rows={rows.data as unknown as RegisterRow[]} {...(admin ? { onChange: edit } : {})} />
      )}
    </Page>
  )
}
