import { z } from 'zod'
import { type Upload, uploadSchema } from '../../../shared/schemas/upload.ts'
import { understood } from '../../lib/api.ts'
import { ApiError, errorFromAnswer, LINE_DOWN } from '../../lib/api-error.ts'
import type { WaitingFile } from './outbox-db.ts'

const answerSchema = z.object({ uploads: z.array(uploadSchema).min(1) })

/** Sends one file and tells how far it is (0 to 1): fetch cannot tell, so this is the older request. */
export function sendFile(file: WaitingFile, told: (share: number) => void): Promise<Upload> {
  const form = new FormData()
  form.append('files', new Blob([file.bytes], { type: file.type }), file.name)
  if (file.forSheet) form.append('forSheet', file.forSheet)
  return new Promise((resolve, reject) => {
    const request = new XMLHttpRequest()
    request.open('POST', '/api/uploads')
    request.setRequestHeader('X-Sheafbook', '1')
    request.upload.onprogress = (event) => told(event.lengthComputable ? event.loaded / event.total : 0)
    request.onerror = () => reject(new ApiError('line_down', LINE_DOWN))
    request.onload = () => {
      try {
        resolve(uploadOf(request))
      } catch (error) {
        reject(error)
      }
    }
    request.send(form)
  })
}

function uploadOf(request: XMLHttpRequest): Upload {
  const body = parsed(request.responseText)
  if (request.status >= 400) throw errorFromAnswer(request.status, body, request.getResponseHeader('Retry-After'))
  const upload = understood(answerSchema, body).uploads[0]
  if (!upload) throw new ApiError('not_understood', 'The server did not say what became of the file. It is kept here.')
  return upload
}

function parsed(text: string): unknown {
  try {
    return JSON.parse(text)
  } catch {
    return null
  }
}
