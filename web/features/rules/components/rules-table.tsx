import type { ReactNode } from 'react'
import { limitWords } from '../../../../shared/checks/limits.ts'
import type { RuleLimit, RulePage, RuleRow } from '../../../../shared/schemas/rules.ts'
import { listed } from '../../../lib/words.ts'
import { Button } from '../../../ui/button.tsx'
import { type LedgerColumn, LedgerTable } from '../../../ui/ledger-table.tsx'

/** A limit's tag stands beside it in words already. */
const withoutTag = (source: string) => source.replace(/^\[[FMP]\] ?/, '')

const SURE: Record<string, string> = { P: 'common practice', M: 'from memory', F: 'published' }

/** The tags in a rule's reason, written out: "… usual (common practice)." */
const plain = (why: string) =>
  why.replaceAll(/(,?) \[([FMP])\]/g, (_tag, comma: string, sure: string) => (comma ? `, ${SURE[sure]}` : ` (${SURE[sure]})`))

/** "lowest 500 mL (common practice), the product ships 450 mL" */
function LimitLine({ limit }: { limit: RuleLimit }) {
  const unit = limit.unit ? ` ${limit.unit}` : ''
  const source = withoutTag(limit.source)
  return (
    <li>
      {limitWords(limit.name)} <span className="figures">{Number(limit.value.toPrecision(6))}</span>
      {unit}{' '}
      <span className="label">
        {limit.certainty}
        {source && `: ${source}`}
        {limit.value !== limit.usual && `; set here, shipped as ${Number(limit.usual.toPrecision(6))}${unit}`}
      </span>
    </li>
  )
}

/** "right 3 of 5" of those a person has answered; nothing to say of a rule that never fired. */
function answeredWords({ fired, right, letStand }: RuleRow): string {
  if (fired === 0) return '–'
  return right + letStand === 0 ? 'none answered' : `${right} of ${right + letStand}`
}

interface RulesTableProps {
  page: RulePage
  /** Opens a rule's limits, which then stand under its row. */
  onChange?: (rule: RuleRow) => void
  under?: (rule: RuleRow) => ReactNode
}

/** The word that opens the limits of a rule: the focus comes back to it. */
export const setLimitsId = (rule: string) => `set-limits-${rule}`

/** Every rule in plain words. */
export function RulesTable({ page, onChange, under }: RulesTableProps) {
  const limits = new Map(page.limits.map((limit) => [limit.name, limit]))
  const columns: LedgerColumn<RuleRow>[] = [
    { key: 'id', head: 'rule', tight: true, stack: 'word', cell: (rule) => <span className="figures">{rule.id}</span> },
    {
      key: 'name',
      head: 'what it looks at, and why',
      stack: 'lead',
      cell: (rule) => (
        <>
          {rule.name}
          <span className="block font-normal">{plain(rule.why)}</span>
        </>
      ),
    },
    { key: 'severity', head: 'can be a', stack: 'named', cell: (rule) => listed(rule.severity) },
    {
      key: 'limits',
      head: 'limits, and how sure they are',
      stack: 'word',
      cell: (rule) => (
        <ul>
          {rule.limits.flatMap((name) => {
            const limit = limits.get(name)
            return limit ? [<LimitLine key={name} limit={limit} />] : []
          })}
        </ul>
      ),
    },
    { key: 'fired', head: 'fired', figures: true, cell: (rule) => rule.fired },
    { key: 'right', head: 'right', tight: true, stack: 'named', cell: answeredWords },
    { key: 'open', head: 'open', figures: true, cell: (rule) => rule.open },
  ]
  if (onChange) {
    columns.push({
      key: 'change',
      head: <span className="away">change</span>,
      tight: true,
      cell: (rule) =>
        rule.limits.length > 0 && (
          <Button
            look="word"
            id={setLimitsId(rule.id)}
            aria-label={`Set limits of ${rule.id}, ${rule.name}`}
            onClick={() => onChange(rule)}
          >
            set limits
          </Button>
        ),
    })
  }
  return (
    <LedgerTable
      stacked
      caption="Every rule, with its limits, how often it fired and how often it was right"
      columns={columns}
      groups={[{ key: 'all', rows: page.rules }]}
      rowKey={(rule) => rule.id}
      {...(under ? { under } : {})}
      quiet={(rule) => rule.fired === 0}
    />
  )
}
