import { useState } from 'react'
import { ROLES, type Role, type User } from '../../../../shared/schemas/user.ts'
import { Button } from '../../../ui/button.tsx'
import { type LedgerColumn, LedgerTable } from '../../../ui/ledger-table.tsx'
import { SignInSwitch } from './sign-in-switch.tsx'

interface PeopleTableProps {
  people: readonly User[]
  me: User
  onRole: (person: User, role: Role) => void
  onActive: (person: User, active: boolean) => void
  onInvite: (person: User) => void
}

/** Choosing alone changes nothing: with the keyboard one passes every role on the way. */
function RolePick({ person, onRole }: { person: User; onRole: PeopleTableProps['onRole'] }) {
  const [role, setRole] = useState(person.role)
  return (
    <span className="inline-flex items-center gap-1">
      <select
        aria-label={`${person.name} works as`}
        className="min-h-[28px] border-b border-line bg-leaf text-pen max-sm:min-h-[44px]"
        value={role}
        onChange={(event) => setRole(event.target.value as Role)}
      >
        {ROLES.map((one) => (
          <option key={one}>{one}</option>
        ))}
      </select>
      {role !== person.role && (
        <Button look="word" aria-label={`Save: ${person.name} works as ${role}`} onClick={() => onRole(person, role)}>
          save
        </Button>
      )}
    </span>
  )
}

export function PeopleTable({ people, me, onRole, onActive, onInvite }: PeopleTableProps) {
  const columns: LedgerColumn<User>[] = [
    { key: 'number', head: 'number', figures: true, cell: (p) => p.number },
    { key: 'name', head: 'name', tight: true, stack: 'lead', cell: (p) => p.name },
    { key: 'email', head: 'e-mail', cell: (p) => p.email },
    {
      key: 'role',
      head: 'works as',
      tight: true,
      stack: 'named',
      cell: (p) => (p.id === me.id ? p.role : <RolePick key={p.role} person={p} onRole={onRole} />),
    },
    {
      key: 'state',
      head: 'may sign in',
      tight: true,
      stack: 'named',
      cell: (p) => (!p.active ? 'no, disabled' : p.hasPassword ? 'yes' : 'invited, no password yet'),
    },
    {
      key: 'act',
      head: <span className="away">change</span>,
      tight: true,
      cell: (p) => (
        <span className="flex gap-2">
          {p.active && !p.hasPassword && (
            <Button look="word" onClick={() => onInvite(p)} aria-label={`Invite ${p.name} again`}>
              invite again
            </Button>
          )}
          {p.id !== me.id && <SignInSwitch key={String(p.active)} person={p} onActive={(active) => onActive(p, active)} />}
        </span>
      ),
    },
  ]
  return (
    <LedgerTable
      stacked
      caption="People"
      columns={columns}
      groups={[{ key: 'all', rows: people }]}
      rowKey={(p) => p.id}
      quiet={(p) => !p.active}
    />
  )
}
