import { ROLES, type Role, type User } from '../../../../shared/schemas/user.ts'
import { Button } from '../../../ui/button.tsx'
import { type LedgerColumn, LedgerTable } from '../../../ui/ledger-table.tsx'

interface PeopleTableProps {
  people: readonly User[]
  me: User
  onRole: (person: User, role: Role) => void
  onActive: (person: User, active: boolean) => void
  onInvite: (person: User) => void
}

export function PeopleTable({ people, me, onRole, onActive, onInvite }: PeopleTableProps) {
  const columns: LedgerColumn<User>[] = [
    { key: 'number', head: 'no.', figures: true, cell: (p) => p.number },
    { key: 'name', head: 'name', tight: true, cell: (p) => p.name },
    { key: 'email', head: 'e-mail', cell: (p) => p.email },
    {
      key: 'role',
      head: 'works as',
      tight: true,
      cell: (p) =>
        p.id === me.id ? (
          p.role
        ) : (
          <select
            aria-label={`${p.name} works as`}
            className="min-h-[28px] bg-leaf text-pen"
            value={p.role}
            onChange={(event) => onRole(p, event.target.value as Role)}
          >
            {ROLES.map((role) => (
              <option key={role}>{role}</option>
            ))}
          </select>
        ),
    },
    {
      key: 'state',
      head: 'may sign in',
      tight: true,
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
          {p.id !== me.id && (
            <Button
              look="word"
              onClick={() => onActive(p, !p.active)}
              aria-label={`${p.active ? 'Disable' : 'Enable'} ${p.name}`}
            >
              {p.active ? 'disable' : 'enable'}
            </Button>
          )}
        </span>
      ),
    },
  ]
  return (
    <LedgerTable
      caption="People"
      columns={columns}
      groups={[{ key: 'all', rows: people }]}
      rowKey={(p) => p.id}
      quiet={(p) => !p.active}
    />
  )
}
