/** Pages as pictures: the flattened one for the desk, and the file as it came. */
import type { Readable } from 'node:stream'
import { UserError } from '../../../shared/errors.ts'
import type { UploadKind } from '../../../shared/schemas/upload.ts'
import type { User } from '../../../shared/schemas/user.ts'
import { findShownPage, type ShownPage } from '../../db/repositories/page.ts'
import { isSheetOf } from '../../db/repositories/sheet-people.ts'
import type { Deps } from '../../http/route.ts'
import { uprightKey } from '../../storage/upright-key.ts'

const TYPES: Record<UploadKind, string> = {
  jpeg: 'image/jpeg',
  png: 'image/png',
  webp: 'image/webp',
  heic: 'image/heic',
  tiff: 'image/tiff',
  pdf: 'application/pdf',
  xlsx: 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet',
  csv: 'text/csv; charset=utf-8',
}

/** @throws UserError not_found, also for a demonstrator who neither sent the file nor may open its sheet */
async function getShownPage(deps: Deps, actor: User, pageId: string): Promise<ShownPage> {
  const { manager } = deps.source
  const page = await findShownPage(manager, pageId)
  if (page && (actor.role !== 'demonstrator' || page.uploadedBy === actor.id)) return page
  if (page?.sheetId && (await isSheetOf(manager, page.sheetId, actor.id))) return page
  throw new UserError('not_found', 'There is no such page.')
}

/** The flattened page as JPEG. The key changes with every reading, so it stands for the content. */
export async function openPicture(deps: Deps, actor: User, pageId: string): Promise<{ stream: Readable; key: string }> {
  const { pictureKey } = await getShownPage(deps, actor, pageId)
  if (pictureKey === null) throw new UserError('not_found', 'This page has no flattened picture. Its original can be opened.')
  return { stream: await deps.files.stream(pictureKey), key: pictureKey }
}

/**
 * @param asPicture asks for something an image element can show: the page upright as JPEG where the file itself cannot be shown
 */
export async function openOriginal(
  deps: Deps,
  actor: User,
  pageId: string,
  asPicture: boolean,
): Promise<{ stream: Readable; type: string; fileName: string }> {
  const page = await getShownPage(deps, actor, pageId)
  if (page.storageKey === null) throw new UserError('gone', 'The original of this page is not kept any more.')
  const upright = uprightKey(page.id)
  if (asPicture && (await deps.files.exists(upright))) {
    return { stream: await deps.files.stream(upright), type: TYPES.jpeg, fileName: `${page.fileName}.jpg` }
  }
  return { stream: await deps.files.stream(page.storageKey), type: TYPES[page.kind], fileName: page.fileName }
}
