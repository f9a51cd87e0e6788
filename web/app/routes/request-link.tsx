import { Cover } from '../../features/session/components/cover.tsx'
import { RequestLinkForm } from '../../features/session/components/request-link-form.tsx'

export function Component() {
  return (
    <Cover title="Have a link sent" says="It opens a page where you set a new password.">
      <RequestLinkForm />
    </Cover>
  )
}
