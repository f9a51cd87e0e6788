import type { RulePage } from '../../../../shared/schemas/rules.ts'
import { momentText } from '../../../lib/time.ts'

/** Who set limits when, and why; the newest first. */
export function Versions({ page }: { page: RulePage }) {
  if (page.versions.length === 0) return null
  return (
    <section aria-labelledby="versions" className="px-margin py-3">
      <h2 id="versions" className="pb-0.5 text-2">
        Versions of the limits
      </h2>
      <ol className="border-t border-line">
        {page.versions.map((version) => (
          <li key={version.version} className="border-b border-feint py-0.5">
            <span className="figures">{version.version}</span>, {version.setBy}, {momentText(version.setAt)}: “{version.why}”
          </li>
        ))}
      </ol>
    </section>
  )
}
