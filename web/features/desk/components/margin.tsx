import type { ReactNode, RefObject } from 'react'
import { formatValue } from '../../../../shared/layouts/cell-value.ts'
import { wordsFor } from '../../../../shared/layouts/layout.ts'
import type { Sheet } from '../../../../shared/schemas/sheet.ts'
import { counted } from '../../../lib/words.ts'
import { KeyCap } from '../../../ui/foot.tsx'
import { LETTERS } from '../model/desk-items.ts'
import type { Desk } from '../use-desk.ts'
import type { DeskActs } from '../use-desk-acts.ts'
import { CropOrOrigin } from './crop-or-origin.tsx'
import { MarginAsks } from './margin-asks.tsx'
import { OffersTable } from './offers-table.tsx'
import { OtherDoubts } from './other-doubts.tsx'
import { SheetHistory } from './sheet-history.tsx'
import { TroubleNote } from './trouble-note.tsx'

interface MarginProps {
  desk: Desk
  /** Who else has the sheet, in words; null: it is in this person's hand. */
  held: string | null
  acts: DeskActs
  picture: string | null
  crop: RefObject<HTMLElement | null>
  /** Acts on the whole sheet that need a reason. */
  onSendBack: (reason: string) => void
  onSetAside: (reason: string) => void
  /** Enters a challenged sheet with the answer. */
  onAnswer: (answer: string) => void
}

/** Beside the sheet: the doubt in hand in one sentence, its ink enlarged, what may be taken, and the other doubts. */
export function Margin(props: MarginProps) {
  const { desk, held, acts, picture, crop } = props
  const { item } = desk
  return (
    <section
      aria-label="The doubt in hand"
      className="min-h-0 grow overflow-y-auto border-l-[3px] border-double border-line pb-2 max-lg:border-l-0"
    >
      <div className="px-3 pt-2 lg:min-h-[198px]">
        {held && (
          <p role="status" className="mb-2 border-l-[3px] border-ink bg-straw-pale py-1 pr-1 pl-2">
            <strong>{held}</strong> You may look at it; it comes into your hand as soon as it is free.
          </p>
        )}
        <TroubleNote desk={desk} />
        <Challenged sheet={desk.sheet} />
        <p className="label flex flex-wrap justify-between gap-x-2">
          <span>
            {item ? (
              <>
                <strong className="text-ink">
                  Doubt {item.number} of {desk.count.all}
                </strong>{' '}
                on this sheet
              </>
            ) : (
              `${desk.count.settled} of ${counted(desk.count.all, 'doubt')} settled`
            )}
          </span>
          {item?.doubt && <span>rule {item.doubt.rule}</span>}
        </p>
        <div aria-live="polite">
          <Headline desk={desk} acts={acts} />
        </div>
        {acts.says && (
          <p role="status" className="mt-1 border-l-[3px] border-ink pl-1 font-[650]">
            {acts.says}
          </p>
        )}
      </div>
      <CropOrOrigin desk={desk} acts={acts} picture={picture} boxRef={crop} />
      <div className="px-3 pt-1">
        {acts.mode.kind === 'look' || (desk.readOnly && acts.mode.kind !== 'find' && acts.mode.kind !== 'keys') ? (
          <>
            {acts.proposal && <OffersTable desk={desk} proposal={acts.proposal} onTake={acts.take} />}
            {item?.doubt && !desk.key && <NamedCells desk={desk} onTake={(n) => acts.takeNumber(n)} />}
          </>
        ) : (
          <MarginAsks {...props} />
        )}
        <h2 className="mt-3 mb-0.5 text-[15px]">All doubts</h2>
        <OtherDoubts desk={desk} />
        <SheetHistory history={desk.sheet.history} />
      </div>
    </section>
  )
}

/** Who challenged the record of this sheet, and why. */
function Challenged({ sheet }: { sheet: Sheet }) {
  if (sheet.state !== 'challenged') return null
  const who = sheet.history.findLast((line) => line.action === 'challenged')?.who
  return (
    <p className="mb-2 border-l-[3px] border-ink pl-2">
      Challenged {who ? `by ${who} ` : ''}after it was entered: “{sheet.reason}”
    </p>
  )
}

