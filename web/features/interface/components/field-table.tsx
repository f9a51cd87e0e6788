import type { FieldLine } from '../interface-model.ts'

/** Names, kinds and whether they are needed, of parameters or of a JSON body. */
export function FieldTable({ caption, lines }: { caption: string; lines: readonly FieldLine[] }) {
  if (lines.length === 0) return null
  return (
    <table className="mt-1 w-full max-w-[860px] border-collapse text-left">
      <caption className="label text-left">{caption}</caption>
      <thead className="away">
        <tr>
          <th scope="col">name</th>
          <th scope="col">kind</th>
          <th scope="col">needed</th>
        </tr>
      </thead>
      <tbody>
        {lines.map(({ path, name, depth, kind, needed }) => (
          <tr key={path} className="border-b border-feint align-top">
            <th
              scope="row"
              className="figures py-0.5 pr-2 font-normal whitespace-nowrap"
              style={{ paddingLeft: `${depth * 12}px` }}
            >
              {name}
            </th>
            <td className="py-0.5 pr-2">{kind}</td>
            <td className="py-0.5 text-graphite">{needed ? 'always' : 'or left out'}</td>
          </tr>
        ))}
      </tbody>
    </table>
  )
}
