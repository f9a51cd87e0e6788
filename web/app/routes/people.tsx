import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { InviteForm } from '../../features/people/components/invite-form.tsx'
import { PeopleTable } from '../../features/people/components/people-table.tsx'
import { peopleQueries, useInviteAgain, useUpdatePerson } from '../../features/people/people.queries.ts'
import { useMe } from '../../lib/me.ts'
import { counted } from '../../lib/words.ts'
import { Button } from '../../ui/button.tsx'
import { Page } from '../../ui/page.tsx'
import { ErrorNote, ErrorState, Loading, Saved } from '../../ui/says.tsx'
import { ADMIN, OnlyFor } from './only-for.tsx'

export const Component = () => (
  <OnlyFor roles={ADMIN} title="People" says="People are managed by the admin.">
    <PeoplePage />
  </OnlyFor>
)

function PeoplePage() {
  const me = useMe()
  const [inviting, setInviting] = useState(false)
  const [saved, setSaved] = useState<string | null>(null)
  const people = useQuery(peopleQueries.list())
  const update = useUpdatePerson()
  const again = useInviteAgain()
  const said = people.data
    ? `${counted(people.data.filter((p) => p.active).length, 'person', 'people')} may work here.`
    : 'People'
  return (
    <Page title="People" sentence={said} aside={<Button onClick={() => setInviting(true)}>Invite somebody</Button>}>
      {inviting && <InviteForm onDone={() => setInviting(false)} />}
      {(update.error || again.error) && (
        <div className="px-margin py-2">
          <ErrorNote error={update.error ?? again.error} />
        </div>
      )}
      {saved && <Saved says={saved} />}
      {people.error && <ErrorState error={people.error} again={() => people.refetch()} />}
      {people.isPending && <Loading what="Looking up who works here" />}
      {people.data && (
        <PeopleTable
          people={people.data}
          me={me}
          onRole={({ id, name }, role) =>
            update.mutate({ id, change: { role } }, { onSuccess: () => setSaved(`Saved: ${name} works as ${role}.`) })
          }
          onActive={({ id, name }, active) =>
            update.mutate(
              { id, change: { active } },
              {
                onSuccess: () =>
                  setSaved(`Saved: ${name} ${active ? 'may sign in again' : 'is disabled and can no longer sign in'}.`),
              },
            )
          }
          onInvite={({ id, name }) =>
            again.mutate(id, { onSuccess: () => setSaved(`The invitation of ${name} went out again.`) })
          }
        />
      )}
    </Page>
  )
}
