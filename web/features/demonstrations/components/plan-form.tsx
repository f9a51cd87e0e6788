import { zodResolver } from '@hookform/resolvers/zod'
import { type Resolver, useFieldArray, useForm } from 'react-hook-form'
import { type SaveDemonstration, saveDemonstrationSchema, TRIALS_MAX } from '../../../../shared/schemas/demonstration.ts'
import type { Implement, Kit, Place, Tractor } from '../../../../shared/schemas/register.ts'
import { plainIssue } from '../../../lib/plain-issue.ts'
import { Button } from '../../../ui/button.tsx'
import { Field, FieldChoice } from '../../../ui/field.tsx'
import { ErrorNote } from '../../../ui/says.tsx'
import { type Chosen, choicesOf, nextTrial } from '../plan-model.ts'
import { TrialFields } from './trial-fields.tsx'

export interface PlanChoices {
  places: readonly Place[]
  tractors: readonly Tractor[]
  tools: readonly Implement[]
  kits: readonly Kit[]
  /** null: a demonstrator plans their own. */
  demonstrators: ReadonlyArray<{ id: string; number: number; name: string }> | null
}

interface PlanFormProps {
  begin: SaveDemonstration
  choices: PlanChoices
  /** false once the farmer's name was erased: it does not come back by planning. */
  farmerKnown: boolean
  pending: boolean
  error: unknown
  saveWords: string
  onSave: (plan: SaveDemonstration) => void
  onLeave: () => void
}

const resolver = zodResolver(
  saveDemonstrationSchema as never,
  {
    error: plainIssue,
  } as never,
) as unknown as Resolver<SaveDemonstration>

/** Plans a day: where, who, for which farmer, and which trials with how many runs. What was typed stays when it is refused. */
export function PlanForm({ begin, choices, farmerKnown, pending, error, saveWords, onSave, onLeave }: PlanFormProps) {
  const form = useForm<SaveDemonstration>({ resolver, defaultValues: begin })
  const { fields, append, remove } = useFieldArray({ control: form.control, name: 'trials' })
  const { register, formState, watch, getValues } = form
  const { errors } = formState
  const [heldOn, trials] = watch(['heldOn', 'trials'])
  const offered = (rows: readonly Chosen[], chosen: readonly string[]) => choicesOf(rows, chosen)
  const rowChoices = {
    tractors: offered(
      choices.tractors,
      begin.trials.map((t) => t.tractorId),
    ),
    tools: offered(
      choices.tools,
      begin.trials.map((t) => t.implementId),
    ),
    kits: offered(
      choices.kits,
      begin.trials.map((t) => t.kitId),
    ),
  }
  return (
    <form noValidate onSubmit={form.handleSubmit(onSave)} className="pb-4">
      <div className="grid grid-cols-2 border-b border-line max-lg:grid-cols-1">
        <section aria-labelledby="plan-day" className="border-r-[3px] border-double border-line px-margin py-2 max-lg:border-r-0">
          <h2 id="plan-day" className="pb-1 text-2">
            The day
          </h2>
          <div className="border-t-[1.5px] border-ink">
            <Field label="Date" type="date" error={errors.heldOn?.message} {...register('heldOn')} />
            <FieldChoice
              label="Place"
              none="choose"
              options={offered(choices.places, [begin.placeId])}
              error={errors.placeId?.message}
              {...register('placeId')}
            />
            {choices.demonstrators && (
              <FieldChoice
                label="Demonstrator"
                none="choose"
                options={offered(choices.demonstrators, [])}
                error={errors.demonstratorId?.message}
                {...register('demonstratorId')}
              />
            )}
            <Field
              label="Driver"
              autoComplete="off"
              hint="Printed on the sheets. Leave empty if it is not settled yet."
              error={errors.driver?.message}
              {...register('driver')}
            />
          </div>
        </section>
        <section aria-labelledby="plan-farmer" className="px-margin py-2">
          <h2 id="plan-farmer" className="pb-1 text-2">
            The farmer
          </h2>
          {farmerKnown ? (
            <div className="border-t-[1.5px] border-ink">
              <Field label="Name" autoComplete="off" error={errors.farmer?.name?.message} {...register('farmer.name')} />
              <Field
                label="Phone"
                type="tel"
                autoComplete="off"
                hint="Name, phone and e-mail are kept apart from the trial, and erased when the farmer withdraws consent."
                error={errors.farmer?.phone?.message}
                {...register('farmer.phone')}
              />
              <Field
                label="E-mail"
                type="email"
                autoComplete="off"
                hint="The leaf with the result goes here, if the farmer agrees on the sheet to be called. Leave empty if there is none."
                error={errors.farmer?.email?.message}
                {...register('farmer.email')}
              />
            </div>
          ) : (
            <p className="border-t-[1.5px] border-ink py-1">
              Consent was withdrawn: name, phone and e-mail are erased, and planning does not bring them back.
            </p>
          )}
        </section>
      </div>
      <section aria-labelledby="plan-trials" className="px-margin pt-2">
        <h2 id="plan-trials" className="pb-1 text-2">
          The trials <span className="text-0 font-normal text-graphite">one tractor with one implement on one plot</span>
        </h2>
        <div className="border-t-[1.5px] border-ink">
          {fields.map((field, index) => (
            <TrialFields
              key={field.id}
              index={index}
              register={register}
              errors={errors}
              choices={rowChoices}
              kit={choices.kits.find((kit) => kit.id === trials[index]?.kitId)}
              tool={choices.tools.find((tool) => tool.id === trials[index]?.implementId)}
              heldOn={heldOn}
              layout={trials[index]?.layout}
              onTakeOut={fields.length > 1 ? () => remove(index) : null}
            />
          ))}
        </div>
        {fields.length < TRIALS_MAX && (
          <Button look="word" className="mt-1" onClick={() => append(nextTrial(getValues('trials').at(-1)))}>
            Add a trial
          </Button>
        )}
      </section>
      <div className="px-margin pt-3">
        {error !== null && error !== undefined && <ErrorNote error={error} kept="What you typed is kept here." />}
        {formState.isSubmitted && !formState.isValid && (
          <p role="status" className="pb-1 font-[600]">
            Not saved: the cells with a bar at their left are not right yet.
          </p>
        )}
        <div className="flex flex-wrap items-center gap-3 pt-1">
          <Button look="ink" type="submit" disabled={pending}>
            {saveWords}
          </Button>
          <Button look="word" onClick={onLeave}>
            Leave it
          </Button>
        </div>
      </div>
    </form>
  )
}
