import { bytesText } from '../../../lib/words.ts'
import { Button } from '../../../ui/button.tsx'
import { Glyph } from '../../../ui/glyphs.tsx'
import { outbox } from '../outbox.ts'
import { useOutbox } from '../use-outbox.ts'

/** "not yet sent 2", for the head of every page. */
export function NotYetSentCount() {
  const { items } = useOutbox()
  if (items.length === 0) return null
  return (
    <span role="status" className="inline-flex items-center gap-1 font-[700]">
      <Glyph name="not yet sent" /> not yet sent <span className="figures">{items.length}</span>
    </span>
  )
}

/** Each file that is still here, with how far it is, and why it waits. */
export function NotYetSentList() {
  const { items } = useOutbox()
  if (items.length === 0) return null
  return (
    <section aria-labelledby="not-yet-sent" className="border-t-[1.5px] border-ink px-margin py-2">
      <h2 id="not-yet-sent" className="text-2">
        Not yet sent
      </h2>
      <p className="text-graphite">Kept on this device until the server has every byte.</p>
      <ul className="mt-1">
        {items.map((item) => (
          <li key={item.id} className="border-b border-feint py-1">
            <div className="flex flex-wrap items-baseline gap-x-2">
              <span className="min-w-0 grow break-all">{item.name}</span>
              <span className="figures text-graphite">{bytesText(item.bytes)}</span>
              <span className="w-[92px] text-right">
                {item.state === 'sending' ? `sent ${Math.round(item.share * 100)} %` : 'waits'}
              </span>
            </div>
            <progress
              aria-label={`${item.name}, sent`}
              max={1}
              value={item.share}
              className="block h-[9px] w-full appearance-none border border-ink bg-leaf [&::-moz-progress-bar]:bg-straw [&::-webkit-progress-bar]:bg-leaf [&::-webkit-progress-value]:border-r-2 [&::-webkit-progress-value]:border-ink [&::-webkit-progress-value]:bg-straw"
            />
            {item.problem && (
              <p className="mt-0.5 flex flex-wrap gap-x-2 border-l-[3px] border-ink pl-1">
                <span className="grow">{item.problem} It is sent again by itself.</span>
                <Button look="word" onClick={() => void outbox.drop(item.id)}>
                  Throw it away
                </Button>
              </p>
            )}
          </li>
        ))}
      </ul>
    </section>
  )
}
