import { type Entry, exampleOf, fieldLines, kindOf, scopeOf } from '../interface-model.ts'
import { FieldTable } from './field-table.tsx'

const answerOf = ({ operation }: Entry) => {
  const [status = '', answer] = Object.entries(operation.responses).find(([code]) => code !== 'default') ?? []
  const [type, content] = Object.entries(answer?.content ?? {})[0] ?? []
  return { status, type, schema: type === 'application/json' ? content?.schema : undefined }
}

/** One route: what it does, what it needs, how it is called, what it answers. */
export function RouteEntry({ entry }: { entry: Entry }) {
  const { method, path, operation } = entry
  const scope = scopeOf(operation)
  const answer = answerOf(entry)
  const body = operation.requestBody?.content['application/json']?.schema
  const parameters = operation.parameters.map(({ name, in: where, required, schema }) => ({
    path: `${where}.${name}`,
    name,
    depth: 0,
    kind: `${kindOf(schema)}, in the ${where === 'path' ? 'address' : where}`,
    needed: required ?? false,
  }))
  return (
    <li className="border-b border-line py-1">
      <details>
        <summary className="min-h-[30px] cursor-pointer max-sm:min-h-[44px]">
          <span className="figures inline-block w-[66px]">{method}</span> <span className="figures break-all">{path}</span>{' '}
          <span>{operation.summary}</span>
        </summary>
        <div className="py-1 pl-[18px] max-sm:pl-0">
          <p>
            {operation.description} {scope === null ? 'No token is taken here.' : `A token needs the scope “${scope}”.`}
          </p>
          <FieldTable caption="Parameters" lines={parameters} />
          <FieldTable caption="Body, JSON" lines={fieldLines(body)} />
          <FieldTable
            caption={`Answer ${answer.status}, ${answer.schema ? `JSON: ${kindOf(answer.schema)}` : ''}`}
            lines={fieldLines(answer.schema)}
          />
          {!answer.schema && (
            <p className="label mt-1">
              Answer {answer.status}
              {answer.type ? `, ${answer.type}` : ', without content'}
            </p>
          )}
          {scope !== null && (
            <p className="figures mt-1 bg-leaf px-2 py-1 break-all select-all">{exampleOf(entry, window.location.origin)}</p>
          )}
        </div>
      </details>
    </li>
  )
}
