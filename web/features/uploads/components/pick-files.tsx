import { type DragEvent, useId, useState } from 'react'
import { FILE_LIMITS } from '../../../../shared/limits.ts'

/** What the door takes; the server looks at the content, not at the name. */
const TAKES = 'image/jpeg,image/png,image/webp,image/heic,image/heif,image/tiff,application/pdf,.pdf,.xlsx,.csv,.tif,.tiff,.heic'

interface PickFilesProps {
  onFiles: (files: File[]) => void
}

/** On a phone two large buttons; with a mouse also a place to drop files on. The same two inputs serve both. */
export function PickFiles({ onFiles }: PickFilesProps) {
  const [over, setOver] = useState(false)
  const drop = (event: DragEvent) => {
    event.preventDefault()
    setOver(false)
    const files = [...event.dataTransfer.files].slice(0, FILE_LIMITS.files_at_once)
    if (files.length > 0) onFiles(files)
  }
  return (
    <section
      aria-label="Send sheets"
      onDragOver={(event) => {
        event.preventDefault()
        setOver(true)
      }}
      onDragLeave={() => setOver(false)}
      onDrop={drop}
      className={`grid gap-2 px-margin py-3 sm:grid-cols-[auto_auto_1fr] sm:items-center sm:border-b sm:border-line sm:py-4 ${over ? 'bg-straw-pale' : ''}`}
    >
      <PickButton words="Photograph a sheet" kind="camera" className="pointer-fine:hidden" onFiles={onFiles} />
      <PickButton words="Choose files" kind="files" onFiles={onFiles} />
      <p className="text-graphite sm:pl-2">
        <span className="max-sm:hidden">Or drop them here. </span>
        Photos, scans as PDF, and our forms as XLSX or CSV; up to {FILE_LIMITS.files_at_once} at once.
      </p>
    </section>
  )
}

const LOOK = {
  camera: 'bg-ink text-white',
  files: 'border-2 border-ink pointer-fine:bg-ink pointer-fine:text-white',
} as const

interface PickButtonProps extends PickFilesProps {
  words: string
  kind: keyof typeof LOOK
  className?: string
}

function PickButton({ words, kind, className = '', onFiles }: PickButtonProps) {
  const id = useId()
  const camera = kind === 'camera'
  return (
    <span className={`grid ${className}`}>
      <input
        id={id}
        type="file"
        multiple={!camera}
        accept={camera ? 'image/*' : TAKES}
        {...(camera ? { capture: 'environment' as const } : {})}
        className="peer away"
        onChange={(event) => {
          const files = [...(event.target.files ?? [])].slice(0, FILE_LIMITS.files_at_once)
          // The same photo may be chosen again after it failed.
          event.target.value = ''
          if (files.length > 0) onFiles(files)
        }}
      />
      <label
        htmlFor={id}
        className={`${LOOK[kind]} flex min-h-[66px] items-center justify-center px-4 text-3 font-[650] peer-focus-visible:outline-3 peer-focus-visible:outline-offset-2 peer-focus-visible:outline-ink peer-focus-visible:outline-solid sm:min-h-[54px] sm:text-2`}
      >
        {words}
      </label>
    </span>
  )
}