function Headline({ desk, acts }: { desk: Desk; acts: DeskActs }) {
  const { item } = desk
  if (item) {
    return (
      <>
        <h1 className="mt-0.5 text-5 leading-[36px]">{item.label}</h1>
        <p className="mt-0.5 text-2 leading-[27px]">{item.text}</p>
        {acts.cell && item.doubt && item.cells.length > 1 && !desk.readOnly && (
          <p className="mt-0.5">
            In hand: <strong>{wordsFor(acts.cell)}</strong>. What is typed here corrects it.
          </p>
        )}
        {acts.proposal?.split && item.reading && !desk.readOnly && (
          <p className="mt-0.5 text-2">The ink favours one value, the sums another. You choose.</p>
        )}
        {item.reading && item.cells.length > 0 && <Letters desk={desk} />}
      </>
    )
  }
  if (acts.cell) {
    return (
      <>
        <h1 className="mt-0.5 text-5 leading-[36px] first-letter:uppercase">{wordsFor(acts.cell)}</h1>
        <p className="text-2">
          {acts.reading?.value === null && desk.sheet.origin === 'keyed'
            ? 'Key what stands on the paper; b where it is blank there too.'
            : desk.readOnly
              ? 'Nobody doubts it.'
              : 'Nobody doubts it. It may be corrected all the same.'}
        </p>
      </>
    )
  }
  const done = desk.count.all > 0 ? 'Every doubt is settled.' : 'Nothing is in doubt here.'
  if (desk.sheet.state === 'challenged' && !desk.readOnly) {
    return (
      <>
        <h1 className="mt-0.5 text-5 leading-[36px]">Answer the challenge</h1>
        <p className="text-2">
          {done} Correct what the challenge names, or enter the sheet again as it stands: Shift Enter asks for one line of answer.
        </p>
      </>
    )
  }
  return (
    <>
      <h1 className="mt-0.5 text-5 leading-[36px]">{desk.readOnly ? 'Nothing is open here' : 'Ready to enter'}</h1>
      <p className="text-2">
        {done} {!desk.readOnly && 'Shift Enter puts it into the trial book.'}
      </p>
    </>
  )
}

/** The other cells the sentence is about, as lettered on the sheet. */
function Letters({ desk }: { desk: Desk }) {
  return (
    <ul className="mt-0.5 flex flex-wrap gap-x-2">
      {(desk.item?.cells ?? []).map((key, i) => (
        <li key={key}>
          <Letter>{LETTERS[i]}</Letter> <CellValue desk={desk} cellKey={key} />
        </li>
      ))}
    </ul>
  )
}

/** For a doubt of a rule: its cells, any of which can be taken in hand and corrected. */
function NamedCells({ desk, onTake }: { desk: Desk; onTake: (n: number) => void }) {
  return (
    <ul aria-label="Cells the rule compares" className="border-t-[1.5px] border-ink">
      {(desk.item?.cells ?? []).map((key, i) => (
        <li key={key} className="border-b border-feint">
          <button type="button" className="flex min-h-[36px] w-full items-baseline gap-1 text-left" onClick={() => onTake(i + 1)}>
            {i < 9 && !desk.readOnly && <KeyCap>{i + 1}</KeyCap>}
            <Letter>{LETTERS[i]}</Letter>
            <CellValue desk={desk} cellKey={key} />
          </button>
        </li>
      ))}
      {desk.item && desk.item.more > 0 && <li className="label py-0.5">and {desk.item.more} more</li>}
    </ul>
  )
}

const Letter = ({ children }: { children: ReactNode }) => (
  <span className="bg-ink px-0.5 text-1 font-[700] text-white">{children}</span>
)

function CellValue({ desk, cellKey }: { desk: Desk; cellKey: string }) {
  const cell = desk.layout.cells.find((c) => c.key === cellKey)
  const reading = desk.view.readings.get(cellKey)
  return (
    <span>
      {cell ? wordsFor(cell) : cellKey}{' '}
      <span className={`figures ${reading?.origin === 'person' ? 'text-pen' : ''}`}>
        {formatValue(cell, reading?.value ?? null)}
      </span>{' '}
      {reading?.unit}
    </span>
  )
}
