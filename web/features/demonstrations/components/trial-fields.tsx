import type { FieldErrors, UseFormRegister } from 'react-hook-form'
import { RUNS_MAX, type SaveDemonstration } from '../../../../shared/schemas/demonstration.ts'
import type { Implement, Kit } from '../../../../shared/schemas/register.ts'
import { Button } from '../../../ui/button.tsx'
import type { FieldOption } from '../../../ui/field.tsx'
import { hasPlot, leastArea_ha, leastFuel_l, oldCheck, sheetChoices } from '../plan-model.ts'
import { FormCell } from './form-cell.tsx'

export interface TrialChoices {
  tractors: readonly FieldOption[]
  tools: readonly FieldOption[]
  kits: readonly FieldOption[]
}

interface TrialFieldsProps {
  index: number
  register: UseFormRegister<SaveDemonstration>
  errors: FieldErrors<SaveDemonstration>
  choices: TrialChoices
  /** The kit and implement chosen, and the day, for what must be said of them. */
  kit: Kit | undefined
  tool: Implement | undefined
  heldOn: string
  /** Key of the sheet chosen. */
  layout: string | undefined
  onTakeOut: (() => void) | null
}

/** One trial as a ruled row of the form: which tractor, with what, on which plot and sheet, how often. */
export function TrialFields({ index, register, errors, choices, kit, tool, heldOn, layout, onTakeOut }: TrialFieldsProps) {
  const wrong = errors.trials?.[index]
  const name = <K extends keyof SaveDemonstration['trials'][number]>(key: K) => register(`trials.${index}.${key}`)
  return (
    <fieldset className="border-b border-line py-2">
      <legend className="away">Trial {index + 1}</legend>
      <div className="flex items-baseline justify-between pb-0.5">
        <h3 className="text-0">Trial {index + 1}</h3>
        {onTakeOut && (
          <Button look="word" aria-label={`Take trial ${index + 1} out`} onClick={onTakeOut}>
            take out
          </Button>
        )}
      </div>
      <div className="grid grid-cols-[1.2fr_1.5fr_1fr_1.2fr_1.4fr_84px] items-start gap-x-2 gap-y-1 max-lg:grid-cols-2 max-sm:grid-cols-1">
        <FormCell label="tractor" error={wrong?.tractorId?.message}>
          {(tied) => <Options {...tied} {...name('tractorId')} options={choices.tractors} />}
        </FormCell>
        <FormCell label="implement" error={wrong?.implementId?.message}>
          {(tied) => <Options {...tied} {...name('implementId')} options={choices.tools} />}
        </FormCell>
        <FormCell label="kit" error={wrong?.kitId?.message} note={kit ? oldCheck(kit, heldOn) : null}>
          {(tied) => <Options {...tied} {...name('kitId')} options={choices.kits} />}
        </FormCell>
        <FormCell label={hasPlot(layout) ? 'plot' : 'way or yard'} error={wrong?.plot?.message}>
          {(tied) => <input {...tied} {...name('plot')} autoComplete="off" />}
        </FormCell>
        <FormCell label="sheet" error={wrong?.layout?.message}>
          {(tied) => <Options {...tied} {...name('layout')} options={sheetChoices} />}
        </FormCell>
        <FormCell label={`runs, 1 to ${RUNS_MAX}`} error={wrong?.runs?.message}>
          {(tied) => <input {...tied} {...name('runs')} inputMode="numeric" autoComplete="off" />}
        </FormCell>
      </div>
      {kit && <LeastFuel kit={kit} tool={hasPlot(layout) ? tool : undefined} />}
    </fieldset>
  )
}

/** Told while planning: a plot too small for the jar gives a figure that says nothing. */
function LeastFuel({ kit, tool }: { kit: Kit; tool: Implement | undefined }) {
  const least = leastFuel_l(kit)
  const area = tool ? leastArea_ha(kit, tool) : null
  const marks = `With this kit's marks (jar ${kit.jarMark_ml} mL, jug ${kit.jugMark_ml} mL)`
  if (least === null) return <p className="label pt-0.5">{marks} no run is sure to ± 5 %.</p>
  return (
    <p className="label pt-0.5">
      {marks} a run must burn at least <span className="figures text-[13.5px] text-ink">{least.toFixed(1)} L</span> to be known to
      ± 5 %.
      {area !== null && (
        <>
          {' '}
          For litres a hectare that is a plot of at least{' '}
          <span className="figures text-[13.5px] text-ink">{(Math.ceil(area * 100) / 100).toFixed(2)} ha</span>, by what this work
          usually burns and passes of 60 m.
        </>
      )}
    </p>
  )
}

function Options({ options, ...select }: { options: readonly FieldOption[] } & React.SelectHTMLAttributes<HTMLSelectElement>) {
  return (
    <select {...select}>
      <option value="">choose</option>
      {options.map(({ value, words }) => (
        <option key={value} value={value}>
          {words}
        </option>
      ))}
    </select>
  )
}
