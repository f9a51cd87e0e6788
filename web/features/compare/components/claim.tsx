import type { Claim } from '../../../../shared/schemas/book-comparison.ts'

/** The one sentence, its figure in the band. */
export function ClaimSentence({ claim }: { claim: Claim }) {
  return (
    <>
      {claim.before}{' '}
      {claim.figure !== '' && (
        <span
          className={`figures inline-block border border-ink px-1 whitespace-nowrap ${claim.may ? 'bg-straw' : 'hatch-straw'}`}
        >
          <span className={claim.may ? '' : 'bg-straw-pale px-0.5'}>{claim.figure}</span>
        </span>
      )}{' '}
      {claim.after}
    </>
  )
}

/** Why it may be said or not, and what may not be said at all. */
export function ClaimReasons({ claim }: { claim: Claim }) {
  return (
    <div className="max-w-[470px] border-l-[3px] border-double border-line pl-2">
      <p>
        <strong>{claim.may ? 'May be said because' : 'May not be said:'}</strong> {claim.because.join('; ')}
        {claim.because.at(-1)?.endsWith('.') ? '' : '.'}
      </p>
      <p className="pt-1">
        <strong>{claim.may ? 'May not be said:' : 'Nor:'}</strong> {claim.mayNot}
      </p>
    </div>
  )
}
