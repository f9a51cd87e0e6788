import { formatValue } from '../../../../shared/layouts/cell-value.ts'
import type { Desk } from '../use-desk.ts'
import type { DeskActs } from '../use-desk-acts.ts'
import { FindCell } from './find-cell.tsx'
import { KeysList } from './keys-list.tsx'
import { ReasonForm } from './reason-form.tsx'
import { Typing } from './typing.tsx'

interface MarginAsksProps {
  desk: Desk
  acts: DeskActs
  onSendBack: (reason: string) => void
  onSetAside: (reason: string) => void
  /** Enters a challenged sheet with the answer. */
  onAnswer: (answer: string) => void
}

/** What the margin asks for while it is busy with something. */
export function MarginAsks({ desk, acts, onSendBack, onSetAside, onAnswer }: MarginAsksProps) {
  const { mode, cell, back } = acts
  switch (mode.kind) {
    case 'type':
      return cell ? (
        <Typing
          cell={cell}
          values={desk.view.values}
          text={mode.text}
          problem={mode.problem}
          onText={acts.retype}
          onDone={acts.typed}
          onCancel={back}
        />
      ) : null
    case 'why':
      return (
        <ReasonForm
          asks={`${cell?.label ?? ''}: ${formatValue(cell ?? undefined, acts.reading?.value ?? null)} becomes ${formatValue(cell ?? undefined, mode.value)}. Why?`}
          starts="so the ink reads"
          does="Correct it"
          least={3}
          onReason={(why) => acts.correct(mode.value, why)}
          onCancel={back}
        />
      )
    case 'let stand': {
      const stops = desk.item?.doubt?.severity === 'stop'
      return (
        <ReasonForm
          asks="Why may this stand?"
          hint={stops ? 'It stops results until somebody says why it may stand.' : 'May stay empty.'}
          does="Let it stand, next doubt"
          least={stops ? 3 : 0}
          onReason={acts.letStand}
          onCancel={back}
        />
      )
    }
    case 'send back':
      return (
        <ReasonForm
          asks="What should the demonstrator look at?"
          hint="They get it by mail and see it on the sheet; a new photo answers it."
          starts={desk.item ? desk.item.text : ''}
          does="Send the sheet back"
          least={3}
          onReason={onSendBack}
          onCancel={back}
        />
      )
    case 'set aside':
      return (
        <ReasonForm
          asks="Why is it set aside?"
          hint="A duplicate, or not a sheet. It is kept, and can be taken up again."
          does="Set it aside"
          least={3}
          onReason={onSetAside}
          onCancel={back}
        />
      )
    case 'answer':
      return (
        <ReasonForm
          asks={`How is the challenge answered? “${desk.sheet.reason ?? ''}”`}
          hint="One line; the trail keeps it with the record."
          does="Enter it again, with this answer"
          least={3}
          onReason={onAnswer}
          onCancel={back}
        />
      )
    case 'find':
      return <FindCell desk={desk} onFound={back} onCancel={back} />
    case 'keys':
      return <KeysList onDone={back} />
    default:
      return null
  }
}
